import { DomainError } from "../errors";
import type { DielectricFamily } from "./dielectrics";
import { glassKinds } from "./glass-kinds";
import type { GlassStyle } from "./glass-styles";
import { mixedPermittivity, pressedPlyThickness, resinPermittivity } from "./mixing-rule";

export interface FamilyPly {
  /** [m], as it fills an opening without copper */
  thickness: number;
  /** relative permittivity and loss tangent at the family's frequency [1] */
  dk: number;
  df: number;
}

/**
 * A ply of a dielectric family on a glass style: the family's resin, found from its laminate, on another share of glass.
 *
 * @param resinPercent  by weight [%], above 0 and below 100
 * @throws DomainError for a family without woven glass, or a resin content outside this range
 * @see mixedPermittivity, pressedPlyThickness
 */
export function plyOfFamily(family: DielectricFamily, style: GlassStyle, resinPercent: number): FamilyPly {
  if (!family.base)
    throw new DomainError(`${family.name} has no woven glass, so no plies by glass style.`, "glassStyle");
  const glass = glassKinds[family.base.glass];
  const laminate = { er: Number(family.dk), tanD: Number(family.df) };
  const resin = resinPermittivity(laminate, Number(family.base.resinPercent) / 100, glass);
  const ply = mixedPermittivity(resin, resinPercent / 100, glass);
  return {
    thickness: pressedPlyThickness(style.gramsPerSquareMetre / 1000, resinPercent / 100, glass),
    dk: ply.er,
    df: ply.tanD,
  };
}
