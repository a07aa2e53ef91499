import type { Waveforms } from "./comb-output";

/** A response on the grid from its own start, and where and how much of it is added. */
export interface GridTerm {
  /** by channel; sample 0 at `shift`; null: never moves */
  response: (Float64Array | null)[];
  /** [s] */
  shift: number;
  weight: number;
}

/** Offsets below this share of a step count as on the grid. */
const ALIGNED = 1e-7;

/**
 * rest + Σ weight · response(t − shift), on the grid that starts at the first term. Where another term's corners fall
 * between samples and matter, they become samples too.
 *
 * @param worthy  a corner that a straight line would miss by more than this gets its sample [V]
 */
export function drawGrid(terms: readonly GridTerm[], rest: Float64Array, step: number, until: number, worthy: number): Waveforms {
  const origin = terms.reduce((first, term) => Math.min(first, term.shift), until);
  const time = sampleTimes(terms, origin, step, until, worthy);
  const values = Array.from(rest, (level) => new Float64Array(time.length).fill(level));
  const at = new Int32Array(time.length);
  const part = new Float64Array(time.length);
  for (const { response, shift, weight } of terms) {
    let first = time.length;
    let isAligned = true;
    for (let i = time.length - 1; i >= 0; i--) {
      const position = (time[i]! - shift) / step;
      if (position < -ALIGNED) break;
      const near = Math.round(position);
      const whole = Math.abs(position - near) < ALIGNED ? near : Math.floor(position);
      at[i] = whole;
      part[i] = position - whole;
      if (Math.abs(position - whole) < ALIGNED) part[i] = 0;
      else isAligned = false;
      first = i;
    }
    response.forEach((series, c) => {
      if (!series) return;
      const value = values[c]!;
      if (isAligned) for (let i = first; i < value.length; i++) value[i] = value[i]! + weight * series[at[i]!]!;
      else
        for (let i = first; i < value.length; i++) {
          const from = at[i]!;
          const low = series[from]!;
          const share = part[i]!;
          value[i] = value[i]! + weight * (share === 0 ? low : low + share * (series[from + 1]! - low));
        }
    });
  }
  return { time, values };
}

function sampleTimes(terms: readonly GridTerm[], origin: number, step: number, until: number, worthy: number): Float64Array {
  const regular = Math.max(0, Math.ceil((until - origin) / step - 1e-9));
  const extra: number[] = [];
  const seen: number[] = [];
  for (const { response, shift, weight } of terms) {
    const steps = (shift - origin) / step;
    const part = steps - Math.floor(steps);
    if (part < ALIGNED || part > 1 - ALIGNED) continue;
    if (seen.some((other) => other === shift)) continue;
    seen.push(shift);
    const least = worthy / (Math.abs(weight) * part * (1 - part));
    const length = Math.max(0, ...response.map((series) => series?.length ?? 0));
    const last = Math.min(length - 1, Math.floor((until - shift) / step));
    for (let k = 0; k <= last; k++) {
      if (response.some((series) => series !== null && Math.abs((series[k + 1] ?? series[k]!) - 2 * series[k]! + (k > 0 ? series[k - 1]! : 0)) > least)) extra.push(shift + k * step);
    }
  }
  extra.sort((a, b) => a - b);
  const time = new Float64Array(regular + 1 + extra.length + (origin > 0 ? 1 : 0));
  let count = 0;
  let next = 0;
  if (origin > 0) time[count++] = 0;
  for (let n = 0; n <= regular; n++) {
    const t = origin + n * step;
    for (; next < extra.length && extra[next]! < t; next++) time[count++] = extra[next]!;
    time[count++] = t;
  }
  return time.subarray(0, count);
}
