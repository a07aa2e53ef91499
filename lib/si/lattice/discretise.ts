import { solveInPlace } from "./linear-solve";

/** z(n+1) = P z(n) + Q0 J(n) + Q1 J(n+1), J straight between the two. Row after row. */
export interface Propagator {
  p: Float64Array;
  q0: Float64Array;
  q1: Float64Array;
}

const DOUBLINGS = 8;

/**
 * One step of E z′ + G z = J(t) with J straight within the step, exact to about 1e-9 for every mode that matters within
 * the step and stable for all faster ones; E may be singular (nodes without capacitance, coils in series).
 *
 * Radau IIA with two stages (order 3, stiffly accurate; its stages reproduce straight solutions exactly) over
 * step/2⁸, then eight doublings.
 *
 * @param step  [s], > 0
 */
export function discretise(e: Float64Array, g: Float64Array, size: number, step: number): Propagator {
  let propagator = shortStep(e, g, size, step / 2 ** DOUBLINGS);
  for (let k = 0; k < DOUBLINGS; k++) propagator = doubled(propagator, size);
  return propagator;
}

/** Propagators of step, step/2, step/4, … , `levels` of them. */
export function discretiseLevels(
  e: Float64Array,
  g: Float64Array,
  size: number,
  step: number,
  levels: number,
): Propagator[] {
  let propagator = shortStep(e, g, size, step / 2 ** (DOUBLINGS + levels - 1));
  const found: Propagator[] = [];
  for (let k = 0; k < DOUBLINGS + levels; k++) {
    if (k >= DOUBLINGS) found.unshift(propagator);
    propagator = doubled(propagator, size);
  }
  return found;
}

function doubled({ p, q0, q1 }: Propagator, size: number): Propagator {
  const next = multiply(p, q0, size);
  const last = multiply(p, q1, size);
  for (let i = 0; i < size * size; i++) {
    const half = (last[i]! + q0[i]!) / 2;
    next[i] = next[i]! + half;
    last[i] = q1[i]! + half;
  }
  return { p: multiply(p, p, size), q0: next, q1: last };
}

function shortStep(e: Float64Array, g: Float64Array, size: number, delta: number): Propagator {
  const n = 2 * size;
  const columns = 3 * size;
  const m = new Float64Array(n * n);
  const rhs = new Float64Array(n * columns);
  for (let i = 0; i < size; i++) {
    for (let j = 0; j < size; j++) {
      const mass = e[i * size + j]! / delta;
      const loss = g[i * size + j]!;
      m[i * n + j] = 1.5 * mass + loss;
      m[i * n + size + j] = 0.5 * mass;
      m[(size + i) * n + j] = -4.5 * mass;
      m[(size + i) * n + size + j] = 2.5 * mass + loss;
      rhs[i * columns + j] = 2 * mass;
      rhs[(size + i) * columns + j] = -2 * mass;
    }
    rhs[i * columns + size + i] = 2 / 3;
    rhs[i * columns + 2 * size + i] = 1 / 3;
    rhs[(size + i) * columns + 2 * size + i] = 1;
  }
  solveInPlace(m, rhs, n, columns);
  const p = new Float64Array(size * size);
  const q0 = new Float64Array(size * size);
  const q1 = new Float64Array(size * size);
  for (let i = 0; i < size; i++)
    for (let j = 0; j < size; j++) {
      const row = (size + i) * columns;
      p[i * size + j] = rhs[row + j]!;
      q0[i * size + j] = rhs[row + size + j]!;
      q1[i * size + j] = rhs[row + 2 * size + j]!;
    }
  return { p, q0, q1 };
}

/** The same for one node of total conductance g and capacitance c ≥ 0: exact. */
export function discretiseNode(c: number, g: number, step: number): { p: number; q0: number; q1: number } {
  // Nothing but capacitors: charge only adds up.
  if (g === 0) return { p: 1, q0: step / (2 * c), q1: step / (2 * c) };
  const x = (g * step) / c;
  if (!(x < 700)) return { p: 0, q0: 0, q1: 1 / g };
  const p = Math.exp(-x);
  // (1 − p)/x without cancellation where the step is short against the time constant.
  const mean = x < 1e-5 ? 1 - x / 2 : -Math.expm1(-x) / x;
  return { p, q0: (mean - p) / g, q1: (1 - mean) / g };
}

function multiply(a: Float64Array, b: Float64Array, size: number): Float64Array<ArrayBuffer> {
  const out = new Float64Array(size * size);
  for (let i = 0; i < size; i++)
    for (let k = 0; k < size; k++) {
      const factor = a[i * size + k]!;
      if (factor === 0) continue;
      for (let j = 0; j < size; j++) out[i * size + j] = out[i * size + j]! + factor * b[k * size + j]!;
    }
  return out;
}
