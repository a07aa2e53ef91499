import { DomainError } from "../errors";
import { ETA0 } from "../physical-constants";
import { ellipticRatio } from "./elliptic";
import { requirePermittivity, requirePositive, type FormulaNote, type SingleLineResult } from "./formula";

export const coplanarNote: FormulaNote = {
  id: "cpwg-elliptic",
  title: "Ghione–Naldi, coplanar ground over a plane",
  range:
    "no copper thickness, wide ground copper on both sides, bare; slot up to the height (our limit: a magnetic wall in the slots is assumed)",
  source:
    'G. Ghione, C. Naldi, "Parameters of coplanar waveguides with lower ground plane", Electronics Letters 19, 1983, p. 734; IEEE Trans. MTT-35, 1987, p. 260',
};

/**
 * Outer trace with coplanar ground on both sides over a plane, without copper thickness.
 *
 *     q = [K(k3)/K(k3′)] / [K(k)/K(k′)],   εeff = (1 + εr q)/(1 + q),   Z0 = η0/(2√εeff) / (K(k)/K(k′) + K(k3)/K(k3′))
 *     k = w/(w+2s),   k3 = tanh(πw/4h)/tanh(π(w+2s)/4h)
 *
 * @param width   centre trace w [m], > 0, up to 400 h
 * @param slot    to the ground copper s [m], > 0
 * @param height  over the plane h [m], > 0
 * @param er      [1], ≥ 1
 * @returns Z0 [Ω] and εeff; for thick narrow copper 9 % high typically, and it does not
 *   pass into the line over a plane as the slots open
 * @throws DomainError for other inputs
 */
export function coplanarWithPlane(width: number, slot: number, height: number, er: number): SingleLineResult {
  requirePositive(width, "width", "width");
  requirePositive(slot, "coplanar.gap", "slot to the coplanar ground");
  requirePositive(height, "height", "height");
  requirePermittivity(er);
  if (width > 400 * height) throw new DomainError("The trace is wider than 400 heights.", "width");
  const outer = width + 2 * slot;
  const aboveSlots = ellipticRatio(width / outer, Math.sqrt(4 * slot * (width + slot)) / outer);
  const a = (Math.PI * width) / (4 * height);
  const c = a + (Math.PI * Math.min(slot, 100 * height)) / (2 * height);
  // 1 − k3² = sinh(c−a) sinh(c+a) / (cosh a sinh c)², written so that nothing overflows or cancels
  const complement =
    Math.sqrt((1 - Math.exp(-2 * (c - a))) * (1 - Math.exp(-2 * (c + a)))) /
    (Math.cosh(a) * (1 - Math.exp(-2 * c)));
  const belowSlots = ellipticRatio(Math.tanh(a) / Math.tanh(c), complement);
  const q = belowSlots / aboveSlots;
  const effectivePermittivity = (1 + er * q) / (1 + q);
  return {
    impedance: ETA0 / (2 * Math.sqrt(effectivePermittivity) * (aboveSlots + belowSlots)),
    effectivePermittivity,
    inRange: slot <= height,
  };
}
