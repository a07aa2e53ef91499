import { gaussRule, type Rule } from "./gauss";
import type { Panel } from "./panels";

/** Results of panelLogarithm, one per node of the panel. */
export const logReal = new Float64Array(8);
export const logImag = new Float64Array(8);

const sumReal = new Float64Array(9);
const sumImag = new Float64Array(9);
const COS120 = -0.5;
const SIN120 = Math.sqrt(3) / 2;

/**
 * ∫ q_j ln(z − z′) over a panel, for the density of unit charge at each of its nodes j (a polynomial in u).
 *
 *     ln(ζ − u^p) = Σ_k ln(ζ_k − u),  ζ = (z − a)/v, ζ_k the p-th roots of ζ
 *     ∫ P_m(t) ln(τ − t) dt = 2 (Q_{m+1}(τ) − Q_{m−1}(τ))/(2m + 1),  m ≥ 1  (Legendre functions of the second kind)
 *
 * Real parts are logarithms of distance [ln m]; differences of imaginary parts between two points are angles [rad], up to
 * the same multiple of 2π in every node. Accuracy 1e-11 for |τ| < 6, where the forward recursion for Q_m still is stable.
 */
export function panelLogarithm(panel: Panel, rule: Rule, x: number, y: number): void {
  const { vx, vy, p, n } = panel;
  const square = vx * vx + vy * vy;
  const dx = x - panel.ax;
  const dy = y - panel.ay;
  const zr = (dx * vx + dy * vy) / square;
  const zi = (dy * vx - dx * vy) / square;
  for (let m = 0; m < n; m++) sumReal[m] = sumImag[m] = 0;
  if (p === 1) addRoot(2 * zr - 1, 2 * zi, n);
  else {
    const modulus = Math.sqrt(zr * zr + zi * zi);
    if (p === 2) {
      let re = Math.sqrt(Math.max(0, (modulus + zr) / 2));
      let im = Math.sqrt(Math.max(0, (modulus - zr) / 2));
      if (zi < 0) im = -im;
      if (zi === 0 && zr < 0) re = 0;
      addRoot(2 * re - 1, 2 * im, n);
      addRoot(-2 * re - 1, -2 * im, n);
    } else {
      const size = Math.cbrt(modulus);
      const angle = zi === 0 && zr >= 0 ? 0 : Math.atan2(zi, zr) / 3;
      const re = size * Math.cos(angle);
      const im = size * Math.sin(angle);
      addRoot(2 * re - 1, 2 * im, n);
      addRoot(2 * (re * COS120 - im * SIN120) - 1, 2 * (im * COS120 + re * SIN120), n);
      addRoot(2 * (re * COS120 + im * SIN120) - 1, 2 * (im * COS120 - re * SIN120), n);
    }
  }
  const offset = Math.log(square) / 2 - p * Math.LN2;
  const { legendre } = rule;
  for (let j = 0; j < n; j++) {
    let re = offset;
    let im = 0;
    for (let m = 0; m < n; m++) {
      const c = legendre[j * n + m]!;
      re += c * sumReal[m]!;
      im += c * sumImag[m]!;
    }
    logReal[j] = re;
    logImag[j] = im;
  }
}

/** Adds ∫ P_m(t) ln(τ − t) dt for m < n. */
function addRoot(a: number, b: number, n: number): void {
  const plus = (a + 1) * (a + 1) + b * b;
  const minus = (a - 1) * (a - 1) + b * b;
  // at an end of the panel the infinite parts of Q cancel; any finite stand-in does
  const lnPlus = Math.log(plus > 1e-60 ? plus : 1e-60) / 2;
  const lnMinus = Math.log(minus > 1e-60 ? minus : 1e-60) / 2;
  const argPlus = Math.atan2(b, a + 1);
  const argMinus = Math.atan2(b, a - 1);
  sumReal[0]! += (a + 1) * lnPlus - b * argPlus - (a - 1) * lnMinus + b * argMinus - 2;
  sumImag[0]! += (a + 1) * argPlus + b * lnPlus - (a - 1) * argMinus - b * lnMinus;
  let lowR = (lnPlus - lnMinus) / 2;
  let lowI = (argPlus - argMinus) / 2;
  let midR = a * lowR - b * lowI - 1;
  let midI = a * lowI + b * lowR;
  for (let m = 1; m < n; m++) {
    const c = (2 * m + 1) / (m + 1);
    const d = m / (m + 1);
    const highR = c * (a * midR - b * midI) - d * lowR;
    const highI = c * (a * midI + b * midR) - d * lowI;
    const scale = 2 / (2 * m + 1);
    sumReal[m]! += scale * (highR - lowR);
    sumImag[m]! += scale * (highI - lowI);
    lowR = midR;
    lowI = midI;
    midR = highR;
    midI = highI;
  }
}

const selfTables = new Map<number, Float64Array>();

/** [i·n + j] = real part at node i of a panel of length 1, for its own node j; add ln|v|. */
export function selfLogarithm(p: 1 | 2 | 3, n: number): Float64Array {
  const key = p * 16 + n;
  let table = selfTables.get(key);
  if (!table) {
    table = new Float64Array(n * n);
    const rule = gaussRule(n);
    const panel: Panel = { ax: 0, ay: 0, vx: 1, vy: 0, p, n, owner: 0, right: 1, left: 1, segment: 0 };
    for (let i = 0; i < n; i++) {
      const u = (1 + rule.t[i]!) / 2;
      panelLogarithm(panel, rule, p === 1 ? u : p === 2 ? u * u : u * u * u, 0);
      for (let j = 0; j < n; j++) table[i * n + j] = logReal[j]!;
    }
    selfTables.set(key, table);
  }
  return table;
}
