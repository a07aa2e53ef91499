import { DomainError } from "../errors";
import { ETA0 } from "../physical-constants";
import { centredStripImpedance, fringingCapacitance } from "./cohn-stripline";
import { ellipticRatio } from "./elliptic";
import { requirePositive, type CoupledLineResult, type FormulaNote } from "./formula";
import { wheeler1978 } from "./wheeler-stripline";

const PAPER = 'S. B. Cohn, "Shielded coupled-strip transmission line", IRE Trans. MTT-3, 1955, p. 29';

export const cohnCoupledExactNote: FormulaNote = {
  id: "cohn-1955-edge-coupled-stripline-zero-thickness",
  title: "Cohn 1955, pair, copper without thickness",
  range: "exact; no copper thickness, centred between the planes, one dielectric",
  source: PAPER,
};
export const cohnCoupledNote: FormulaNote = {
  id: "cohn-1955-edge-coupled-stripline",
  title: "Cohn 1955, pair with copper thickness",
  range: "copper up to a tenth of the spacing, width at least 0.35 of it, gap at least 5 coppers, centred",
  source: `${PAPER}, with the thick single strip of Wheeler 1978`,
};

/**
 * Two equal zero-thickness strips side by side, centred between planes; exact.
 *
 *     Ze = η0/(4√εr) K(ke′)/K(ke),  ke = tanh(πw/2b) tanh(π(w+s)/2b)
 *     Zo = η0/(4√εr) K(ko′)/K(ko),  ko = tanh(πw/2b) coth(π(w+s)/2b)
 *
 * @param width    strip width w [m], 0 < w; w + s ≤ 200 b
 * @param gap      between the facing edges s [m], > 0
 * @param spacing  plane-to-plane distance b [m], > 0
 * @param er       [1], ≥ 1
 * @returns Ze ≥ Zo [Ω]
 * @throws DomainError outside these ranges
 */
export function coupledStripImpedances(
  width: number,
  gap: number,
  spacing: number,
  er: number,
): { even: number; odd: number } {
  requirePositive(width, "width", "width");
  requirePositive(gap, "gap", "gap");
  requirePositive(spacing, "spacing", "distance between the planes");
  if (width > 200 * spacing) throw new DomainError("The strips are wider than 200 plane distances.", "width");
  const a = (Math.PI * width) / (2 * spacing);
  // beyond 100 spacings the lines do not feel each other to the last digit; the hyperbolic functions would overflow
  const c = a + (Math.PI * Math.min(gap, 100 * spacing)) / (2 * spacing);
  const ke = Math.tanh(a) * Math.tanh(c);
  const sechA = 1 / Math.cosh(a);
  const sechC = 1 / Math.cosh(c);
  const keComplement = Math.sqrt(sechA ** 2 + sechC ** 2 * Math.tanh(a) ** 2);
  const ko = Math.tanh(a) / Math.tanh(c);
  // 1 − ko² = sinh(c−a) sinh(c+a) / (cosh a sinh c)², free of cancellation for small gaps; written without overflow
  const koComplement =
    (sechA * Math.sqrt((1 - Math.exp(-2 * (c - a))) * (1 - Math.exp(-2 * (c + a))))) / (1 - Math.exp(-2 * c));
  const scale = ETA0 / (4 * Math.sqrt(er));
  return { even: scale * ellipticRatio(keComplement, ke), odd: scale * ellipticRatio(koComplement, ko) };
}

/**
 * Two equal strips with thickness: the exact thin pair, each fringe scaled by Cf′(t)/Cf′(0).
 *
 *     1/Ze(t) = 1/Z0(t) − r (1/Z0(0) − 1/Ze(0)),   1/Zo(t) = 1/Z0(t) + r (1/Zo(0) − 1/Z0(0)),   r = Cf′(t)/Cf′(0)
 *
 * @param width, gap, spacing, thickness  [m]
 * @param er  [1], ≥ 1
 * @returns mode impedances [Ω]; for copper thicker than a tenth of the spacing up to 2 % (even) and 5 % (odd) off
 * @throws DomainError for other inputs
 */
export function cohnCoupled(
  width: number,
  gap: number,
  spacing: number,
  thickness: number,
  er: number,
): CoupledLineResult {
  const thin = coupledStripImpedances(width, gap, spacing, er);
  const singleThin = centredStripImpedance(width, spacing, er);
  const thick = thickness === 0 ? singleThin : wheeler1978(width, spacing, thickness, er).impedance;
  const r = fringingCapacitance(thickness / spacing) / fringingCapacitance(0);
  const even = 1 / (1 / thick - r * (1 / singleThin - 1 / thin.even));
  const odd = 1 / (1 / thick + r * (1 / thin.odd - 1 / singleThin));
  if (!(even > 0 && odd > 0)) throw new DomainError("The gap is too small for this formula.", "gap");
  return {
    even,
    odd,
    effectivePermittivityEven: er,
    effectivePermittivityOdd: er,
    inRange: thickness <= 0.1 * spacing && width >= 0.35 * spacing && gap >= 5 * thickness,
  };
}
