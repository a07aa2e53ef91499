import { DomainError } from "../errors";
import type { Pwl } from "../network/types";
import { checkWaveform, sampled, type Waveform } from "./waveform";

/** Feedback taps of the maximal sequences x⁷ + x⁶ + 1, x⁹ + x⁵ + 1, x¹⁵ + x¹⁴ + 1 (ITU-T O.150). */
const TAPS = { 7: 6, 9: 5, 15: 14 } as const;

/** A pseudo-random sequence of 2^order − 1 bits: every run of `order` bits but all zeros, once. */
export function pseudoRandomBits(order: keyof typeof TAPS): Uint8Array {
  const bits = new Uint8Array(2 ** order - 1);
  let register = 2 ** order - 1;
  for (let n = 0; n < bits.length; n++) {
    const next = ((register >> (order - 1)) ^ (register >> (TAPS[order] - 1))) & 1;
    bits[n] = (register >> (order - 1)) & 1;
    register = ((register << 1) | next) & (2 ** order - 1);
  }
  return bits;
}

/**
 * Bits as a source wave: each edge starts with its bit.
 *
 * @param options.rise   length of an edge [s], < bitTime
 * @param options.start  of the first bit [s], default 0; before it the first bit's level
 */
export function bitWave(
  bits: ArrayLike<number>,
  bitTime: number,
  options: { low: number; high: number; rise: number; start?: number },
): Pwl {
  const { low, high, rise, start = 0 } = options;
  checkBits(bits, bitTime);
  if (!(rise >= 0 && rise < bitTime)) throw new DomainError("An edge must be shorter than the bit.", "rise");
  const level = (k: number) => (bits[k]! ? high : low);
  const time = [start];
  const value = [level(0)];
  for (let k = 1; k < bits.length; k++) {
    if (level(k) === level(k - 1)) continue;
    time.push(start + k * bitTime, start + k * bitTime + rise);
    value.push(level(k - 1), level(k));
  }
  return { kind: "pwl", time, value };
}

/**
 * What a linear path makes of bits that repeat without end, by superposition of its answer to a single bit.
 *
 * @param pulse  answer to one bit; its first value is the level of a lasting zero
 * @param options.samples  a bit, default 64
 * @returns one period, on a grid of bitTime/samples
 */
export function patternResponse(
  pulse: Waveform,
  bits: ArrayLike<number>,
  bitTime: number,
  options: { samples?: number } = {},
): Waveform {
  const { samples = 64 } = options;
  checkWaveform(pulse, "pulse");
  checkBits(bits, bitTime);
  const step = bitTime / samples;
  const rest = pulse.voltage[0]!;
  const p = sampled(pulse, pulse.time[0]!, step);
  const period = bits.length * samples;
  // What of the pulse falls on the same place of the period acts as one.
  const folded = new Float64Array(period);
  for (let n = 0; n < p.length; n++) folded[n % period] = folded[n % period]! + p[n]! - rest;
  const voltage = new Float64Array(period + 1).fill(rest);
  for (let k = 0; k < bits.length; k++) {
    if (!bits[k]) continue;
    const from = k * samples;
    for (let n = 0; n < period; n++) {
      const at = from + n < period ? from + n : from + n - period;
      voltage[at] = voltage[at]! + folded[n]!;
    }
  }
  voltage[period] = voltage[0]!;
  return { time: Float64Array.from({ length: period + 1 }, (_, n) => n * step), voltage };
}

function checkBits(bits: ArrayLike<number>, bitTime: number): void {
  if (bits.length === 0) throw new DomainError("A pattern needs at least one bit.", "bits");
  if (!(bitTime > 0) || !Number.isFinite(bitTime))
    throw new DomainError("A pattern needs a bit time above zero.", "bitTime");
}
