import { DomainError } from "../errors";
import { hammerstadJensenZeroThickness, type FormulaNote } from "../formulas";
import { requirePositive } from "../formulas/formula";
import { LIGHT_SPEED } from "../physical-constants";

/** A line's values at a frequency. */
export interface DispersedLine {
  /** Z0(f) [Ω], by power and current */
  impedance: number;
  /** εe(f) [1] */
  effectivePermittivity: number;
  inRange: boolean;
}

export const kirschningJansenDispersionNote: FormulaNote = {
  id: "kirschning-jansen-1982-microstrip-dispersion",
  title: "Kirschning–Jansen 1982, dispersion",
  range: "width 0.1 to 100 heights, Dk 1 to 20, height up to 0.13 wavelengths in air; stated 0.6 %",
  source:
    'M. Kirschning, R. H. Jansen, "Accurate model for effective dielectric constant of microstrip with validity up to millimetre-wave frequencies", Electron. Lett. 18, 1982, p. 272; impedance: R. H. Jansen, M. Kirschning, AEÜ 37, 1983, p. 108',
};

/** f h in GHz·mm, the frequency of these papers. */
export function normalisedFrequency(frequency: number, height: number): number {
  return frequency * height * 1e-6;
}

/**
 * Dispersion of a zero-thickness microstrip over its static values by Hammerstad and Jensen.
 *
 *     εe(f) = εr − (εr − εe(0))/(1 + P(f)),   Z0(f) = Z0(0) (R13/R14)^R17
 *
 * @param width, height  [m], > 0     @param er  [1], ≥ 1     @param frequency  [Hz], ≥ 0
 * @returns εe(f) within the stated 0.6 %, Z0(f) within about 1 %
 * @throws DomainError for other inputs
 */
export function kirschningJansenDispersion(
  width: number,
  height: number,
  er: number,
  frequency: number,
): DispersedLine {
  const atRest = hammerstadJensenZeroThickness(width, height, er);
  const e0 = atRest.effectivePermittivity ?? 1;
  const u = width / height;
  const inRange = u >= 0.1 && u <= 100 && er <= 20 && (frequency * height) / LIGHT_SPEED <= 0.13;
  if (frequency === 0) return { impedance: atRest.impedance, effectivePermittivity: e0, inRange };
  requirePositive(frequency, "frequency", "frequency");
  const fn = normalisedFrequency(frequency, height);
  const e = er - (er - e0) / (1 + permittivityTerm(u, er, fn));
  const { base, static: rest, exponent } = impedanceTerms(u, er, fn, e0, e);
  // in air both bases are the same and below zero
  const ratio = er === 1 ? 1 : base / rest;
  if (!(ratio > 0)) {
    throw new DomainError("The line lies too far outside the range of the dispersion formula.", "frequency");
  }
  return { impedance: atRest.impedance * Math.pow(ratio, exponent), effectivePermittivity: e, inRange };
}

/** P1 P2 and P3 P4 of the paper, shared with the coupled form. */
export function dispersionTerms(u: number, er: number, fn: number): { scale: number; narrow: number } {
  const p1 =
    0.27488 + (0.6315 + 0.525 / Math.pow(1 + 0.0157 * fn, 20)) * u - 0.065683 * Math.exp(-8.7513 * u);
  const p2 = 0.33622 * (1 - Math.exp(-0.03442 * er));
  const p3 = 0.0363 * Math.exp(-4.6 * u) * (1 - Math.exp(-Math.pow(fn / 38.7, 4.97)));
  const p4 = 1 + 2.751 * (1 - Math.exp(-Math.pow(er / 15.916, 8)));
  return { scale: p1 * p2, narrow: p3 * p4 };
}

/** P(f): how far εe has gone from its static value to εr. */
export function permittivityTerm(u: number, er: number, fn: number): number {
  const { scale, narrow } = dispersionTerms(u, er, fn);
  return scale * Math.pow((0.1844 + narrow) * fn, 1.5763);
}

/** R13, R14 and R17 of the 1983 paper; R17 serves the coupled form too. */
export function impedanceTerms(
  u: number,
  er: number,
  fn: number,
  e0: number,
  e: number,
): { base: number; static: number; exponent: number } {
  const r1 = 0.03891 * Math.pow(er, 1.4);
  const r2 = 0.267 * Math.pow(u, 7);
  const r3 = 4.766 * Math.exp(-3.228 * Math.pow(u, 0.641));
  const r7 = 1.206 - 0.3144 * Math.exp(-r1) * (1 - Math.exp(-r2));
  const r8 = 1 + 1.275 * (1 - Math.exp(-0.004625 * r3 * Math.pow(er, 1.674) * Math.pow(fn / 18.365, 2.745)));
  const r9 = narrowStripTerm(u, er, fn, 1);
  const r10 = 0.00044 * Math.pow(er, 2.136) + 0.0184;
  const sixth = Math.pow(fn / 19.47, 6);
  const r11 = sixth / (1 + 0.0962 * sixth);
  const r12 = 1 / (1 + 0.00245 * u * u);
  const r15 = 0.707 * r10 * Math.pow(fn / 12.3, 1.097);
  const r16 = 1 + 0.0503 * er * er * r11 * (1 - Math.exp(-Math.pow(u / 15, 6)));
  const r17 = r7 * (1 - 1.1241 * (r12 / r16) * Math.exp(-0.026 * Math.pow(fn, 1.15656) - r15));
  return {
    base: 0.9408 * Math.pow(e, r8) - 0.9603,
    static: (0.9408 - r9) * Math.pow(e0, r8) - 0.9603,
    exponent: r17,
  };
}

/** R9; the coupled form has εr multiplied by Q21 in it. */
export function narrowStripTerm(u: number, er: number, fn: number, q21: number): number {
  const r4 = 0.016 + Math.pow(0.0514 * er * q21, 4.524);
  const r5 = Math.pow(fn / 28.843, 12);
  const sixth = (er - 1) ** 6;
  return (
    (((5.086 * r4 * r5) / (0.3838 + 0.386 * r4)) * Math.exp(-22.2 * Math.pow(u, 1.92)) * sixth) /
    ((1 + 1.2992 * r5) * (1 + 10 * sixth))
  );
}
