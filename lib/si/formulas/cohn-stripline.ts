import { DomainError } from "../errors";
import { ETA0 } from "../physical-constants";
import { ellipticRatio } from "./elliptic";
import {
  requireNotNegative,
  requirePermittivity,
  requirePositive,
  type FormulaNote,
  type SingleLineResult,
} from "./formula";

const PAPER =
  'S. B. Cohn, "Characteristic impedance of the shielded-strip transmission line", IRE Trans. MTT-2, 1954, p. 52';

export const cohnExactNote: FormulaNote = {
  id: "cohn-1954-stripline-zero-thickness",
  title: "Cohn 1954, copper without thickness",
  range: "exact; no copper thickness, centred between the planes, one dielectric",
  source: PAPER,
};
export const cohnWideNote: FormulaNote = {
  id: "cohn-1954-stripline-thick-wide",
  title: "Cohn 1954, wide thick strip",
  range: "width at least 0.35 (spacing − copper), copper up to a quarter of the spacing, centred",
  source: PAPER,
};
export const cohnNarrowNote: FormulaNote = {
  id: "cohn-1954-stripline-thick-narrow",
  title: "Cohn 1954, narrow thick strip as a round wire",
  range: "width below 0.35 (spacing − copper), copper up to a quarter of the spacing, centred",
  source: `${PAPER}; the last coefficient of the equivalent wire is from memory`,
};

/** Beyond this the modulus underflows; no board comes near. */
const WIDEST = 400;

/**
 * Characteristic impedance of a centred, zero-thickness strip between two planes; exact.
 *
 *     Z0 = η0 / (4 √εr) · K(k) / K(k′),   k = sech(π w / 2b)
 *
 * @param width    strip width w [m], 0 < w ≤ 400 b (k underflows beyond)
 * @param spacing  plane-to-plane distance b [m], > 0
 * @param er       relative permittivity [1], ≥ 1
 * @returns Z0 [Ω], falls as w/b rises
 * @throws DomainError outside these ranges
 * @see S. B. Cohn, 1954
 */
export function centredStripImpedance(width: number, spacing: number, er: number): number {
  requirePositive(width, "width", "width");
  requirePositive(spacing, "spacing", "distance between the planes");
  requirePermittivity(er);
  if (width > WIDEST * spacing)
    throw new DomainError("The strip is wider than 400 plane distances.", "width");
  const x = (Math.PI * width) / (2 * spacing);
  return (ETA0 / (4 * Math.sqrt(er))) * ellipticRatio(1 / Math.cosh(x), Math.tanh(x));
}

/**
 * Fringing capacitance of one corner pair of a thick half plane between planes, ÷ ε.
 *
 *     Cf′/ε = 1/π [2/(1−x) ln(1/(1−x) + 1) − (1/(1−x) − 1) ln(1/(1−x)² − 1)],   x = t/b
 *
 * @param x  thickness ÷ spacing [1], 0 ≤ x < 1
 * @returns Cf′/ε [1]; (2/π) ln 2 at x = 0
 */
export function fringingCapacitance(x: number): number {
  if (!(x >= 0 && x < 1))
    throw new DomainError("The copper must be thinner than the plane distance.", "thickness");
  const a = 1 / (1 - x);
  const second = x === 0 ? 0 : (a - 1) * Math.log(a * a - 1);
  return (2 * a * Math.log(a + 1) - second) / Math.PI;
}

/**
 * Centred wide strip with thickness: parallel plate and fringes that do not feel each other.
 *
 *     Z0 = η0/(4√εr) / (w/(b−t) + Cf′/ε)
 *
 * @param width, spacing, thickness  [m]; thickness < spacing
 * @param er  [1], ≥ 1
 * @returns Z0 [Ω]; about 1.2 % at the narrow end of its range
 * @throws DomainError for other inputs
 */
export function cohnWide(width: number, spacing: number, thickness: number, er: number): SingleLineResult {
  check(width, spacing, thickness, er);
  const room = spacing - thickness;
  const fringe = fringingCapacitance(thickness / spacing);
  return {
    impedance: ETA0 / (4 * Math.sqrt(er)) / (width / room + fringe),
    effectivePermittivity: er,
    inRange: width / room >= 0.35 && thickness <= 0.25 * spacing,
  };
}

/**
 * Centred narrow strip with thickness, as the round wire of equal capacitance.
 *
 *     Z0 = η0/(2π√εr) ln(4b/(π d0)),   d0 = w/2 [1 + t/(πw) (1 + ln(4πw/t)) + 0.51 (t/w)²]
 *
 * @param width, spacing, thickness  [m]; thickness < spacing
 * @param er  [1], ≥ 1
 * @returns Z0 [Ω]
 * @throws DomainError for other inputs, and where the wire would fill the space between the planes
 */
export function cohnNarrow(width: number, spacing: number, thickness: number, er: number): SingleLineResult {
  check(width, spacing, thickness, er);
  const ratio = thickness / width;
  const swelling =
    ratio === 0 ? 0 : (ratio / Math.PI) * (1 + Math.log((4 * Math.PI) / ratio)) + 0.51 * ratio ** 2;
  const diameter = (width / 2) * (1 + swelling);
  const argument = (4 * spacing) / (Math.PI * diameter);
  if (argument <= 1) throw new DomainError("The strip is too wide for the narrow form.", "width");
  return {
    impedance: (ETA0 / (2 * Math.PI * Math.sqrt(er))) * Math.log(argument),
    effectivePermittivity: er,
    inRange: width / (spacing - thickness) < 0.35 && thickness <= 0.25 * spacing && ratio <= 0.5,
  };
}

function check(width: number, spacing: number, thickness: number, er: number): void {
  requirePositive(width, "width", "width");
  requirePositive(spacing, "spacing", "distance between the planes");
  requireNotNegative(thickness, "thickness", "copper thickness");
  requirePermittivity(er);
  if (thickness >= spacing)
    throw new DomainError("The copper is as thick as the distance between the planes.", "thickness");
}
