import type { GridPlan, PlannedCluster } from "./grid-plan";
import type { Channel } from "./channels";
import type { ClusterPort } from "./clusters";
import { workspace } from "./workspace";
import { endWorker, junctionWorker, throughWorker, type NodeUpdate, type PortWave, type Worker } from "./node-workers";

/** A deviation from rest of one fixed node, on the grid from its own start. */
export interface GridInput {
  fixed: number;
  /** one value a step, steps + 1 of them */
  value: Float64Array;
  /** its rate [1/s], where a capacitor or coil may feel it */
  rate: Float64Array;
}

/** Deviations from rest; index 0 is the start of the input. The arrays belong to the workspace. */
export interface GridRun {
  /** by circuit node, where recorded */
  nodes: (Float64Array | null)[];
  /** by line end, history of `pad` zeros first */
  outgoing: Float64Array[];
  incident: (Float64Array | null)[];
}

/** A wave as a cluster reads it: sample n at `samples[n + offset]`. */
interface Arriving {
  samples: Float64Array;
  offset: number;
}

/**
 * Steps the lattice through time from rest, one source moving. Waves leave an end, arrive at the other a delay later;
 * each cluster turns arrivals into node voltages, and each port sends what it has less what came: out = v − a.
 */
export function runGrid(plan: GridPlan, input: GridInput, nodeCount: number, recorded: Iterable<number>): GridRun {
  const { steps, pad, delays, block } = plan;
  const ends = 2 * delays.length;
  const outgoing: Float64Array[] = [];
  const incident: (Float64Array | null)[] = [];
  for (let end = 0; end < ends; end++) {
    outgoing.push(workspace.take(steps + 1 + pad).fill(0, 0, pad));
    incident.push(delays[end >> 1]!.taps ? workspace.take(steps + 1 + pad) : null);
  }
  const nodes: (Float64Array | null)[] = new Array<Float64Array | null>(nodeCount).fill(null);
  for (const node of recorded) nodes[node] = workspace.take(steps + 1);
  const still = workspace.take(steps + 1).fill(0, 0, steps + 1);
  const scratch = workspace.take(steps + 1);
  const arriving: Arriving[] = outgoing.map((_, end) => {
    const delayed = incident[end];
    const far = outgoing[end ^ 1]!;
    return delayed ? { samples: delayed, offset: pad } : { samples: far, offset: pad - delays[end >> 1]!.whole };
  });
  const workers = plan.clusters.map((planned) => clusterWorker(planned, input, arriving, outgoing, pad, nodes, still, scratch));
  for (let from = 0; from <= steps; from += block) {
    const to = Math.min(steps + 1, from + block);
    for (let end = 0; end < ends; end++) {
      const into = incident[end];
      const { taps, whole } = delays[end >> 1]!;
      if (into && taps) interpolate(outgoing[end ^ 1]!, into, taps, pad - whole, pad, from, to);
    }
    for (const work of workers) work(from, to);
  }
  return { nodes, outgoing, incident };
}

/** The run's series for each channel, sample 0 at the start of the input; null where nothing moves. */
export function channelSeries(channels: readonly Channel[], plan: GridPlan, run: GridRun, input: { fixed: number; value: Float64Array }): (Float64Array | null)[] {
  return channels.map((channel) => {
    if (channel.kind === "node") return run.nodes[channel.node]?.subarray(0, plan.steps + 1) ?? null;
    if (channel.kind === "fixed") return channel.fixed === input.fixed ? input.value : null;
    if (channel.kind === "outgoing") return run.outgoing[channel.end]!.subarray(plan.pad, plan.pad + plan.steps + 1);
    const delayed = run.incident[channel.end];
    if (delayed) return delayed.subarray(plan.pad, plan.pad + plan.steps + 1);
    const from = plan.pad - plan.delays[channel.end >> 1]!.whole;
    return run.outgoing[channel.end ^ 1]!.subarray(from, from + plan.steps + 1);
  });
}

function interpolate(source: Float64Array, into: Float64Array, taps: readonly [number, number, number, number], shift: number, pad: number, from: number, to: number) {
  const [c0, c1, c2, c3] = taps;
  for (let n = from; n < to; n++) {
    const i = n + shift;
    into[n + pad] = c0 * source[i - 2]! + c1 * source[i - 1]! + c2 * source[i]! + c3 * source[i + 1]!;
  }
}

function clusterWorker(planned: PlannedCluster, input: GridInput, arriving: readonly Arriving[], outgoing: readonly Float64Array[], pad: number, nodes: readonly (Float64Array | null)[], still: Float64Array, scratch: Float64Array): Worker {
  const { cluster, single, propagator } = planned;
  const feeds = cluster.feeds.filter((feed) => feed.fixed === input.fixed);
  if (single) {
    let siemens = 0;
    let farads = 0;
    for (const feed of feeds) {
      siemens += feed.siemens;
      farads += feed.farads;
    }
    const drive = siemens === 0 && farads === 0 ? still : driveOf(input, siemens, farads);
    return nodeWorker(single, cluster.ports, drive, arriving, outgoing, pad, nodes[cluster.nodes[0]!] ?? scratch);
  }
  if (propagator) return matrixWorker(planned, feeds, input, arriving, outgoing, pad, nodes);
  return heldWorker(cluster.ports, input, arriving, outgoing, pad);
}

function driveOf(input: GridInput, siemens: number, farads: number): Float64Array {
  const { length } = input.value;
  const drive = workspace.take(length);
  for (let n = 0; n < length; n++) drive[n] = siemens * input.value[n]! + farads * input.rate[n]!;
  return drive;
}

/** Ends at fixed nodes. */
function heldWorker(ports: readonly ClusterPort[], input: GridInput, arriving: readonly Arriving[], outgoing: readonly Float64Array[], pad: number): Worker {
  return (from, to) => {
    for (const port of ports) {
      const { samples, offset } = arriving[port.end]!;
      const out = outgoing[port.end]!;
      let factor = 0;
      for (const held of port.held) if (held.fixed === input.fixed) factor += held.factor;
      for (let n = from; n < to; n++) out[n + pad] = factor * input.value[n]! - samples[n + offset]!;
    }
  };
}

function nodeWorker(kept: NodeUpdate, ports: readonly ClusterPort[], drive: Float64Array, arriving: readonly Arriving[], outgoing: readonly Float64Array[], pad: number, record: Float64Array): Worker {
  const [first, second] = ports;
  const wave = (port: ClusterPort): PortWave => ({ weight: 2 * port.admittance, ...arriving[port.end]!, out: outgoing[port.end]! });
  if (first && ports.length === 1) return endWorker(kept, wave(first), drive, pad, record);
  if (first && second && ports.length === 2) return throughWorker(kept, wave(first), wave(second), drive, pad, record);
  return junctionWorker(kept, ports.map(wave), drive, pad, record);
}

function matrixWorker(
  { cluster, propagator, atOnce }: PlannedCluster,
  feeds: readonly { row: number; siemens: number; farads: number }[],
  input: GridInput,
  arriving: readonly Arriving[],
  outgoing: readonly Float64Array[],
  pad: number,
  nodes: readonly (Float64Array | null)[],
): Worker {
  const { size, ports } = cluster;
  const { p, q0, q1 } = propagator!;
  const z = new Float64Array(size);
  const carry = new Float64Array(size);
  const current = new Float64Array(size);
  const records = cluster.nodes.map((node) => nodes[node] ?? null);
  const held = ports.map((port) => port.held.reduce((sum, { fixed, factor }) => (fixed === input.fixed ? sum + factor : sum), 0));
  const isStatic = cluster.isStatic;
  return (from, to) => {
    for (let n = from; n < to; n++) {
      current.fill(0);
      for (const feed of feeds) current[feed.row] = current[feed.row]! + feed.siemens * input.value[n]! + feed.farads * input.rate[n]!;
      for (const port of ports) {
        const { samples, offset } = arriving[port.end]!;
        const inflow = 2 * port.admittance * samples[n + offset]!;
        if (port.node >= 0) current[port.node] = current[port.node]! + inflow;
        if (port.second >= 0) current[port.second] = current[port.second]! + port.sign * inflow;
      }
      const answer = n === 0 && atOnce ? atOnce : q1;
      for (let i = 0; i < size; i++) {
        let sum = carry[i]!;
        for (let j = 0; j < size; j++) sum += answer[i * size + j]! * current[j]!;
        z[i] = sum;
      }
      if (!isStatic)
        for (let i = 0; i < size; i++) {
          let sum = 0;
          for (let j = 0; j < size; j++) sum += p[i * size + j]! * z[j]! + q0[i * size + j]! * current[j]!;
          carry[i] = sum;
        }
      for (let k = 0; k < ports.length; k++) {
        const port = ports[k]!;
        let v = held[k]! * input.value[n]!;
        if (port.node >= 0) v += port.share * z[port.node]!;
        if (port.second >= 0) v += port.secondShare * z[port.second]!;
        const { samples, offset } = arriving[port.end]!;
        const out = outgoing[port.end]!;
        out[n + pad] = v - samples[n + offset]!;
      }
      for (let i = 0; i < records.length; i++) {
        const record = records[i];
        if (record) record[n] = z[i]!;
      }
    }
  };
}
