import { requirePositive, type CoupledLineResult, type FormulaNote, type SingleLineResult } from "./formula";
import { cohnCoupled } from "./cohn-coupled";
import { wheeler1978 } from "./wheeler-stripline";

export const parallelWheelerNote: FormulaNote = {
  id: "offset-stripline-approximations",
  title: "Two centred halves in parallel (Wheeler 1978)",
  range:
    "width below 10 (spacing − copper) of the nearer plane; within 4 % where one height is up to 3 times the other, 8 % at 9 times",
  source: "Common practice on H. A. Wheeler 1978: each plane sees half of a centred strip of its own height",
};
export const parallelCohnNote: FormulaNote = {
  id: "offset-pair-parallel-cohn-1955",
  title: "Pair, two centred halves in parallel (Cohn 1955)",
  range:
    "each half in the range of Cohn 1955: copper up to a tenth of its spacing, width at least 0.35 of it, gap at least 5 coppers",
  source: "Common practice on S. B. Cohn 1955: each plane sees half of a centred pair of its own height",
};

/**
 * Permittivity that a strip between two dielectrics sees: each side weighs by its parallel-plate capacitance.
 *
 *     εr = (ε1/h1 + ε2/h2) / (1/h1 + 1/h2)
 *
 * @param below, above  height to the plane [m] and permittivity [1] of each side
 * @returns εr [1], between the two; 1 % typical, 4 % worst seen against field solutions
 */
export function twoDielectricPermittivity(
  below: { height: number; er: number },
  above: { height: number; er: number },
): number {
  requirePositive(below.height, "layers", "height below the trace");
  requirePositive(above.height, "layers", "height above the trace");
  return (below.er / below.height + above.er / above.height) / (1 / below.height + 1 / above.height);
}

/**
 * Off-centre strip: 2 Z1 Z2 / (Z1 + Z2), Zi the centred strip at b = 2 hi + t.
 *
 * @param width, thickness  [m]   @param below, above  heights to the planes [m], > 0
 * @param er  [1], ≥ 1 (of two dielectrics: twoDielectricPermittivity)
 * @returns Z0 [Ω]; equals Wheeler 1978 for a centred strip
 * @throws DomainError for other inputs
 */
export function parallelWheeler(
  width: number,
  below: number,
  above: number,
  thickness: number,
  er: number,
): SingleLineResult {
  const lower = wheeler1978(width, 2 * below + thickness, thickness, er);
  const upper = wheeler1978(width, 2 * above + thickness, thickness, er);
  return {
    impedance: (2 * lower.impedance * upper.impedance) / (lower.impedance + upper.impedance),
    effectivePermittivity: er,
    inRange: lower.inRange && upper.inRange,
  };
}

/**
 * Off-centre pair: mode by mode, 2 Z1 Z2 / (Z1 + Z2), Zi of the centred pair at b = 2 hi + t.
 * Parameters as above and the gap [m], > 0.
 * @returns mode impedances [Ω]
 * @throws DomainError for other inputs
 */
export function parallelCohnCoupled(
  width: number,
  gap: number,
  below: number,
  above: number,
  thickness: number,
  er: number,
): CoupledLineResult {
  const lower = cohnCoupled(width, gap, 2 * below + thickness, thickness, er);
  const upper = cohnCoupled(width, gap, 2 * above + thickness, thickness, er);
  return {
    even: (2 * lower.even * upper.even) / (lower.even + upper.even),
    odd: (2 * lower.odd * upper.odd) / (lower.odd + upper.odd),
    effectivePermittivityEven: er,
    effectivePermittivityOdd: er,
    inRange: lower.inRange && upper.inRange,
  };
}
