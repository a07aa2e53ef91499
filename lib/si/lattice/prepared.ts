import { corners, type Corner } from "../network/wave";
import type { Channel } from "./channels";
import type { Circuit } from "./circuit";
import type { Cluster } from "./clusters";
import type { Accuracy } from "./step-size";

/** What both ways of computing start from. */
export interface Prepared {
  circuit: Circuit;
  clusters: Cluster[];
  /** what sets the step: `clusters`, or those there were before short lines were lumped */
  measured: Cluster[];
  channels: Channel[];
  rest: Float64Array;
  until: number;
  accuracy: Accuracy;
  step: number | undefined;
}

export interface MovingSource {
  fixed: number;
  /** null for a sine */
  corners: Corner[] | null;
}

/** Sources that move, and their corners. */
export function movingSources(circuit: Circuit): MovingSource[] {
  const moving: MovingSource[] = [];
  circuit.fixed.forEach(({ wave }, fixed) => {
    if (wave?.kind === "sine" && wave.amplitude !== 0) moving.push({ fixed, corners: null });
    if (wave?.kind !== "pwl") return;
    const found = corners(wave);
    if (found.length > 0) moving.push({ fixed, corners: found });
  });
  return moving;
}
