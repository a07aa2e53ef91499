import { solveInPlace } from "./linear-solve";

/** 1 − Σ weight · exp(−rate · τ) ≈ erfc(1/(2√τ)), τ in units of skin². */
interface SkinFit {
  rate: Float64Array;
  weight: Float64Array;
}

/** A line's skin loss for one step size: y ← decay · y + gain · (d − d before), out = d − Σ weight · y. */
export interface SkinFilter {
  decay: Float64Array;
  gain: Float64Array;
  weight: Float64Array;
}

/** Rates of the exponentials: from FASTEST down, closer where the answer rises, wider along its long tail. */
const FASTEST = 120;
const SLOWEST = 3e-9;
const A_DECADE_FAST = 5;
const A_DECADE_SLOW = 2;
/** Times at which the fit is held to the answer: their first, last, and how many a decade. */
const FIRST = 5e-3;
const LAST = 1e8;
const A_DECADE = 25;

let cached: SkinFit | null = null;

/**
 * The skin effect's answer to a step, erfc(1/(2√τ)), as a sum of exponentials: least squares over ten decades of time,
 * weighted towards the tail, with weights that sum to 1 so that nothing comes through at once. Off by less than 1e-4 at
 * any time; at DC exact, since every exponential dies out. Worked out once.
 */
function skinFit(): SkinFit {
  if (cached) return cached;
  const rates: number[] = [];
  for (let rate = FASTEST; rate > SLOWEST; rate /= 10 ** (1 / (rate > 1 ? A_DECADE_FAST : A_DECADE_SLOW)))
    rates.push(rate);
  const count = rates.length;
  const rows: { terms: number[]; wanted: number }[] = [];
  for (let k = 0; FIRST * 10 ** (k / A_DECADE) <= LAST; k++) {
    const tau = FIRST * 10 ** (k / A_DECADE);
    const missing = 1 - erfc(0.5 / Math.sqrt(tau));
    const worth = 1 / (missing + 0.01);
    rows.push({ terms: rates.map((rate) => worth * Math.exp(-rate * tau)), wanted: worth * missing });
  }
  rows.push({ terms: rates.map(() => 1e3), wanted: 1e3 });
  const weight = leastSquares(rows, count);
  return (cached = { rate: Float64Array.from(rates), weight });
}

/** By Householder reflections: the exponentials are too alike for the normal equations. */
function leastSquares(rows: readonly { terms: number[]; wanted: number }[], count: number): Float64Array {
  const m = rows.map(({ terms, wanted }) => Float64Array.from([...terms, wanted]));
  for (let k = 0; k < count; k++) {
    let norm = 0;
    for (let i = k; i < m.length; i++) norm += m[i]![k]! ** 2;
    norm = m[k]![k]! > 0 ? -Math.sqrt(norm) : Math.sqrt(norm);
    const v = Float64Array.from(m, (row, i) => (i < k ? 0 : row[k]!));
    v[k] = v[k]! - norm;
    let length = 0;
    for (let i = k; i < v.length; i++) length += v[i]! ** 2;
    for (let j = k; j <= count; j++) {
      let dot = 0;
      for (let i = k; i < v.length; i++) dot += v[i]! * m[i]![j]!;
      const share = (2 * dot) / length;
      for (let i = k; i < v.length; i++) m[i]![j] = m[i]![j]! - share * v[i]!;
    }
  }
  const upper = new Float64Array(count * count);
  const right = new Float64Array(count);
  for (let i = 0; i < count; i++) {
    for (let j = i; j < count; j++) upper[i * count + j] = m[i]![j]!;
    right[i] = m[i]![count]!;
  }
  solveInPlace(upper, right, count, 1);
  return right;
}

/** Slower than this within the window, an exponential stands still; faster than this within a step, it is over. */
const STILL = 1e-3;
const OVER = 40;

/**
 * Recursive convolution with exp(−skin · √s), exact for waves straight within a step but for the fit.
 *
 * @param skin   [√s], > 0
 * @param step   [s]
 * @param until  [s]
 */
export function skinFilter(skin: number, step: number, until: number): SkinFilter {
  const { rate, weight } = skinFit();
  const scale = skin * skin;
  const decay: number[] = [];
  const gain: number[] = [];
  const share: number[] = [];
  let still = 0;
  let stillRate = 0;
  let over = 0;
  const add = (r: number, w: number) => {
    const x = (r * step) / scale;
    decay.push(Math.exp(-x));
    gain.push(x < 1e-8 ? 1 : -Math.expm1(-x) / x);
    share.push(w);
  };
  for (let k = 0; k < rate.length; k++) {
    const r = rate[k]!;
    const w = weight[k]!;
    if ((r * until) / scale < STILL) {
      still += w;
      stillRate += w * r;
    } else if ((r * step) / scale > OVER) over += (w * scale) / (r * step);
    else add(r, w);
  }
  if (still !== 0) add(stillRate / still, still);
  if (over !== 0) {
    decay.push(0);
    gain.push(1);
    share.push(over);
  }
  return {
    decay: Float64Array.from(decay),
    gain: Float64Array.from(gain),
    weight: Float64Array.from(share),
  };
}

const TWO_OVER_ROOT_PI = 2 / Math.sqrt(Math.PI);

/** 1 − erf(z) for z ≥ 0, to about 1e-14: the series below 2, the continued fraction beyond. */
export function erfc(z: number): number {
  if (z > 26) return 0;
  const square = z * z;
  if (z < 2) {
    let term = z;
    let sum = z;
    for (let n = 1; term > 1e-17 * sum; n++) {
      term *= (2 * square) / (2 * n + 1);
      sum += term;
    }
    return 1 - TWO_OVER_ROOT_PI * Math.exp(-square) * sum;
  }
  let fraction = 0;
  for (let k = 60; k > 0; k--) fraction = k / 2 / (z + fraction);
  return (TWO_OVER_ROOT_PI / 2) * (Math.exp(-square) / (z + fraction));
}

/** ∫ erfc(skin/(2√t′)) dt′ from 0 to t: the answer to a ramp of 1/s [s]. */
export function skinRamp(skin: number, t: number): number {
  if (t <= 0) return 0;
  const z = skin / (2 * Math.sqrt(t));
  return (t + (skin * skin) / 2) * erfc(z) - skin * Math.sqrt(t / Math.PI) * Math.exp(-z * z);
}
