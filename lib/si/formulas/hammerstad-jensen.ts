import { ETA0 } from "../physical-constants";
import {
  requireNotNegative,
  requirePermittivity,
  requirePositive,
  type FormulaNote,
  type SingleLineResult,
} from "./formula";

const PAPER =
  'E. Hammerstad, O. Jensen, "Accurate models for microstrip computer-aided design", IEEE MTT-S Digest, 1980, p. 407';

export const hammerstadJensenZeroThicknessNote: FormulaNote = {
  id: "hammerstad-jensen-1980-zero-thickness",
  title: "Hammerstad–Jensen 1980, copper without thickness",
  range: "width 0.01 to 100 heights, Dk 1 to 128, no copper thickness",
  source: PAPER,
};

export const hammerstadJensenThicknessNote: FormulaNote = {
  id: "hammerstad-jensen-1980-thickness",
  title: "Hammerstad–Jensen 1980 with copper thickness",
  range:
    "width 0.01 to 100 heights, Dk 1 to 128; copper up to half the width and half the height (our limit, the paper states none)",
  source: PAPER,
};

/**
 * Impedance of a zero-thickness microstrip in air.
 *
 *     Z01(u) = η0/2π · ln( f(u)/u + √(1 + (2/u)²) ),   f(u) = 6 + (2π − 6) exp(−(30.666/u)^0.7528)
 *
 * @param u  width ÷ height [1], > 0
 * @returns Z01 [Ω]; stated 0.01 % for u ≤ 1, 0.03 % for u ≤ 1000
 */
export function airMicrostripImpedance(u: number): number {
  requirePositive(u, "width", "width over height");
  const f = 6 + (2 * Math.PI - 6) * Math.exp(-Math.pow(30.666 / u, 0.7528));
  return (ETA0 / (2 * Math.PI)) * Math.log(f / u + Math.sqrt(1 + 4 / (u * u)));
}

/**
 * Static effective permittivity of a zero-thickness microstrip.
 *
 *     εe = (εr + 1)/2 + (εr − 1)/2 · (1 + 10/u)^(−a(u) b(εr))
 *
 * @param u   width ÷ height [1], > 0
 * @param er  relative permittivity of the laminate [1], ≥ 1
 * @returns εe [1], between (εr + 1)/2 and εr; stated 0.2 % for 0.01 ≤ u ≤ 100, εr ≤ 128
 */
export function microstripEffectivePermittivity(u: number, er: number): number {
  requirePositive(u, "width", "width over height");
  requirePermittivity(er);
  return (er + 1) / 2 + ((er - 1) / 2) * Math.pow(1 + 10 / u, -fillingExponent(u, er));
}

/** The exponent a(u) b(εr), shared with the coupled forms of Kirschning and Jansen. */
export function fillingExponent(u: number, er: number): number {
  const u4 = u ** 4;
  const a = 1 + Math.log((u4 + (u / 52) ** 2) / (u4 + 0.432)) / 49 + Math.log(1 + (u / 18.1) ** 3) / 18.7;
  const b = 0.564 * Math.pow((er - 0.9) / (er + 3), 0.053);
  return a * b;
}

/**
 * Microstrip without copper thickness.
 * @param width   strip width [m], > 0
 * @param height  laminate height [m], > 0
 * @param er      relative permittivity [1], ≥ 1
 * @throws DomainError for other inputs
 * @see the paper, eq. 1–8
 */
export function hammerstadJensenZeroThickness(width: number, height: number, er: number): SingleLineResult {
  requirePositive(width, "width", "width");
  requirePositive(height, "height", "height");
  const u = width / height;
  const effectivePermittivity = microstripEffectivePermittivity(u, er);
  return {
    impedance: airMicrostripImpedance(u) / Math.sqrt(effectivePermittivity),
    effectivePermittivity,
    inRange: u >= 0.01 && u <= 100 && er <= 128,
  };
}

/**
 * How much wider a thick strip acts, ÷ height.
 *
 *     Δu1 = T/π · ln(1 + 4e / (T coth² √(6.517 u))),  T = t/h        (in air)
 *     Δur = Δu1/2 · (1 + sech √(εr − 1))                              (on the laminate)
 *
 * @returns Δu1 and Δur [1], 0 for no thickness
 */
export function thicknessWidening(u: number, t: number, er: number): { air: number; laminate: number } {
  if (t === 0) return { air: 0, laminate: 0 };
  const coth = 1 / Math.tanh(Math.sqrt(6.517 * u));
  const air = (t / Math.PI) * Math.log(1 + (4 * Math.E) / (t * coth * coth));
  return { air, laminate: (air / 2) * (1 + 1 / Math.cosh(Math.sqrt(er - 1))) };
}

/**
 * Microstrip with copper thickness.
 *
 *     Z0 = Z01(ur)/√εe(ur),   εeff = εe(ur) (Z01(u1)/Z01(ur))²,   u1 = u + Δu1, ur = u + Δur
 *
 * @param width      strip width [m], > 0; of a trapezoid the mean of foot and crown
 * @param height     laminate height [m], > 0
 * @param thickness  copper thickness [m], ≥ 0
 * @param er         relative permittivity [1], ≥ 1
 * @returns Z0 [Ω] and εeff; typically 1 % (worst seen 5 %) of a field solution for thick narrow traces
 * @throws DomainError for other inputs
 * @see the paper, eq. 9–12
 */
export function hammerstadJensenThickness(
  width: number,
  height: number,
  thickness: number,
  er: number,
): SingleLineResult {
  requirePositive(width, "width", "width");
  requirePositive(height, "height", "height");
  requireNotNegative(thickness, "thickness", "copper thickness");
  requirePermittivity(er);
  const u = width / height;
  const widening = thicknessWidening(u, thickness / height, er);
  const air = airMicrostripImpedance(u + widening.air);
  const laminate = airMicrostripImpedance(u + widening.laminate);
  const atRest = microstripEffectivePermittivity(u + widening.laminate, er);
  return {
    impedance: laminate / Math.sqrt(atRest),
    effectivePermittivity: atRest * (air / laminate) ** 2,
    inRange: u >= 0.01 && u <= 100 && er <= 128 && thickness <= width / 2 && thickness <= height / 2,
  };
}
