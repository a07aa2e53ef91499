import type { BounceRay } from "./bounce-rays";
import type { LineRow } from "./line-row";

/** What a finding says about the harm at a receiver. */
export interface Harm {
  /** when it is worst [s] */
  time: number;
  /** which way the voltage is pushed: 1 up, −1 down, 0 either */
  sense: 1 | -1 | 0;
  /** 0–100 % time of the source: an arrival acts that long [s] */
  ramp: number;
}

const HAIR = 1e-15;

/** Which way a rule's harm pushes: beyond the new level, or back from it. */
export function harmSense(rule: string, edge: "rise" | "fall"): Harm["sense"] {
  const on = edge === "rise" ? 1 : -1;
  if (rule === "above-rail") return 1;
  if (rule === "below-rail") return -1;
  if (rule === "overshoot" || rule === "flight-time") return on;
  if (rule === "ringback") return on === 1 ? -1 : 1;
  return 0;
}

/**
 * The wave whose arrival at the row's far end does the harm: the strongest of its sense among those still arriving at
 * the time; failing that, the strongest that arrived before.
 *
 * @returns the ray's id, or null where none arrives
 */
export function harmfulRay(row: LineRow, rays: readonly BounceRay[], harm: Harm): string | null {
  const last = row.sections.length - 1;
  const delay = row.sections[last]?.delay ?? 0;
  const arrivals = rays
    .filter((ray) => ray.section === last && ray.outward && ray.amplitude !== 0)
    .map((ray) => ({ ray, at: ray.start + delay }))
    .filter(
      ({ at, ray }) =>
        at <= harm.time + HAIR && (harm.sense === 0 || Math.sign(ray.amplitude) === harm.sense),
    );
  const acting = arrivals.filter(({ at }) => at > harm.time - harm.ramp * 1.5 - HAIR);
  const strongest = (acting.length > 0 ? acting : arrivals).reduce<(typeof arrivals)[number] | null>(
    (most, entry) => (Math.abs(entry.ray.amplitude) > Math.abs(most?.ray.amplitude ?? 0) ? entry : most),
    null,
  );
  return strongest ? alongLongest(row, rays, strongest.ray).id : null;
}

/** The same wave where it can be seen: in the longest section that it came through. */
function alongLongest(row: LineRow, rays: readonly BounceRay[], arriving: BounceRay): BounceRay {
  let best = arriving;
  let ray = arriving;
  for (let section = arriving.section - 1; section >= 0; section--) {
    const delay = row.sections[section]?.delay ?? 0;
    const from = rays
      .filter((entry) => entry.section === section && entry.outward)
      .filter((entry) => Math.abs(entry.start + delay - ray.start) < 1e-6 * delay + HAIR)
      .filter((entry) => Math.sign(entry.amplitude) === Math.sign(ray.amplitude))
      .reduce<BounceRay | null>(
        (most, entry) => (Math.abs(entry.amplitude) > Math.abs(most?.amplitude ?? 0) ? entry : most),
        null,
      );
    if (!from) break;
    ray = from;
    if (delay > (row.sections[best.section]?.delay ?? 0)) best = from;
  }
  return best;
}
