import { ETA0 } from "../physical-constants";
import {
  requireNotNegative,
  requirePermittivity,
  requirePositive,
  type FormulaNote,
  type SingleLineResult,
} from "./formula";

export const wheeler1977Note: FormulaNote = {
  id: "wheeler-1977-microstrip",
  title: "Wheeler 1977",
  range: "any width; stated 2 %",
  source:
    'H. A. Wheeler, "Transmission-line properties of a strip on a dielectric sheet on a plane", IEEE Trans. MTT-25, 1977, p. 631',
};

export const wheeler1965Note: FormulaNote = {
  id: "wheeler-1965-microstrip",
  title: "Wheeler 1965, copper without thickness",
  range: "no copper thickness; the narrow form up to a width of 2 heights, the wide form above",
  source:
    'H. A. Wheeler, "Transmission-line properties of parallel strips separated by a dielectric sheet", IEEE Trans. MTT-13, 1965, p. 172',
};

/**
 * Microstrip with copper thickness, one expression for every width.
 *
 *     Z0 = η0/(2π √2 √(εr+1)) ln{1 + 4h/w′ [a 4h/w′ + √((a 4h/w′)² + (1 + 1/εr)/2 π²)]},  a = (14 + 8/εr)/11
 *     w′ = w + Δw (1 + 1/εr)/2,   Δw = t/π ln(4e / √((t/h)² + (1/π / (w/t + 1.10))²))
 *
 * @param width      strip width [m], > 0
 * @param height     laminate height [m], > 0
 * @param thickness  copper thickness [m], ≥ 0
 * @param er         relative permittivity [1], ≥ 1
 * @returns Z0 [Ω], stated 2 %
 * @throws DomainError for other inputs
 */
export function wheeler1977(width: number, height: number, thickness: number, er: number): SingleLineResult {
  requirePositive(width, "width", "width");
  requirePositive(height, "height", "height");
  requireNotNegative(thickness, "thickness", "copper thickness");
  requirePermittivity(er);
  const corner = 1 / (Math.PI * (width / thickness + 1.1));
  const widening =
    thickness === 0
      ? 0
      : (thickness / Math.PI) * Math.log((4 * Math.E) / Math.sqrt((thickness / height) ** 2 + corner ** 2));
  const x = (4 * height) / (width + (widening * (1 + 1 / er)) / 2);
  const a = (14 + 8 / er) / 11;
  const bracket = a * x + Math.sqrt((a * x) ** 2 + ((1 + 1 / er) / 2) * Math.PI ** 2);
  return {
    impedance: (ETA0 / (2 * Math.PI * Math.sqrt(2 * (er + 1)))) * Math.log(1 + x * bracket),
    inRange: true,
  };
}

/**
 * Microstrip without copper thickness; the older pair of narrow and wide forms.
 *
 *     narrow: Z0 = η0/2π √(2/(εr+1)) [ln(8h/w) + (w/2h)²/8 − ½ (εr−1)/(εr+1) (ln π/2 + (1/εr) ln 4/π)]
 *     wide:   Z0 = η0/(2√εr) / [w/2h + 0.441 + 0.082 (εr−1)/εr² + (εr+1)/(2π εr) (1.451 + ln(w/2h + 0.94))]
 *
 * @param width   strip width [m], > 0
 * @param height  laminate height [m], > 0
 * @param er      relative permittivity [1], ≥ 1
 * @returns Z0 [Ω]; the two forms differ by up to 3 % where they meet
 * @throws DomainError for other inputs
 */
export function wheeler1965(width: number, height: number, er: number): SingleLineResult {
  requirePositive(width, "width", "width");
  requirePositive(height, "height", "height");
  requirePermittivity(er);
  const half = width / (2 * height);
  if (half <= 1) {
    const correction = ((0.5 * (er - 1)) / (er + 1)) * (Math.log(Math.PI / 2) + Math.log(4 / Math.PI) / er);
    const impedance =
      (ETA0 / (2 * Math.PI)) * Math.sqrt(2 / (er + 1)) * (Math.log(4 / half) + half ** 2 / 8 - correction);
    return { impedance, inRange: true };
  }
  const wide =
    half +
    0.441 +
    (0.082 * (er - 1)) / er ** 2 +
    ((er + 1) / (2 * Math.PI * er)) * (1.451 + Math.log(half + 0.94));
  return { impedance: ETA0 / (2 * Math.sqrt(er) * wide), inRange: true };
}
