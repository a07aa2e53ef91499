/** Round trips after which even a strong mismatch is taken as settled or never settling. */
const MOST_ROUND_TRIPS = 60;
/** Ringing below this share of its start is over. */
const OVER = 0.02;
/** Time constants until an exponential tail is below that too. */
const RC_TAIL = 4;

export interface WindowRequest {
  /** 0–100 % ramp of the source [s] */
  ramp: number;
  /** longest one-way delay [s], and the sum of all lines' */
  delay: number;
  allDelays: number;
  /** largest |ρ(source) ρ(end)| that keeps the ringing alive, 0 … 1 */
  roundTripGain: number;
  /** sum of R·C time constants that slow the edge [s] */
  timeConstants: number;
  /** to the next edge [s], null: no rate given */
  bitTime: number | null;
}

/**
 * How long an edge is watched [s]: to the next edge, but no longer than ringing can matter: the edge, the round trips
 * until 2 % of the ringing is left (at most 60), the RC tails.
 */
export function watchWindow({
  ramp,
  delay,
  allDelays,
  roundTripGain,
  timeConstants,
  bitTime,
}: WindowRequest): { until: number; isBit: boolean } {
  const gain = Math.min(0.999, Math.max(1e-6, roundTripGain));
  const trips = Math.min(MOST_ROUND_TRIPS, Math.log(OVER) / Math.log(gain));
  const ringing = Math.max(2 * (trips + 1) * delay, 4 * allDelays);
  const enough = ramp + ringing + RC_TAIL * timeConstants;
  if (bitTime !== null && bitTime <= enough) return { until: bitTime, isBit: true };
  return { until: enough, isBit: false };
}
