import type { Circuit } from "./circuit";
import type { Cluster } from "./clusters";
import { curvedUpdate, type CurvedUpdate } from "./curved-workers";
import { skinFilter, type SkinFilter } from "./skin-fit";
import { discretise, discretiseNode, type Propagator } from "./discretise";

/** A line's delay in steps: whole ones, and the weights of four neighbours where it is not a whole number. */
export interface StepDelay {
  whole: number;
  /** weights of samples n − whole − 2 … n − whole + 1 */
  taps: readonly [number, number, number, number] | null;
}

/** A circuit prepared for one step size; used for as many runs as there are sources. */
export interface GridPlan {
  step: number;
  steps: number;
  /** zeros before t = 0 in every wave's history */
  pad: number;
  delays: StepDelay[];
  /** by line; null: lossless */
  skins: (SkinFilter | null)[];
  /** how many steps before they are needed arrivals are looked at: 1 where some node follows their curve */
  ahead: 0 | 1;
  /** steps that can be done for one cluster before the others must follow */
  block: number;
  clusters: PlannedCluster[];
}

export interface PlannedCluster {
  cluster: Cluster;
  /** one node without coils: three numbers instead of matrices */
  single: { p: number; q0: number; q1: number } | null;
  /** the same, following the curve of arrivals; null: straight lines are as good */
  curved: CurvedUpdate | null;
  propagator: Propagator | null;
  /** what a current that is there from t = 0 does at once, before any charge has moved */
  atOnce: Float64Array | null;
}

/** A step so short that nothing charges in it. */
const AT_ONCE = 1e-9;

/** A delay this close to whole steps counts as whole [steps]. */
export const WHOLE = 1e-7;

/**
 * @param delayOf  each line's delay in steps as the step search settled it
 */
export function planGrid(
  circuit: Circuit,
  clusters: readonly Cluster[],
  step: number,
  until: number,
  delaysInSteps: readonly number[],
): GridPlan {
  const delays = delaysInSteps.map(stepDelay);
  let block = 256;
  let pad = 4;
  for (const { whole, taps } of delays) {
    block = Math.min(block, taps ? whole - 1 : whole);
    pad = Math.max(pad, whole + 4);
  }
  const planned = clusters.map((cluster) => planCluster(cluster, step));
  const ahead = block > 1 && planned.some(({ curved }) => curved) ? 1 : 0;
  if (ahead === 0) for (const one of planned) one.curved = null;
  const steps = Math.max(1, Math.ceil(until / step - 1e-9));
  return {
    step,
    steps,
    pad,
    delays,
    skins: circuit.lines.map(({ skin }) => (skin > 0 ? skinFilter(skin, step, until) : null)),
    ahead,
    block: block - ahead,
    clusters: planned,
  };
}

function stepDelay(steps: number): StepDelay {
  const near = Math.round(steps);
  if (Math.abs(steps - near) <= WHOLE * Math.max(1, near * 1e-3)) return { whole: near, taps: null };
  const whole = Math.floor(steps);
  const x = steps - whole;
  // Cubic Lagrange weights for the value x steps before sample n − whole, on offsets −2, −1, 0, +1.
  const taps = [
    (x * (x * x - 1)) / 6,
    (x * (1 + x) * (2 - x)) / 2,
    ((1 + x) * (1 - x) * (2 - x)) / 2,
    (-x * (1 - x) * (2 - x)) / 6,
  ] as const;
  return { whole, taps };
}

function planCluster(cluster: Cluster, step: number): PlannedCluster {
  const { size, e, g } = cluster;
  const idle = cluster.ports.length + cluster.feeds.length + cluster.tables.length === 0;
  if (size === 0 || idle) return { cluster, single: null, curved: null, propagator: null, atOnce: null };
  const plain =
    cluster.tables.length === 0 &&
    cluster.nodes.length === 1 &&
    size === 1 &&
    cluster.ports.every((port) => port.share === 1);
  if (plain)
    return {
      cluster,
      single: discretiseNode(e[0]!, g[0]!, step),
      curved: e[0]! > 0 && cluster.ports.length > 0 ? curvedUpdate(e[0]!, g[0]!, step) : null,
      propagator: null,
      atOnce: null,
    };
  const felt = cluster.feeds.some((feed) => feed.farads > 0);
  return {
    cluster,
    single: null,
    curved: null,
    propagator: discretise(e, g, size, step),
    atOnce: felt ? discretise(e, g, size, step * AT_ONCE).q1 : null,
  };
}
