import type { GridPlan, PlannedCluster } from "./grid-plan";
import type { Channel } from "./channels";
import type { ClusterPort } from "./clusters";
import { skinWorker, type SkinWorker } from "./skin-worker";
import { driveOf, heldOf, type Arriving, type GridInput } from "./grid-input";
import { curvedEnd, curvedJunction, curvedThrough, type CurvedUpdate } from "./curved-workers";
import { matrixWorker } from "./matrix-worker";
import type { TableContext } from "./table-worker";
import { workspace } from "./workspace";
import {
  endWorker,
  junctionWorker,
  throughWorker,
  type NodeUpdate,
  type PortWave,
  type Worker,
} from "./node-workers";

/** Deviations from rest; index 0 is the start of the input. The arrays belong to the workspace. */
export interface GridRun {
  /** by circuit node, where recorded */
  nodes: (Float64Array | null)[];
  /** by line end, history of `pad` zeros first */
  outgoing: Float64Array[];
  incident: (Float64Array | null)[];
}

/**
 * Steps the lattice through time from rest. Waves leave an end, arrive at the other a delay later;
 * each cluster turns arrivals into node voltages, and each port sends what it has less what came: out = v − a.
 */
export function runGrid(
  plan: GridPlan,
  inputs: readonly GridInput[],
  nodeCount: number,
  recorded: Iterable<number>,
  tables?: TableContext,
): GridRun {
  const { steps, pad, delays, skins, block, ahead } = plan;
  const ends = 2 * delays.length;
  const outgoing: Float64Array[] = [];
  const incident: (Float64Array | null)[] = [];
  for (let end = 0; end < ends; end++) {
    outgoing.push(workspace.take(steps + 1 + pad).fill(0, 0, pad));
    incident.push(delays[end >> 1]!.taps || skins[end >> 1] ? workspace.take(steps + 1 + ahead + pad) : null);
  }
  const nodes: (Float64Array | null)[] = new Array<Float64Array | null>(nodeCount).fill(null);
  for (const node of recorded) nodes[node] = workspace.take(steps + 1);
  const scratch = workspace.take(steps + 1);
  const arriving: Arriving[] = outgoing.map((_, end) => {
    const delayed = incident[end];
    const far = outgoing[end ^ 1]!;
    return delayed
      ? { samples: delayed, offset: pad }
      : { samples: far, offset: pad - delays[end >> 1]!.whole };
  });
  const losses: (SkinWorker | null)[] = outgoing.map((_, end) => {
    const filter = skins[end >> 1];
    return filter ? skinWorker(filter) : null;
  });
  const workers = plan.clusters.map((planned) =>
    clusterWorker(planned, inputs, arriving, outgoing, pad, nodes, scratch, tables),
  );
  for (let from = 0; from <= steps; from += block) {
    const to = Math.min(steps + 1, from + block);
    // Arrivals that are looked at ahead are there a step earlier.
    const first = from === 0 ? 0 : from + ahead;
    for (let end = 0; end < ends; end++) {
      const into = incident[end];
      const { taps, whole } = delays[end >> 1]!;
      if (!into) continue;
      const far = outgoing[end ^ 1]!;
      if (taps) interpolate(far, into, taps, pad - whole, pad, first, to + ahead);
      else for (let n = first + pad; n < to + ahead + pad; n++) into[n] = far[n - whole]!;
      losses[end]?.(into, first + pad, to + ahead + pad);
    }
    for (const work of workers) work(from, to);
  }
  return { nodes, outgoing, incident };
}

/** The run's series for each channel, sample 0 at the start of the input; null where nothing moves. */
export function channelSeries(
  channels: readonly Channel[],
  plan: GridPlan,
  run: GridRun,
  inputs: readonly GridInput[],
): (Float64Array | null)[] {
  return channels.map((channel) => {
    if (channel.kind === "node") return run.nodes[channel.node]?.subarray(0, plan.steps + 1) ?? null;
    if (channel.kind === "fixed") return inputs.find((input) => input.fixed === channel.fixed)?.value ?? null;
    if (channel.kind === "outgoing")
      return run.outgoing[channel.end]!.subarray(plan.pad, plan.pad + plan.steps + 1);
    const delayed = run.incident[channel.end];
    if (delayed) return delayed.subarray(plan.pad, plan.pad + plan.steps + 1);
    const from = plan.pad - plan.delays[channel.end >> 1]!.whole;
    return run.outgoing[channel.end ^ 1]!.subarray(from, from + plan.steps + 1);
  });
}

function interpolate(
  source: Float64Array,
  into: Float64Array,
  taps: readonly [number, number, number, number],
  shift: number,
  pad: number,
  from: number,
  to: number,
) {
  const [c0, c1, c2, c3] = taps;
  for (let n = from; n < to; n++) {
    const i = n + shift;
    into[n + pad] = c0 * source[i - 2]! + c1 * source[i - 1]! + c2 * source[i]! + c3 * source[i + 1]!;
  }
}

function clusterWorker(
  planned: PlannedCluster,
  inputs: readonly GridInput[],
  arriving: readonly Arriving[],
  outgoing: readonly Float64Array[],
  pad: number,
  nodes: readonly (Float64Array | null)[],
  scratch: Float64Array,
  tables: TableContext | undefined,
): Worker {
  const { cluster, single, curved, propagator } = planned;
  const recorded = nodes[cluster.nodes[0]!] ?? scratch;
  if (single && curved)
    return curvedWorker(
      curved,
      cluster.ports,
      ownOf(single, driveOf(cluster, 0, inputs)),
      arriving,
      outgoing,
      pad,
      recorded,
    );
  if (single)
    return nodeWorker(single, cluster.ports, driveOf(cluster, 0, inputs), arriving, outgoing, pad, recorded);
  if (propagator) return matrixWorker(planned, inputs, arriving, outgoing, pad, nodes, tables);
  return heldWorker(cluster.ports, inputs, arriving, outgoing, pad);
}

/** Ends at fixed nodes. */
function heldWorker(
  ports: readonly ClusterPort[],
  inputs: readonly GridInput[],
  arriving: readonly Arriving[],
  outgoing: readonly Float64Array[],
  pad: number,
): Worker {
  const held = ports.map((port) => heldOf(port, inputs));
  return (from, to) => {
    for (let k = 0; k < ports.length; k++) {
      const { end } = ports[k]!;
      const { samples, offset } = arriving[end]!;
      const out = outgoing[end]!;
      const volts = held[k];
      if (volts) for (let n = from; n < to; n++) out[n + pad] = volts[n]! - samples[n + offset]!;
      else for (let n = from; n < to; n++) out[n + pad] = -samples[n + offset]!;
    }
  };
}

/** What the node's own sources do to it, straight between samples as their corners lie on them; from rest. */
function ownOf({ q0, q1 }: NodeUpdate, drive: Float64Array | null): Float64Array | null {
  if (!drive) return null;
  let before = drive[0]!;
  drive[0] = 0;
  for (let n = 1; n < drive.length; n++) {
    const now = drive[n]!;
    drive[n] = q0 * before + q1 * now;
    before = now;
  }
  return drive;
}

function curvedWorker(
  kept: CurvedUpdate,
  ports: readonly ClusterPort[],
  own: Float64Array | null,
  arriving: readonly Arriving[],
  outgoing: readonly Float64Array[],
  pad: number,
  record: Float64Array,
): Worker {
  const [first, second] = ports;
  const wave = (port: ClusterPort): PortWave => portWave(port, arriving, outgoing);
  if (first && ports.length === 1) return curvedEnd(kept, wave(first), own, pad, record);
  if (first && second && ports.length === 2 && !own)
    return curvedThrough(kept, wave(first), wave(second), pad, record);
  return curvedJunction(kept, ports.map(wave), own, pad, record);
}

function portWave(
  port: ClusterPort,
  arriving: readonly Arriving[],
  outgoing: readonly Float64Array[],
): PortWave {
  return { weight: 2 * port.admittance, ...arriving[port.end]!, out: outgoing[port.end]! };
}

function nodeWorker(
  kept: NodeUpdate,
  ports: readonly ClusterPort[],
  drive: Float64Array | null,
  arriving: readonly Arriving[],
  outgoing: readonly Float64Array[],
  pad: number,
  record: Float64Array,
): Worker {
  const [first, second] = ports;
  const wave = (port: ClusterPort): PortWave => portWave(port, arriving, outgoing);
  if (first && ports.length === 1) return endWorker(kept, wave(first), drive, pad, record);
  if (first && second && ports.length === 2 && !drive)
    return throughWorker(kept, wave(first), wave(second), pad, record);
  return junctionWorker(kept, ports.map(wave), drive, pad, record);
}
