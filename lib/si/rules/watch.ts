import { simulate } from "../lattice/simulate";
import type { PathNetwork } from "../path/network";
import type { Corner } from "./types";

/** The estimate of how long ringing lasts is doubled this often before a path counts as never settling. */
const MOST_DOUBLINGS = 4;
/** Outside this share of the swing it is not settled (rule `settling`). */
const BAND = 0.1;

export interface Watched {
  time: Float64Array;
  voltage: Record<string, Float64Array>;
  until: number;
  windowIsBit: boolean;
  ramp: number;
  runs: number;
}

/**
 * One corner's waves, watched until every receiver has kept within 10 % of its level for a round trip, or the next
 * edge comes. The first window is an estimate; a wave still moving at its end is watched for twice as long.
 */
export function watch(prepared: PathNetwork, corner: Corner, bitTime: number | null): Watched {
  const { network, until: estimate, windowIsBit: estimateIsBit, ramp } = prepared.at(corner);
  let until = estimate;
  let windowIsBit = estimateIsBit;
  for (let runs = 1; ; runs++) {
    const { time, voltage } = simulate(network, { until });
    if (windowIsBit || runs > MOST_DOUBLINGS || isQuiet(prepared, corner, time, voltage, until))
      return { time, voltage, until, windowIsBit, ramp, runs };
    until *= 2;
    windowIsBit = bitTime !== null && until >= bitTime;
    if (bitTime !== null && windowIsBit) until = bitTime;
  }
}

function isQuiet(
  prepared: PathNetwork,
  { driver }: Corner,
  time: Float64Array,
  voltage: Record<string, Float64Array>,
  until: number,
): boolean {
  const from = until - 2 * prepared.delay;
  for (const probe of prepared.probes) {
    const wave = voltage[probe.pin.pin];
    if (!wave) continue;
    const { low, high } = probe.levels[driver];
    const level = high - probe.offset;
    const band = BAND * (high - low);
    for (let i = wave.length - 1; i >= 0 && (time[i] ?? 0) >= from; i--)
      if (Math.abs((wave[i] ?? level) - level) > band) return false;
  }
  return true;
}
