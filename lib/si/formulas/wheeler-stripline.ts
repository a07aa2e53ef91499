import { DomainError } from "../errors";
import { ETA0 } from "../physical-constants";
import {
  requireNotNegative,
  requirePermittivity,
  requirePositive,
  type FormulaNote,
  type SingleLineResult,
} from "./formula";

export const wheeler1978Note: FormulaNote = {
  id: "wheeler-1978-stripline",
  title: "Wheeler 1978 with copper thickness",
  range: "width below 10 (spacing − copper), centred between the planes, one dielectric; stated 0.5 %",
  source:
    'H. A. Wheeler, "Transmission-line properties of a stripline between parallel planes", IEEE Trans. MTT-26, 1978, p. 866',
};

/**
 * Centred strip between two planes, with copper thickness.
 *
 *     Z0 = η0/(4π√εr) ln{1 + 4/(π m) [8/(π m) + √((8/(π m))² + 6.27)]},   m = w/(b−t) + Δw/(b−t)
 *     Δw/(b−t) = x/(π(1−x)) {1 − ½ ln[(x/(2−x))² + (0.0796 x/(w/b + 1.1x))^n]},  n = 2/(1 + ⅔ x/(1−x)),  x = t/b
 *
 * @param width      strip width [m], > 0; of a trapezoid the mean of foot and crown
 * @param spacing    plane-to-plane distance b [m], > thickness
 * @param thickness  copper thickness t [m], ≥ 0
 * @param er         relative permittivity [1], ≥ 1
 * @returns Z0 [Ω], stated 0.5 %; falls as the width rises
 * @throws DomainError for other inputs
 */
export function wheeler1978(width: number, spacing: number, thickness: number, er: number): SingleLineResult {
  requirePositive(width, "width", "width");
  requirePositive(spacing, "spacing", "distance between the planes");
  requireNotNegative(thickness, "thickness", "copper thickness");
  requirePermittivity(er);
  if (thickness >= spacing) {
    throw new DomainError("The copper is as thick as the distance between the planes.", "thickness");
  }
  const room = spacing - thickness;
  const m = width / room + widening(width / spacing, thickness / spacing);
  const x = 8 / (Math.PI * m);
  return {
    impedance: (ETA0 / (4 * Math.PI * Math.sqrt(er))) * Math.log(1 + (x / 2) * (x + Math.sqrt(x * x + 6.27))),
    effectivePermittivity: er,
    inRange: width / room < 10,
  };
}

function widening(widthRatio: number, x: number): number {
  if (x === 0) return 0;
  const n = 2 / (1 + ((2 / 3) * x) / (1 - x));
  const inner = (x / (2 - x)) ** 2 + Math.pow((0.0796 * x) / (widthRatio + 1.1 * x), n);
  return (x / (Math.PI * (1 - x))) * (1 - 0.5 * Math.log(inner));
}
