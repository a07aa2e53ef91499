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
export function drawGrid(
  terms: readonly GridTerm[],
  rest: Float64Array,
  step: number,
  until: number,
  worthy: number,
): Waveforms {
  const origin = terms.reduce((first, term) => Math.min(first, term.shift), until);
  const time = sampleTimes(terms, origin, step, until, worthy);
  const values = Array.from(rest, (level) => new Float64Array(time.length).fill(level));
  const isRegular = time.length === regularLength(origin, step, until);
  const lead = origin > 0 ? 1 : 0;
  let at: Int32Array | null = null;
  let part: Float64Array | null = null;
  for (const { response, shift, weight } of terms) {
    const offset = (shift - origin) / step;
    const whole = Math.round(offset);
    if (isRegular && Math.abs(offset - whole) < ALIGNED) {
      addAligned(values, response, weight, whole + lead);
      continue;
    }
    at ??= new Int32Array(time.length);
    part ??= new Float64Array(time.length);
    addBetween(values, response, weight, locate(time, shift, step, at, part), at, part);
  }
  return { time, values };
}

function addAligned(
  values: readonly Float64Array[],
  response: GridTerm["response"],
  weight: number,
  from: number,
) {
  for (let c = 0; c < values.length; c++) {
    const series = response[c];
    if (!series) continue;
    const value = values[c]!;
    for (let i = from; i < value.length; i++) value[i] = value[i]! + weight * series[i - from]!;
  }
}

/** Position of each sample in a response that starts at `shift`; returns the first sample that it reaches. */
function locate(time: Float64Array, shift: number, step: number, at: Int32Array, part: Float64Array): number {
  const scale = 1 / step;
  let i = time.length;
  while (i > 0) {
    const position = (time[i - 1]! - shift) * scale;
    if (position < -ALIGNED) break;
    i--;
    const whole = Math.floor(position + ALIGNED);
    at[i] = whole;
    part[i] = position - whole < 2 * ALIGNED ? 0 : position - whole;
  }
  return i;
}

function addBetween(
  values: readonly Float64Array[],
  response: GridTerm["response"],
  weight: number,
  first: number,
  at: Int32Array,
  part: Float64Array,
) {
  for (let c = 0; c < values.length; c++) {
    const series = response[c];
    if (!series) continue;
    const value = values[c]!;
    const last = series.length - 1;
    for (let i = first; i < value.length; i++) {
      const from = at[i]!;
      const low = series[from]!;
      value[i] = value[i]! + weight * (low + part[i]! * (series[from < last ? from + 1 : last]! - low));
    }
  }
}

function regularLength(origin: number, step: number, until: number): number {
  return Math.max(0, Math.ceil((until - origin) / step - 1e-9)) + 1 + (origin > 0 ? 1 : 0);
}

function sampleTimes(
  terms: readonly GridTerm[],
  origin: number,
  step: number,
  until: number,
  worthy: number,
): Float64Array {
  const regular = regularLength(origin, step, until);
  const extra: number[] = [];
  const seen: number[] = [];
  let isSorted = true;
  for (const { response, shift, weight } of terms) {
    const steps = (shift - origin) / step;
    const part = steps - Math.floor(steps);
    if (part < ALIGNED || part > 1 - ALIGNED || seen.includes(shift)) continue;
    seen.push(shift);
    const least = worthy / (Math.abs(weight) * part * (1 - part));
    const bent = bends(response, Math.floor((until - shift) / step), least);
    for (let k = 0; k < bent.length; k++) if (bent[k] === 1) extra.push(shift + k * step);
    isSorted = seen.length === 1;
  }
  if (!isSorted) extra.sort((a, b) => a - b);
  const time = new Float64Array(regular + extra.length);
  const lead = origin > 0 ? 1 : 0;
  let count = lead;
  let next = 0;
  for (let n = 0; n < regular - lead; n++) {
    const t = origin + n * step;
    for (; next < extra.length && extra[next]! < t; next++) time[count++] = extra[next]!;
    time[count++] = t;
  }
  return time.subarray(0, count);
}

/** By sample up to `most`: does a channel bend there by more than `least`? */
function bends(response: GridTerm["response"], most: number, least: number): Uint8Array {
  let length = 0;
  for (const series of response) if (series && series.length > length) length = series.length;
  const bent = new Uint8Array(Math.max(0, Math.min(length, most + 1)));
  for (const series of response) {
    if (!series) continue;
    const last = Math.min(bent.length, series.length - 1);
    let here = series[0]!;
    let before = here;
    for (let k = 0; k < last; k++) {
      const next = series[k + 1]!;
      const bend = next - here - here + before;
      // Before the first sample nothing has moved.
      if (k === 0 ? Math.abs(next - 2 * here) > least : bend > least || bend < -least) bent[k] = 1;
      before = here;
      here = next;
    }
  }
  return bent;
}
