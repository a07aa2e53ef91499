import { meet } from "./crossings";

/** Most half periods that are averaged. */
const HALVES = 6;

/**
 * Frequency of the ringing about a level: the state starts below it; a crossing is the last meeting before the waveform
 * passes +band, then −band, alternately. f = 1/(2 · mean of up to six intervals) [Hz]; null below three crossings.
 *
 * @param since  only what is later counts [s]
 */
export function ringFrequency(
  t: Float64Array,
  v: Float64Array,
  since: number,
  level: number,
  band: number,
): number | null {
  const crossings: number[] = [];
  let isAbove = false;
  let met: number | null = null;
  for (let i = 0; i + 1 < v.length && crossings.length <= HALVES; i++) {
    if (t[i + 1]! < since) continue;
    const a = v[i]! - level;
    const b = v[i + 1]! - level;
    if (isAbove ? a >= 0 && b < 0 : a <= 0 && b > 0) met = meet(t, v, i, level);
    if (isAbove ? b < -band : b > band) {
      crossings.push(Math.max(met ?? since, since));
      isAbove = !isAbove;
      met = null;
    }
  }
  if (crossings.length < 3) return null;
  const last = crossings.length - 1;
  return last / (2 * (crossings[last]! - crossings[0]!));
}
