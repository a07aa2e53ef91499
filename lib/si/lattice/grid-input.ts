import type { Cluster, ClusterPort } from "./clusters";
import { workspace } from "./workspace";

/** A deviation from rest of one fixed node, on the grid from its own start. */
export interface GridInput {
  fixed: number;
  /** one value a step, steps + 1 of them */
  value: Float64Array;
  /** its rate [1/s], where a capacitor or coil may feel it */
  rate: Float64Array;
}

/** A wave as a cluster reads it: sample n at `samples[n + offset]`. */
export interface Arriving {
  samples: Float64Array;
  offset: number;
}

/** Current that the inputs force into a row of the cluster at each step; null where there is none. */
export function driveOf({ feeds }: Cluster, row: number, inputs: readonly GridInput[]): Float64Array | null {
  let drive: Float64Array | null = null;
  for (const feed of feeds) {
    if (feed.row !== row) continue;
    for (const { fixed, value, rate } of inputs) {
      if (fixed !== feed.fixed) continue;
      drive ??= workspace.take(value.length).fill(0, 0, value.length);
      for (let n = 0; n < value.length; n++)
        drive[n] = drive[n]! + feed.siemens * value[n]! + feed.farads * rate[n]!;
    }
  }
  return drive;
}

/** What the inputs put into a port's voltage where it is held by fixed nodes. */
export function heldOf({ held }: ClusterPort, inputs: readonly GridInput[]): Float64Array | null {
  let volts: Float64Array | null = null;
  for (const { fixed, factor } of held)
    for (const input of inputs) {
      if (input.fixed !== fixed) continue;
      volts ??= workspace.take(input.value.length).fill(0, 0, input.value.length);
      for (let n = 0; n < input.value.length; n++) volts[n] = volts[n]! + factor * input.value[n]!;
    }
  return volts;
}
