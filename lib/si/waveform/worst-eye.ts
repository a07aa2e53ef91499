import { DomainError } from "../errors";
import { ascendingReader, checkWaveform, sampled, type Waveform } from "./waveform";

export interface WorstEye {
  /** between the lowest "one" and the highest "zero" that any bits can make, at the best instant [V]; negative: closed */
  height: number;
  /** of the span around that instant in which the eye is open [s]; 0: closed */
  width: number;
  /** the best instant, on the pulse's own time axis [s] */
  at: number;
  /** the bit's own part there [V] */
  cursor: number;
  /** what all other bits can add and take away there, ≥ 0 and ≤ 0 [V] */
  added: number;
  taken: number;
  /** lowest "one" and highest "zero" [V] */
  lowestOne: number;
  highestZero: number;
  /** bits up to the one that is looked at (the last, a one) that make the lowest "one" */
  worstBits: number[];
  /** height at each instant of the record's grid, whatever the best is [V] */
  heights: Float64Array;
  /** step of that grid [s] */
  step: number;
  /** what is left of the pulse at the record's end [V]: trust the eye only where this is small against its height */
  residual: number;
}

/**
 * Worst eye of a linear path over all bit sequences, by peak distortion of its answer p(t) to a single bit:
 * H(t) = p(t) − Σ |p(t + k · bitTime)|, k ≠ 0. At an instant t every other bit adds its own p(t + k · bitTime) or not; the
 * worst sequence takes every negative one with a "one" and every positive one with a "zero". The cursor, the instant at
 * which a receiver is taken to look, is the t with the greatest H on a grid of bitTime/`samples`: the best that any
 * fixed sampling instant can do. The width is the span around it with H > 0, straight between grid points.
 *
 * Rise and fall must be equal (one linear source); for one that is not, take the worse of both pulses.
 *
 * @param pulse    answer to one bit, from rest [V]; its first value is the level of a lasting zero
 * @param bitTime  [s], > 0
 * @param options.samples  grid points a bit, default 64
 * @throws DomainError where the record is shorter than a bit or the pulse is nothing
 * @see peak distortion analysis: Casper, Haycock, Mooney 2002 (from memory)
 */
export function worstEye(pulse: Waveform, bitTime: number, options: { samples?: number } = {}): WorstEye {
  const { samples = 64 } = options;
  checkWaveform(pulse, "pulseResponse");
  if (!(bitTime > 0) || !Number.isFinite(bitTime))
    throw new DomainError("An eye needs a bit time above zero.", "bitTime");
  if (!Number.isInteger(samples) || samples < 2)
    throw new DomainError("An eye needs at least two samples a bit.", "samples");
  const start = pulse.time[0]!;
  const step = bitTime / samples;
  if (!(pulse.time[pulse.time.length - 1]! - start >= bitTime))
    throw new DomainError("The answer to a single bit must be longer than the bit.", "pulseResponse");
  const rest = pulse.voltage[0]!;
  const p = sampled(pulse, start, step);
  let far = 0;
  for (let n = 0; n < p.length; n++) {
    p[n] = p[n]! - rest;
    if (Math.abs(p[n]!) > Math.abs(far)) far = p[n]!;
  }
  if (far === 0) throw new DomainError("The answer to a single bit never moves.", "pulseResponse");
  // A path that inverts is looked at upside down.
  const sign = Math.sign(far);
  for (let n = 0; n < p.length; n++) p[n] = sign * p[n]!;

  const sums = new Float64Array(samples);
  for (let n = 0; n < p.length; n++) sums[n % samples] = sums[n % samples]! + Math.abs(p[n]!);
  const heights = p.map((value, n) => value - (sums[n % samples]! - Math.abs(value)));
  let best = 0;
  for (let n = 1; n < heights.length; n++) if (heights[n]! > heights[best]!) best = n;
  let added = 0;
  let taken = 0;
  for (let n = best % samples; n < p.length; n += samples) {
    if (n === best) continue;
    if (p[n]! > 0) added += p[n]!;
    else taken += p[n]!;
  }
  const cursor = p[best]!;
  return {
    height: heights[best]!,
    width: heights[best]! > 0 ? openSpan(heights, best) * step : 0,
    at: start + best * step,
    cursor,
    added,
    taken,
    lowestOne: rest + sign * (cursor + taken),
    highestZero: rest + sign * added,
    worstBits: worstBits(p, best, samples),
    heights,
    step,
    residual: Math.abs(p[p.length - 1]!),
  };
}

/** Grid steps around `at` with heights above 0, straight between points. */
function openSpan(heights: Float64Array, at: number): number {
  let low = at;
  while (low > 0 && heights[low - 1]! > 0) low--;
  let high = at;
  while (high < heights.length - 1 && heights[high + 1]! > 0) high++;
  const before = low > 0 ? heights[low]! / (heights[low]! - heights[low - 1]!) : 0;
  const after = high < heights.length - 1 ? heights[high]! / (heights[high]! - heights[high + 1]!) : 0;
  return high - low + before + after;
}

/** Earlier bits reach the cursor by what comes after it in the pulse; a later one by what comes before. */
function worstBits(p: Float64Array, best: number, samples: number): number[] {
  const bits: number[] = [];
  for (let n = best + samples; n < p.length; n += samples) bits.unshift(p[n]! < 0 ? 1 : 0);
  const first = bits.indexOf(1);
  return [...(first < 0 ? [] : bits.slice(first)), 1];
}

/** What a bit does, from what its two edges do: s(t) − s(t − bitTime) + the level before. */
export function pulseResponse(step: Waveform, bitTime: number): Waveform {
  checkWaveform(step, "step");
  if (!(bitTime > 0)) throw new DomainError("A pulse needs a bit time above zero.", "bitTime");
  const end = step.time[step.time.length - 1]!;
  const all = [...step.time];
  for (const t of step.time) if (t + bitTime <= end) all.push(t + bitTime);
  const moments = Float64Array.from(all).sort();
  const rest = step.voltage[0]!;
  const readers = (["before", "after"] as const).map((side) => {
    const own = ascendingReader(step, side);
    const late = ascendingReader(step, side);
    return (t: number) => own(t) - late(t - bitTime) + rest;
  });
  const time: number[] = [];
  const voltage: number[] = [];
  moments.forEach((t, i) => {
    if (i > 0 && t === moments[i - 1]) return;
    const [before, after] = readers.map((read) => read(t));
    if (before !== after && i > 0) {
      time.push(t);
      voltage.push(before!);
    }
    time.push(t);
    voltage.push(after!);
  });
  return { time: Float64Array.from(time), voltage: Float64Array.from(voltage) };
}
