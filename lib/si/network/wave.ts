import type { Pwl, Sine } from "./types";

/** A corner of a straight-line wave: what changes there. */
export interface Corner {
  /** [s] */
  time: number;
  /** [V] */
  jump: number;
  /** change of slope [V/s] */
  slope: number;
}

/** The wave's value at t [s]; at a jump, the value after. */
export function waveValue(wave: Pwl | Sine, t: number): number {
  if (wave.kind === "sine") {
    const since = Math.max(0, t - wave.start);
    return wave.offset + wave.amplitude * Math.sin(2 * Math.PI * wave.frequency * since + wave.phase);
  }
  const { time, value } = wave;
  const last = time.length - 1;
  if (t < (time[0] ?? 0)) return value[0] ?? 0;
  if (t >= (time[last] ?? 0)) return value[last] ?? 0;
  let i = 0;
  while (i < last && (time[i + 1] ?? 0) <= t) i++;
  const t0 = time[i] ?? 0;
  const t1 = time[i + 1] ?? 0;
  const v0 = value[i] ?? 0;
  return v0 + (((value[i + 1] ?? 0) - v0) * (t - t0)) / (t1 - t0);
}

/** What the source stood at before t = 0. */
export function restValue(wave: Pwl | Sine): number {
  return wave.kind === "sine" ? waveValue(wave, 0) : (wave.value[0] ?? 0);
}

/** Corners of a straight-line wave in order of time; those that change nothing are left out. */
export function corners(wave: Pwl): Corner[] {
  const { time, value } = wave;
  const found: Corner[] = [];
  let before = 0;
  let i = 0;
  while (i < time.length) {
    const t = time[i] ?? 0;
    let j = i;
    while (j + 1 < time.length && time[j + 1] === t) j++;
    const next = j + 1;
    const after = next < time.length ? ((value[next] ?? 0) - (value[j] ?? 0)) / ((time[next] ?? 0) - t) : 0;
    const jump = (value[j] ?? 0) - (value[i] ?? 0);
    if (jump !== 0 || after !== before) found.push({ time: t, jump, slope: after - before });
    before = after;
    i = next;
  }
  return found;
}
