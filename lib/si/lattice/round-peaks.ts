import type { Waveforms } from "./comb-output";

/** Peaks that rise above their samples by less than this share of the swing are left as they are. */
const WORTH = 1e-6;

/**
 * Adds a sample at the top of every round peak and the bottom of every round valley: the vertex of the parabola through
 * the highest sample and its neighbours, where the curvature around it says that it is round and no corner.
 */
export function markRoundPeaks(waveforms: Waveforms, swing: number): Waveforms {
  const { time, values } = waveforms;
  const extra = new Map<number, number>();
  for (const v of values) findPeaks(time, v, swing, extra);
  if (extra.size === 0) return waveforms;
  const order = [...extra]
    .map(([i, offset]) => ({
      from: offset < 0 ? i - 1 : i,
      i,
      offset,
      at: time[i]! + offset * (time[i + 1]! - time[i]!),
    }))
    .sort((a, b) => a.at - b.at);
  return {
    time: woven(time, order, (k) => order[k]!.at),
    values: values.map((v) =>
      woven(v, order, (k) =>
        isRoundAt(v, order[k]!.i)
          ? parabola(v, order[k]!.i, order[k]!.offset)
          : straight(v, order[k]!.i, order[k]!.offset),
      ),
    ),
  };
}

function findPeaks(time: Float64Array, v: Float64Array, swing: number, extra: Map<number, number>) {
  for (let i = 2; i < v.length - 2; i++) {
    const rise = v[i]! - v[i - 1]!;
    const next = v[i + 1]! - v[i]!;
    if (rise * next > 0 || rise === next || !isRound(v, i) || !isEven(time, i)) continue;
    const curvature = next - rise;
    const offset = -(rise + next) / (2 * curvature);
    if (Math.abs(offset) > 0.02 && Math.abs(curvature * offset * offset) > 2 * WORTH * swing)
      extra.set(i, offset);
  }
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

function isRoundAt(v: Float64Array, i: number): boolean {
  return v[i + 1] !== v[i] && isRound(v, i);
}

function parabola(v: Float64Array, i: number, x: number): number {
  const a = v[i - 1]!;
  const b = v[i]!;
  const c = v[i + 1]!;
  return b + (x * (c - a)) / 2 + (x * x * (c - 2 * b + a)) / 2;
}

function straight(v: Float64Array, i: number, x: number): number {
  return x < 0 ? v[i]! + x * (v[i]! - v[i - 1]!) : v[i]! + x * (v[i + 1]! - v[i]!);
}

/** The array with one value more behind each `from`. */
function woven(
  array: Float64Array,
  order: readonly { from: number }[],
  value: (k: number) => number,
): Float64Array {
  const out = new Float64Array(array.length + order.length);
  let start = 0;
  order.forEach(({ from }, k) => {
    out.set(array.subarray(start, from + 1), start + k);
    out[from + 1 + k] = value(k);
    start = from + 1;
  });
  out.set(array.subarray(start), start + order.length);
  return out;
}
