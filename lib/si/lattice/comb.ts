import type { Circuit } from "./circuit";
import type { Cluster } from "./clusters";
import { solveInPlace } from "./linear-solve";

/** What one moment of the comb does, per 1 V of source step. Its arrays are overwritten by the next. */
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
  /** working arrays, overwritten at each moment */
  current: Float64Array;
  rise: Float64Array;
  incident: Float64Array;
  outgoing: Float64Array;
  isWaiting: boolean;
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
    const made = {
      cluster,
      inverse,
      current: new Float64Array(size),
      rise: new Float64Array(size),
      incident: new Float64Array(ports.length),
      outgoing: new Float64Array(ports.length),
      isWaiting: false,
    };
    if (ports.length + feeds.length === 0) return made;
    for (let i = 0; i < size; i++) inverse[i * size + i] = 1;
    solveInPlace(g.slice(), inverse, size, size);
    return made;
  });
}

/**
 * Every arrival in a resistive lattice after a 1 V step of one fixed node at t = 0, in order of time; exact, whatever
 * the delays. Waves that meet at the same moment in the same cluster are one event.
 *
 * @returns false where `most` was reached before `until`
 */
export function runComb(
  circuit: Circuit,
  clusters: readonly CombCluster[],
  fixed: number,
  { until, floor, most }: CombLimits,
  each: (event: CombEvent) => void,
): boolean {
  const queue = new WaveQueue();
  const clusterOfEnd: { index: number; port: number }[] = [];
  clusters.forEach(({ cluster }, index) =>
    cluster.ports.forEach(({ end }, port) => (clusterOfEnd[end] = { index, port })),
  );
  let shortest = Infinity;
  for (const line of circuit.lines) shortest = Math.min(shortest, line.delay);
  const together = shortest * SAME_MOMENT;
  const last = until * (1 + 1e-12);
  let count = 0;
  const scatter = (time: number, at: CombCluster, starts: boolean) => {
    const { cluster, inverse, current, rise, incident, outgoing } = at;
    const { size, ports } = cluster;
    current.fill(0);
    if (starts)
      for (const feed of cluster.feeds)
        if (feed.fixed === fixed) current[feed.row] = current[feed.row]! + feed.siemens;
    for (let k = 0; k < ports.length; k++) {
      const port = ports[k]!;
      const inflow = 2 * port.admittance * incident[k]!;
      if (port.node >= 0) current[port.node] = current[port.node]! + inflow;
      if (port.second >= 0) current[port.second] = current[port.second]! + port.sign * inflow;
    }
    for (let i = 0; i < size; i++) {
      let sum = 0;
      for (let j = 0; j < size; j++) sum += inverse[i * size + j]! * current[j]!;
      rise[i] = sum;
    }
    for (let k = 0; k < ports.length; k++) {
      const port = ports[k]!;
      let v = 0;
      if (starts) for (const held of port.held) if (held.fixed === fixed) v += held.factor;
      if (port.node >= 0) v += port.share * rise[port.node]!;
      if (port.second >= 0) v += port.secondShare * rise[port.second]!;
      const wave = v - incident[k]!;
      outgoing[k] = wave;
      const arrival = time + circuit.lines[port.end >> 1]!.delay;
      if (Math.abs(wave) > floor && arrival <= last) queue.push(arrival, port.end ^ 1, wave);
    }
    each({ time, cluster: at, rise, incident, outgoing });
    incident.fill(0);
    at.isWaiting = false;
    count++;
  };
  for (const at of clusters) {
    const { feeds, ports } = at.cluster;
    if (
      feeds.some((feed) => feed.fixed === fixed) ||
      ports.some((port) => port.held.some((held) => held.fixed === fixed))
    )
      scatter(0, at, true);
  }
  const waiting: CombCluster[] = [];
  while (queue.size > 0 && count < most) {
    const time = queue.nextTime();
    waiting.length = 0;
    while (queue.size > 0 && queue.nextTime() - time <= together) {
      const end = queue.nextEnd();
      const { index, port } = clusterOfEnd[end]!;
      const at = clusters[index]!;
      if (!at.isWaiting) {
        at.isWaiting = true;
        waiting.push(at);
      }
      at.incident[port] = at.incident[port]! + queue.nextWave();
      queue.drop();
    }
    for (const at of waiting) scatter(time, at, false);
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

  nextEnd(): number {
    return this.ends[0]!;
  }

  nextWave(): number {
    return this.waves[0]!;
  }

  drop(): void {
    const { times, ends, waves } = this;
    const time = times.pop()!;
    const end = ends.pop()!;
    const wave = waves.pop()!;
    const size = times.length;
    if (size === 0) return;
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
  }
}
