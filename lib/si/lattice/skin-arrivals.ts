import type { Circuit } from "./circuit";
import type { CombCluster } from "./comb";

/** A step's arrival at some place: by all paths that took equally long and lost equally much. */
export interface SkinArrival {
  /** [s] */
  time: number;
  /** of the whole way [√s] */
  skin: number;
  cluster: CombCluster;
  /** rise of each of the cluster's nodes, per 1 V of source step, once the loss has died out */
  rise: Float64Array;
  incident: Float64Array;
  outgoing: Float64Array;
}

interface Moment {
  time: number;
  skin: number;
  cluster: CombCluster;
  incident: Float64Array;
}

/** Arrivals closer than this share of the shortest delay are one moment; the same for losses. */
const SAME = 1e-9;

/**
 * Every arrival in a resistive lattice with skin loss after a 1 V step of one fixed node at t = 0. Along a way of
 * several sections delays and losses add: exp(−s Σ delay − √s Σ skin).
 *
 * @param floor  waves below this share of the step are dropped
 * @returns null where there are more than `most`
 */
export function skinArrivals(
  circuit: Circuit,
  clusters: readonly CombCluster[],
  fixed: number,
  { until, floor, most }: { until: number; floor: number; most: number },
): SkinArrival[] | null {
  const shortest = Math.min(until, ...circuit.lines.map((line) => line.delay));
  const largest = Math.max(...circuit.lines.map((line) => line.skin));
  const home = new Map<number, { cluster: CombCluster; port: number }>();
  for (const cluster of clusters)
    cluster.cluster.ports.forEach(({ end }, port) => home.set(end, { cluster, port }));
  const waiting: Moment[] = [];
  const arrivals: SkinArrival[] = [];
  const send = (time: number, skin: number, end: number, wave: number) => {
    const { cluster, port } = home.get(end)!;
    let at = waiting.length;
    // Latest first, so that the next is popped off the end.
    while (at > 0 && waiting[at - 1]!.time < time - SAME * shortest) at--;
    for (let k = at - 1; k >= 0 && waiting[k]!.time <= time + SAME * shortest; k--) {
      const moment = waiting[k]!;
      if (moment.cluster !== cluster || Math.abs(moment.skin - skin) > SAME * largest) continue;
      moment.incident[port] = moment.incident[port]! + wave;
      return;
    }
    const incident = new Float64Array(cluster.cluster.ports.length);
    incident[port] = wave;
    waiting.splice(at, 0, { time, skin, cluster, incident });
  };
  const scatter = ({ time, skin, cluster, incident }: Moment, starts: boolean) => {
    const { ports, size, feeds } = cluster.cluster;
    const current = new Float64Array(size);
    if (starts)
      for (const feed of feeds)
        if (feed.fixed === fixed) current[feed.row] = current[feed.row]! + feed.siemens;
    ports.forEach((port, k) => {
      const inflow = 2 * port.admittance * incident[k]!;
      if (port.node >= 0) current[port.node] = current[port.node]! + inflow;
      if (port.second >= 0) current[port.second] = current[port.second]! + port.sign * inflow;
    });
    const rise = new Float64Array(size);
    for (let i = 0; i < size; i++)
      for (let j = 0; j < size; j++) rise[i] = rise[i]! + cluster.inverse[i * size + j]! * current[j]!;
    const outgoing = Float64Array.from(ports, (port, k) => {
      let v = -incident[k]!;
      if (starts) for (const held of port.held) if (held.fixed === fixed) v += held.factor;
      if (port.node >= 0) v += port.share * rise[port.node]!;
      if (port.second >= 0) v += port.secondShare * rise[port.second]!;
      return v;
    });
    arrivals.push({ time, skin, cluster, rise, incident, outgoing });
    ports.forEach(({ end }, k) => {
      const line = circuit.lines[end >> 1]!;
      if (Math.abs(outgoing[k]!) > floor && time + line.delay <= until)
        send(time + line.delay, skin + line.skin, end ^ 1, outgoing[k]!);
    });
  };
  for (const cluster of clusters) {
    const { feeds, ports } = cluster.cluster;
    if (
      feeds.some((feed) => feed.fixed === fixed) ||
      ports.some((port) => port.held.some((held) => held.fixed === fixed))
    )
      scatter({ time: 0, skin: 0, cluster, incident: new Float64Array(ports.length) }, true);
  }
  for (let next = waiting.pop(); next; next = waiting.pop()) {
    if (arrivals.length >= most) return null;
    scatter(next, false);
  }
  return arrivals;
}
