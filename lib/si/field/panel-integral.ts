import { arctangent } from "./arctangent";
import { gaussRule } from "./gauss";
import { Mesh, along } from "./mesh";
import { INTERFACE, PLAIN } from "./segment";

/** Results of panelLogarithm, one per node of the panel. */
export const logReal = new Float64Array(8);
export const logImag = new Float64Array(8);

const sumReal = new Float64Array(9);
const sumImag = new Float64Array(9);
const COS120 = -0.5;
const SIN120 = Math.sqrt(3) / 2;

/**
 * ∫ q_j ln(z − z′) over panel k, for the density of unit charge at each of its nodes j (a polynomial in u).
 *
 *     ln(ζ − u^p) = Σ_k ln(ζ_k − u),  ζ = (z − a)/v, ζ_k the p-th roots of ζ
 *     ∫ P_m(t) ln(τ − t) dt = 2 (Q_{m+1}(τ) − Q_{m−1}(τ))/(2m + 1),  m ≥ 1  (Legendre functions of the second kind)
 *
 * Real parts are logarithms of distance [ln m]; differences of imaginary parts between two points are angles [rad], up to
 * the same multiple of 2π in every node. Accuracy 1e-10 within the panel's reach.
 *
 * @param far  true beyond the reach: the rule's own points then serve
 */
export function panelLogarithm(mesh: Mesh, k: number, x: number, y: number, far = false): void {
  const p = mesh.power[k]!;
  const n = mesh.size[k]!;
  const dx = x - mesh.ax[k]!;
  const dy = y - mesh.ay[k]!;
  const ir = mesh.inverseX[k]!;
  const ii = mesh.inverseY[k]!;
  const zr = dx * ir - dy * ii;
  const zi = dx * ii + dy * ir;
  const square = zr * zr + zi * zi;
  if (far) {
    pointValues(p, n, zr, zi, mesh.logLength[k]!);
    return;
  }
  for (let m = 0; m < n; m++) sumReal[m] = sumImag[m] = 0;
  if (p === 1) addRoot(2 * zr - 1, 2 * zi, n);
  else if (p === 2) {
    const modulus = Math.sqrt(square);
    const re = Math.sqrt(Math.max(0, (modulus + zr) / 2));
    const im =
      zi < 0 ? -Math.sqrt(Math.max(0, (modulus - zr) / 2)) : Math.sqrt(Math.max(0, (modulus - zr) / 2));
    addRoot(2 * re - 1, 2 * im, n);
    addRoot(-2 * re - 1, -2 * im, n);
  } else {
    const size = Math.cbrt(Math.sqrt(square));
    const angle = zi === 0 && zr >= 0 ? 0 : arctangent(zi, zr) / 3;
    const re = size * Math.cos(angle);
    const im = size * Math.sin(angle);
    addRoot(2 * re - 1, 2 * im, n);
    addRoot(2 * (re * COS120 - im * SIN120) - 1, 2 * (im * COS120 + re * SIN120), n);
    addRoot(2 * (re * COS120 + im * SIN120) - 1, 2 * (im * COS120 - re * SIN120), n);
  }
  const offset = mesh.logLength[k]! - p * Math.LN2;
  const { legendre } = gaussRule(n);
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

/** Far away the rule's own points serve better: the recursion would lose |2τ|^m of its digits. */
function pointValues(p: number, n: number, zr: number, zi: number, offset: number): void {
  const { t } = gaussRule(n);
  for (let j = 0; j < n; j++) {
    const re = zr - along(p, t[j]!);
    logReal[j] = offset + Math.log(re * re + zi * zi) / 2;
    // (ζ₁ − u)(ζ₂ − u) = −(ζ − u²)
    logImag[j] = p === 2 ? arctangent(-zi, -re) : arctangent(zi, re);
  }
}

/** Adds ∫ P_m(t) ln(τ − t) dt for m < n. */
function addRoot(a: number, b: number, n: number): void {
  const plus = (a + 1) * (a + 1) + b * b;
  const minus = (a - 1) * (a - 1) + b * b;
  // at an end of the panel the infinite parts of Q cancel; any finite stand-in does
  const lnPlus = Math.log(plus > 1e-60 ? plus : 1e-60) / 2;
  const lnMinus = Math.log(minus > 1e-60 ? minus : 1e-60) / 2;
  const argPlus = arctangent(b, a + 1);
  const argMinus = arctangent(b, a - 1);
  sumReal[0]! += (a + 1) * lnPlus - b * argPlus - (a - 1) * lnMinus + b * argMinus - 2;
  sumImag[0]! += (a + 1) * argPlus + b * lnPlus - (a - 1) * argMinus - b * lnMinus;
  let lowR = (lnPlus - lnMinus) / 2;
  let lowI = (argPlus - argMinus) / 2;
  let midR = a * lowR - b * lowI - 1;
  let midI = a * lowI + b * lowR;
  for (let m = 1; m < n; m++) {
    const d = m / (m + 1);
    const c = 1 + d;
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

const selfTables: (Float64Array | undefined)[] = [];
const unit = new Mesh();

/** [i·n + j] = real part at node i of a panel of length 1, for its own node j; add ln|v|. */
export function selfLogarithm(p: number, n: number): Float64Array {
  const known = selfTables[p * 16 + n];
  if (known) return known;
  const table = new Float64Array(n * n);
  const segment = {
    x1: 0,
    y1: 0,
    x2: 1,
    y2: 0,
    end1: PLAIN,
    end2: PLAIN,
    owner: INTERFACE,
    right: 1,
    left: 1,
    outward: 0,
  };
  unit.begin(0, 1);
  unit.addPanel(segment, 0, 0, 1, p, n);
  unit.close();
  for (let i = 0; i < n; i++) {
    panelLogarithm(unit, 0, unit.x[i]!, 0);
    for (let j = 0; j < n; j++) table[i * n + j] = logReal[j]!;
  }
  selfTables[p * 16 + n] = table;
  return table;
}
