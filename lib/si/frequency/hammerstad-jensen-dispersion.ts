import { hammerstadJensenZeroThickness, type FormulaNote } from "../formulas";
import { requirePositive } from "../formulas/formula";
import { ETA0, MU0 } from "../physical-constants";
import type { DispersedLine } from "./kirschning-jansen-1982";

export const hammerstadJensenDispersionNote: FormulaNote = {
  id: "hammerstad-jensen-1980-dispersion",
  title: "Hammerstad–Jensen 1980, dispersion",
  range: "width 0.1 to 10 heights, Dk up to 16; no accuracy stated beyond measurement",
  source:
    'E. Hammerstad, O. Jensen, "Accurate models for microstrip computer-aided design", IEEE MTT-S Digest, 1980, p. 407',
};

/**
 * Dispersion of a zero-thickness microstrip.
 *
 *     εe(f) = εr − (εr − εe)/(1 + G (f/fp)²),  fp = Z0/(2 μ0 h),  G = π²/12 · (εr − 1)/εe · √(2π Z0/η0)
 *     Z0(f) = Z0 √(εe/εe(f)) (εe(f) − 1)/(εe − 1)
 *
 * @param width, height  [m], > 0     @param er  [1], ≥ 1     @param frequency  [Hz], ≥ 0
 * @throws DomainError for other inputs
 */
export function hammerstadJensenDispersion(
  width: number,
  height: number,
  er: number,
  frequency: number,
): DispersedLine {
  const atRest = hammerstadJensenZeroThickness(width, height, er);
  const e0 = atRest.effectivePermittivity ?? 1;
  const inRange = width >= 0.1 * height && width <= 10 * height && er <= 16;
  if (er === 1 || frequency === 0) return { impedance: atRest.impedance, effectivePermittivity: e0, inRange };
  requirePositive(frequency, "frequency", "frequency");
  const g = ((Math.PI ** 2 / 12) * (er - 1) * Math.sqrt((2 * Math.PI * atRest.impedance) / ETA0)) / e0;
  const x = (frequency * 2 * MU0 * height) / atRest.impedance;
  const e = er - (er - e0) / (1 + g * x * x);
  return {
    impedance: (atRest.impedance * Math.sqrt(e0 / e) * (e - 1)) / (e0 - 1),
    effectivePermittivity: e,
    inRange,
  };
}
