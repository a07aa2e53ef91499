import type { Waveforms } from "./comb-output";
import { workspace } from "./workspace";

/** Peaks that rise above their samples by less than this share of the swing are left as they are. */
const WORTH = 1e-6;

/** Where samples are added: by sample, how far from it the peak is [steps]; 0: nothing. */
interface Marks {
  offset: Float64Array;
  count: number;
}

/**
 * Adds a sample at the top of every round peak and the bottom of every round valley: the vertex of the parabola through
 * the highest sample and its neighbours, where the curvature around it says that it is round and no corner.
 */
export function markRoundPeaks(waveforms: Waveforms, swing: number): Waveforms {
  const { time, values } = waveforms;
  const marks = findAll(values, time.length, swing, time);
  if (marks.count === 0) return waveforms;
  const out = new Float64Array(time.length + marks.count);
  weaveTime(time, marks, out);
  return {
    time: out,
    values: values.map((v) => {
      const woven = new Float64Array(time.length + marks.count);
      weave(v, time.length, marks, 0, woven, 0);
      return woven;
    }),
  };
}

/**
 * The record of one run on an even grid, with the same peaks: rest + series, from `origin` on and at 0.
 *
 * @param series  by channel, `count` values each; null: never moves
 */
export function drawEven(
  series: readonly (Float64Array | null)[],
  rest: Float64Array,
  { origin, step, count, swing }: { origin: number; step: number; count: number; swing: number },
): Waveforms {
  const marks = findAll(series, count, swing, null);
  const lead = origin > 0 ? 1 : 0;
  const length = lead + count + marks.count;
  const time = new Float64Array(length);
  let at = lead;
  for (let n = 0; n < count; n++) {
    const offset = marks.offset[n]!;
    const t = origin + n * step;
    if (offset < 0) time[at++] = t + offset * step;
    time[at++] = t;
    if (offset > 0) time[at++] = t + offset * step;
  }
  const values = series.map((v, c) => {
    const out = new Float64Array(length);
    if (v) {
      out[0] = rest[c]!;
      weave(v, count, marks, rest[c]!, out, lead);
    } else out.fill(rest[c]!);
    return out;
  });
  return { time, values };
}

function findAll(
  values: readonly (Float64Array | null)[],
  count: number,
  swing: number,
  time: Float64Array | null,
): Marks {
  const offset = workspace.take(count).fill(0, 0, count);
  const marks = { offset, count: 0 };
  for (const v of values) if (v) findPeaks(v, count, 2 * WORTH * swing, time, marks);
  return marks;
}

function findPeaks(
  v: Float64Array,
  count: number,
  least: number,
  time: Float64Array | null,
  marks: Marks,
): void {
  let here = v[1]!;
  let rise = here - v[0]!;
  for (let i = 1; i < count - 2; i++) {
    const after = v[i + 1]!;
    const next = after - here;
    if (rise * next <= 0 && rise !== next && i >= 2) mark(v, i, rise, next, least, time, marks);
    here = after;
    rise = next;
  }
}

function mark(
  v: Float64Array,
  i: number,
  rise: number,
  next: number,
  least: number,
  time: Float64Array | null,
  marks: Marks,
): void {
  const curvature = next - rise;
  const offset = -(rise + next) / (2 * curvature);
  if (!(Math.abs(offset) > 0.02) || !(Math.abs(curvature * offset * offset) > least)) return;
  if (!isRound(v, i) || (time && !isEven(time, i))) return;
  if (marks.offset[i] === 0) marks.count++;
  marks.offset[i] = offset;
}

function isEven(time: Float64Array, i: number): boolean {
  const step = time[i + 1]! - time[i]!;
  const slack = 1e-6 * step;
  for (let k = i - 2; k < i + 2; k++) if (Math.abs(time[k + 1]! - time[k]! - step) > slack) return false;
  return step > 0;
}

/** Curvature at a sample and beside it of one sign and alike. */
function isRound(v: Float64Array, i: number): boolean {
  const here = v[i + 1]! - 2 * v[i]! + v[i - 1]!;
  const before = v[i]! - 2 * v[i - 1]! + v[i - 2]!;
  const after = v[i + 2]! - 2 * v[i + 1]! + v[i]!;
  return before / here > 0.5 && before / here < 2 && after / here > 0.5 && after / here < 2;
}

/** Copies `count` values, raised by `rest`, to `out` from `at` on, and what belongs at the marks between them. */
function weave(
  v: Float64Array,
  count: number,
  { offset: offsets }: Marks,
  rest: number,
  out: Float64Array,
  at: number,
): void {
  for (let i = 0; i < count; i++) {
    const offset = offsets[i]!;
    const here = v[i]! + rest;
    if (offset === 0) out[at++] = here;
    else if (offset < 0) {
      out[at++] = valueBeside(v, i, offset) + rest;
      out[at++] = here;
    } else {
      out[at++] = here;
      out[at++] = valueBeside(v, i, offset) + rest;
    }
  }
}

function weaveTime(time: Float64Array, { offset: offsets }: Marks, out: Float64Array): void {
  let at = 0;
  for (let i = 0; i < time.length; i++) {
    const offset = offsets[i]!;
    const beside = offset === 0 ? 0 : time[i]! + offset * (time[i + 1]! - time[i]!);
    if (offset < 0) out[at++] = beside;
    out[at++] = time[i]!;
    if (offset > 0) out[at++] = beside;
  }
}

/** On the parabola where this channel is round there too, else straight between its samples. */
function valueBeside(v: Float64Array, i: number, x: number): number {
  const a = v[i - 1]!;
  const b = v[i]!;
  const c = v[i + 1]!;
  if (c !== b && isRound(v, i)) return b + (x * (c - a)) / 2 + (x * x * (c - 2 * b + a)) / 2;
  return x < 0 ? b + x * (b - a) : b + x * (c - b);
}
