import type { PortWave, Worker } from "./node-workers";

/**
 * The inner loops for nodes with capacitance, arrivals followed by the cubic through four samples:
 * v(n) = p v(n−1) + c0 J(n−2) + c1 J(n−1) + c2 J(n) + c3 J(n+1) + own(n).
 *
 * A straight line between samples loses the area between chord and curve at every node that a wave passes, and the loss
 * adds up; the cubic does not. Its spectrum sinc⁴(f)·(1 + (2πf)²/6) is nowhere negative, so that a node reflects no more
 * than the true one would at some frequency: nothing grows. A source's own corners lie on samples and stay straight.
 */
export interface CurvedUpdate {
  p: number;
  c0: number;
  c1: number;
  c2: number;
  c3: number;
}

/** Nodes and weights of Gauss-Legendre quadrature on 0 … 1, eight points. */
const HALF = [0.1834346424956498, 0.525532409916329, 0.7966664774136267, 0.9602898564975363];
const WEIGHT = [0.362683783378362, 0.3137066458778873, 0.2223810344533745, 0.1012285362903763];
/** Steps of more time constants than this follow their current at once; straight lines do. */
const LONGEST = 12;

/**
 * Weights (step/c) ∫ L(s) exp(−x(1 − s)) ds of the four Lagrange polynomials on −1, 0, 1, 2; x = step · g/c.
 *
 * @returns null where the step is too long for it
 */
export function curvedUpdate(c: number, g: number, step: number): CurvedUpdate | null {
  const x = (g * step) / c;
  if (!(x < LONGEST)) return null;
  const sums = [0, 0, 0, 0];
  for (let k = 0; k < 8; k++) {
    const s = (1 + (k < 4 ? HALF[k]! : -HALF[k - 4]!)) / 2;
    const weight = ((WEIGHT[k % 4]! / 2) * Math.exp(-x * (1 - s)) * step) / c;
    sums[0] = sums[0]! - (weight * s * (s - 1) * (s - 2)) / 6;
    sums[1] = sums[1]! + (weight * (s + 1) * (s - 1) * (s - 2)) / 2;
    sums[2] = sums[2]! - (weight * (s + 1) * s * (s - 2)) / 2;
    sums[3] = sums[3]! + (weight * (s + 1) * s * (s - 1)) / 6;
  }
  return { p: Math.exp(-x), c0: sums[0]!, c1: sums[1]!, c2: sums[2]!, c3: sums[3]! };
}

/** A node at which one line ends. */
export function curvedEnd(
  { p, c0, c1, c2, c3 }: CurvedUpdate,
  { weight, samples, offset, out }: PortWave,
  own: Float64Array | null,
  pad: number,
  record: Float64Array,
): Worker {
  const state = new Float64Array(4);
  const w0 = c0 * weight;
  const w1 = c1 * weight;
  const w2 = c2 * weight;
  const w3 = c3 * weight;
  return (from, to) => {
    let volts = state[0]!;
    let before2 = state[1]!;
    let before = state[2]!;
    let now = state[3]!;
    for (let n = from; n < to; n++) {
      const next = samples[n + 1 + offset]!;
      volts = p * volts + (w0 * before2 + w1 * before + w2 * now + w3 * next);
      if (own) volts += own[n]!;
      record[n] = volts;
      out[n + pad] = volts - now;
      before2 = before;
      before = now;
      now = next;
    }
    state[0] = volts;
    state[1] = before2;
    state[2] = before;
    state[3] = now;
  };
}

/** A node between two lines that no source moves. */
export function curvedThrough(
  { p, c0, c1, c2, c3 }: CurvedUpdate,
  first: PortWave,
  second: PortWave,
  pad: number,
  record: Float64Array,
): Worker {
  const { weight: weightA, samples: samplesA, offset: offsetA, out: outA } = first;
  const { weight: weightB, samples: samplesB, offset: offsetB, out: outB } = second;
  const state = new Float64Array(6);
  return (from, to) => {
    let volts = state[0]!;
    let before2 = state[1]!;
    let before = state[2]!;
    let now = state[3]!;
    let nowA = state[4]!;
    let nowB = state[5]!;
    for (let n = from; n < to; n++) {
      const nextA = samplesA[n + 1 + offsetA]!;
      const nextB = samplesB[n + 1 + offsetB]!;
      const next = weightA * nextA + weightB * nextB;
      volts = p * volts + (c0 * before2 + c1 * before + c2 * now + c3 * next);
      record[n] = volts;
      outA[n + pad] = volts - nowA;
      outB[n + pad] = volts - nowB;
      before2 = before;
      before = now;
      now = next;
      nowA = nextA;
      nowB = nextB;
    }
    state[0] = volts;
    state[1] = before2;
    state[2] = before;
    state[3] = now;
    state[4] = nowA;
    state[5] = nowB;
  };
}

/** A node with three lines and more, or two and a source. */
export function curvedJunction(
  { p, c0, c1, c2, c3 }: CurvedUpdate,
  ports: readonly PortWave[],
  own: Float64Array | null,
  pad: number,
  record: Float64Array,
): Worker {
  const state = new Float64Array(4);
  return (from, to) => {
    record.fill(0, from, to);
    for (const { weight, samples, offset } of ports)
      for (let n = from; n < to; n++) record[n] = record[n]! + weight * samples[n + 1 + offset]!;
    let volts = state[0]!;
    let before2 = state[1]!;
    let before = state[2]!;
    let now = state[3]!;
    for (let n = from; n < to; n++) {
      const next = record[n]!;
      volts = p * volts + (c0 * before2 + c1 * before + c2 * now + c3 * next);
      if (own) volts += own[n]!;
      record[n] = volts;
      before2 = before;
      before = now;
      now = next;
    }
    state[0] = volts;
    state[1] = before2;
    state[2] = before;
    state[3] = now;
    for (const { samples, offset, out } of ports)
      for (let n = from; n < to; n++) out[n + pad] = record[n]! - samples[n + offset]!;
  };
}
