import type { SkinFilter } from "./skin-fit";

/** Takes the skin loss off the samples from … to − 1, in place; successive blocks go on from one another. */
export type SkinWorker = (samples: Float64Array, from: number, to: number) => void;

/** Blocks no longer than this are worked on at once. */
const LONGEST = 256;

export function skinWorker({ decay, gain, weight }: SkinFilter): SkinWorker {
  const count = decay.length;
  const state = new Float64Array(count);
  const rise = new Float64Array(LONGEST);
  let before = 0;
  return (samples, from, to) => {
    const length = to - from;
    let last = before;
    for (let n = 0; n < length; n++) {
      const now = samples[from + n]!;
      rise[n] = now - last;
      last = now;
    }
    before = last;
    let k = 0;
    // Two at a time, so that one recursion does not wait for itself.
    for (; k + 1 < count; k += 2) {
      const p = decay[k]!;
      const q = decay[k + 1]!;
      const c = gain[k]!;
      const d = gain[k + 1]!;
      const w = weight[k]!;
      const x = weight[k + 1]!;
      let y = state[k]!;
      let z = state[k + 1]!;
      for (let n = 0; n < length; n++) {
        const change = rise[n]!;
        y = p * y + c * change;
        z = q * z + d * change;
        samples[from + n] = samples[from + n]! - (w * y + x * z);
      }
      state[k] = y;
      state[k + 1] = z;
    }
    if (k === count) return;
    const p = decay[k]!;
    const c = gain[k]!;
    const w = weight[k]!;
    let y = state[k]!;
    for (let n = 0; n < length; n++) {
      y = p * y + c * rise[n]!;
      samples[from + n] = samples[from + n]! - w * y;
    }
    state[k] = y;
  };
}

/** The same one sample at a time, where each has a value before and after what jumps there. */
export function jumpLoss({
  decay,
  gain,
  weight,
}: SkinFilter): (wave: { before: Float64Array; after: Float64Array }, at: number) => void {
  const state = new Float64Array(decay.length);
  let last = 0;
  return ({ before, after }, at) => {
    const slope = before[at]! - last;
    const jump = after[at]! - before[at]!;
    let lost = 0;
    let lostAfter = 0;
    for (let k = 0; k < state.length; k++) {
      const y = decay[k]! * state[k]! + gain[k]! * slope;
      lost += weight[k]! * y;
      state[k] = y + jump;
      lostAfter += weight[k]! * (y + jump);
    }
    last = after[at]!;
    before[at] = before[at]! - lost;
    after[at] = after[at]! - lostAfter;
  };
}
