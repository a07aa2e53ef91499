import type { Circuit } from "./circuit";
import type { Cluster } from "./clusters";
import { solveInPlace } from "./linear-solve";

/** What one moment of the comb does, per 1 V of source step. */
export interface CombEvent {
  time: number;
  cluster: CombCluster;
  /** rise of each of the cluster's nodes */
  rise: Float64Array;
  /** by the cluster's ports: wave that arrived, wave that leaves */
  incident: Float64Array;
  outgoing: Float64Array;
}

export interface CombCluster {
  cluster: Cluster;
  /** G⁻¹, row after row */
  inverse: Float64Array;
}

export interface CombLimits {
  until: number;
  /** waves below this share of the source step are dropped */
  floor: number;
  /** most moments before giving up */
  most: number;
}

/** Arrivals closer than this share of the shortest delay are one moment. */
const SAME_MOMENT = 1e-9;

export function combClusters(clusters: readonly Cluster[]): CombCluster[] {
  return clusters.map((cluster) => {
    const { size, g, ports, feeds } = cluster;
    const inverse = new Float64Array(size * size);
    if (ports.length + feeds.length === 0) return { cluster, inverse };
    for (let i = 0; i < size; i++) inverse[i * size + i] = 1;
    solveInPlace(g.slice(), inverse, size, size);
    return { cluster, inverse };
  });
}

/**
 * Every arrival in a resistive lattice after a 1 V step of one fixed node at t = 0, in order of time; exact, whatever
 * the delays. Waves that meet at the same moment in the same cluster are one event.
 *
 * @returns false where `most` was reached before `until`
 */
export function runComb(circuit: Circuit, clusters: readonly CombCluster[], fixed: number, { until, floor, most }: CombLimits, each: (event: CombEvent) => void): boolean {
  const queue = new WaveQueue();
  const clusterOfEnd: { index: number; port: number }[] = [];
  clusters.forEach(({ cluster }, index) => cluster.ports.forEach(({ end }, port) => (clusterOfEnd[end] = { index, port })));
  let shortest = Infinity;
  for (const line of circuit.lines) shortest = Math.min(shortest, line.delay);
  const together = shortest * SAME_MOMENT;
  const last = until * (1 + 1e-12);
  let count = 0;
  const scatter = (time: number, at: CombCluster, incident: Float64Array, starts: boolean) => {
    const { cluster, inverse } = at;
    const { size, ports } = cluster;
    const current = new Float64Array(size);
    if (starts) for (const feed of cluster.feeds) if (feed.fixed === fixed) current[feed.row] = current[feed.row]! + feed.siemens;
    ports.forEach((port, k) => {
      const inflow = 2 * port.admittance * incident[k]!;
      if (port.node >= 0) current[port.node] = current[port.node]! + inflow;
      if (port.second >= 0) current[port.second] = current[port.second]! + port.sign * inflow;
    });
    const rise = new Float64Array(size);
    for (let i = 0; i < size; i++) {
      let sum = 0;
      for (let j = 0; j < size; j++) sum += inverse[i * size + j]! * current[j]!;
      rise[i] = sum;
    }
    const outgoing = new Float64Array(ports.length);
    ports.forEach((port, k) => {
      let v = 0;
      if (starts) for (const held of port.held) if (held.fixed === fixed) v += held.factor;
      if (port.node >= 0) v += port.share * rise[port.node]!;
      if (port.second >= 0) v += port.secondShare * rise[port.second]!;
      const wave = v - incident[k]!;
      outgoing[k] = wave;
      const arrival = time + circuit.lines[port.end >> 1]!.delay;
      if (Math.abs(wave) > floor && arrival <= last) queue.push(arrival, port.end ^ 1, wave);
    });
    each({ time, cluster: at, rise, incident, outgoing });
    count++;
  };
  for (const at of clusters) {
    const { feeds, ports } = at.cluster;
    if (feeds.some((feed) => feed.fixed === fixed) || ports.some((port) => port.held.some((held) => held.fixed === fixed))) scatter(0, at, new Float64Array(ports.length), true);
  }
  const waiting = new Map<number, Float64Array>();
  while (queue.size > 0 && count < most) {
    const time = queue.nextTime();
    waiting.clear();
    while (queue.size > 0 && queue.nextTime() - time <= together) {
      const { end, wave } = queue.pop();
      const { index, port } = clusterOfEnd[end]!;
      let incident = waiting.get(index);
      if (!incident) waiting.set(index, (incident = new Float64Array(clusters[index]!.cluster.ports.length)));
      incident[port] = incident[port]! + wave;
    }
    for (const [index, incident] of waiting) scatter(time, clusters[index]!, incident, false);
  }
  return queue.size === 0;
}

/** Waves under way, the next arrival on top. */
class WaveQueue {
  private readonly times: number[] = [];
  private readonly ends: number[] = [];
  private readonly waves: number[] = [];

  get size(): number {
    return this.times.length;
  }

  nextTime(): number {
    return this.times[0]!;
  }

  push(time: number, end: number, wave: number): void {
    const { times, ends, waves } = this;
    let i = times.length;
    times.push(time);
    ends.push(end);
    waves.push(wave);
    while (i > 0) {
      const up = (i - 1) >> 1;
      if (times[up]! <= time) break;
      times[i] = times[up]!;
      ends[i] = ends[up]!;
      waves[i] = waves[up]!;
      i = up;
    }
    times[i] = time;
    ends[i] = end;
    waves[i] = wave;
  }

  pop(): { end: number; wave: number } {
    const { times, ends, waves } = this;
    const top = { end: ends[0]!, wave: waves[0]! };
    const time = times.pop()!;
    const end = ends.pop()!;
    const wave = waves.pop()!;
    const size = times.length;
    if (size === 0) return top;
    let i = 0;
    for (;;) {
      let next = 2 * i + 1;
      if (next >= size) break;
      if (next + 1 < size && times[next + 1]! < times[next]!) next++;
      if (times[next]! >= time) break;
      times[i] = times[next]!;
      ends[i] = ends[next]!;
      waves[i] = waves[next]!;
      i = next;
    }
    times[i] = time;
    ends[i] = end;
    waves[i] = wave;
    return top;
  }
}
