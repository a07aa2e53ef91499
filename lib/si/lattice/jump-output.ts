import type { Waveforms } from "./comb-output";
import type { GridTerm } from "./grid-output";

/** A response that may jump at its samples; `response` holds the values after. */
export interface JumpTerm extends GridTerm {
  before: (Float64Array | null)[];
}

const ALIGNED = 1e-7;

/**
 * rest + Σ weight · response(t − shift) where some responses jump: every jump worth it becomes two samples at one time,
 * every other term's grid is sampled too.
 *
 * @param worthy  a smaller jump is drawn as a slope over one step [V]
 */
export function drawJumps(
  smooth: readonly GridTerm[],
  jumping: readonly JumpTerm[],
  rest: Float64Array,
  step: number,
  until: number,
  worthy: number,
): Waveforms {
  const terms = [...smooth, ...jumping];
  const moments = new Map<number, { time: number; isDouble: boolean }>();
  const add = (time: number, isDouble: boolean) => {
    const key = Math.round(time / (step * 1e-4));
    const known = moments.get(key);
    if (known) known.isDouble ||= isDouble;
    else moments.set(key, { time, isDouble });
  };
  add(0, false);
  const shifts = [...new Set(terms.map((term) => term.shift))];
  for (const shift of shifts)
    for (let n = 0; n <= Math.ceil((until - shift) / step - 1e-9); n++) add(shift + n * step, false);
  for (const { response, before, shift, weight } of jumping) {
    const length = Math.max(0, ...response.map((series) => series?.length ?? 0));
    for (let k = 0; k < length && shift + k * step <= until; k++)
      if (response.some((series, c) => series && Math.abs((series[k]! - before[c]![k]!) * weight) > worthy))
        add(shift + k * step, true);
  }
  const order = [...moments.values()].sort((a, b) => a.time - b.time);
  const time: number[] = [];
  const isBefore: boolean[] = [];
  for (const moment of order) {
    if (moment.isDouble) {
      time.push(moment.time);
      isBefore.push(true);
    }
    time.push(moment.time);
    isBefore.push(false);
  }
  const values = Array.from(rest, (level, c) =>
    Float64Array.from(time, (t, i) => {
      let sum = level;
      for (const term of smooth)
        sum +=
          term.weight *
          read(term.response[c] ?? null, term.response[c] ?? null, (t - term.shift) / step, false);
      for (const term of jumping)
        sum +=
          term.weight *
          read(term.before[c] ?? null, term.response[c] ?? null, (t - term.shift) / step, isBefore[i]!);
      return sum;
    }),
  );
  return { time: Float64Array.from(time), values };
}

/** From the value after sample k straight to the value before the next. */
function read(
  before: Float64Array | null,
  after: Float64Array | null,
  position: number,
  isBefore: boolean,
): number {
  if (!before || !after || position < -ALIGNED) return 0;
  const k = Math.floor(position + ALIGNED);
  const share = position - k;
  if (share < ALIGNED) return (isBefore ? before[k] : after[k]) ?? after[after.length - 1]!;
  const from = after[k] ?? after[after.length - 1]!;
  return from + share * ((before[k + 1] ?? from) - from);
}
