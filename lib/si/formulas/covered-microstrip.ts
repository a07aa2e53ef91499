import { requireNotNegative, type FormulaNote, type SingleLineResult } from "./formula";
import { hammerstadJensenThickness } from "./hammerstad-jensen";

export const coveredMicrostripNote: FormulaNote = {
  id: "covered-microstrip-exponential",
  title: "Hammerstad–Jensen 1980 under a cover (exponential filling)",
  range: "cover of about the laminate's Dk; width 0.01 to 100 heights",
  source:
    "Hammerstad, Jensen 1980 with εeff′ = εeff e^(−2b/h) + εr (1 − e^(−2b/h)), b the cover over the copper's foot; common practice, from memory",
};

/**
 * Outer trace under a flat dielectric cover.
 *
 *     εeff′ = εeff e^(−2b/h) + εr (1 − e^(−2b/h)),   Z0′ = Z0 √(εeff/εeff′)
 *
 * @param width, height, thickness  [m], as in hammerstadJensenThickness
 * @param cover  from the laminate's surface to the cover's [m], ≥ 0
 * @param er     of laminate and cover [1], ≥ 1
 * @returns Z0 [Ω] and εeff
 * @throws DomainError for other inputs
 */
export function coveredMicrostrip(
  width: number,
  height: number,
  thickness: number,
  cover: number,
  er: number,
): SingleLineResult {
  requireNotNegative(cover, "layers", "cover");
  const bare = hammerstadJensenThickness(width, height, thickness, er);
  const open = bare.effectivePermittivity ?? er;
  const share = Math.exp((-2 * cover) / height);
  const effectivePermittivity = open * share + er * (1 - share);
  return {
    impedance: bare.impedance * Math.sqrt(open / effectivePermittivity),
    effectivePermittivity,
    inRange: bare.inRange,
  };
}
