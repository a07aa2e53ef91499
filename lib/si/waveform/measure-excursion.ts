import { DomainError } from "../errors";
import { areaAbove, longestAbove } from "./crossings";

export interface Excursion {
  /** greatest voltage beyond each rail, ≥ 0 [V] */
  above: number;
  below: number;
  /** [V·s] */
  aboveArea: number;
  belowArea: number;
  /** longest contiguous time beyond [s] */
  aboveTime: number;
  belowTime: number;
}

/**
 * What a waveform does beyond its rails over the whole record; areas as in the JEDEC overshoot figures (from memory).
 *
 * @param time   [s], never decreasing; a repeated time is a jump
 * @param rails  [V], low < high
 * @throws DomainError where the record is empty or the rails are the wrong way round
 */
export function measureExcursion(
  time: Float64Array,
  voltage: Float64Array,
  rails: { high: number; low: number },
): Excursion {
  if (time.length === 0 || time.length !== voltage.length)
    throw new DomainError("A waveform needs as many voltages as times, at least one.", "voltage");
  if (!(rails.low < rails.high)) throw new DomainError("The upper rail must be above the lower.", "rails");
  let highest = -Infinity;
  let lowest = Infinity;
  for (const v of voltage) {
    if (v > highest) highest = v;
    if (v < lowest) lowest = v;
  }
  const result: Excursion = {
    above: Math.max(0, highest - rails.high),
    below: Math.max(0, rails.low - lowest),
    aboveArea: 0,
    belowArea: 0,
    aboveTime: 0,
    belowTime: 0,
  };
  if (result.above > 0) {
    result.aboveArea = areaAbove(time, voltage, rails.high);
    result.aboveTime = longestAbove(time, voltage, rails.high);
  }
  if (result.below > 0) {
    const mirrored = voltage.map((v) => -v);
    result.belowArea = areaAbove(time, mirrored, -rails.low);
    result.belowTime = longestAbove(time, mirrored, -rails.low);
  }
  return result;
}
