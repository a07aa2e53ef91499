import type { Observation } from "../rule";
import type { Anatomy } from "./anatomy";

export type BounceMechanism =
  "driver mismatch" | "end mismatch" | "impedance step" | "branch" | "capacitive load";

/** Reflections weaker than this explain nothing. */
const FAINT = 0.03;

/**
 * Which reflection on a route does the most: the driver's (times what the end returns to it), the largest step's, the
 * largest branch's, the load's. Ties go to the earlier of these.
 */
export function bounceMechanism(found: Anatomy): BounceMechanism {
  const candidates: [BounceMechanism, number][] = [
    ["driver mismatch", Math.abs(found.rhoSource * found.rhoEnd)],
    ["impedance step", Math.abs(found.step?.rho ?? 0)],
    ["branch", Math.abs(found.branch?.rho ?? 0)],
    ["capacitive load", found.load.strength],
  ];
  if (found.end) candidates.push(["end mismatch", Math.abs(found.rhoEnd)]);
  const [mechanism, strength] = candidates.reduce((most, entry) =>
    entry[1] > most[1] + 1e-9 ? entry : most,
  );
  return strength < FAINT ? "driver mismatch" : mechanism;
}

/** The steady level itself is what lies beyond the rail: at least half of the value. */
export function isStaticLevel({ edge, high, low, max, min, receiver }: Observation): boolean {
  const steady = edge === "rise" ? high - receiver.vdd : -low;
  const worst = edge === "rise" ? max - receiver.vdd : -min;
  return steady > 0 && steady >= worst / 2;
}
