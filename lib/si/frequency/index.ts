export type { Complex } from "./complex";
export { wideBandDebye, type WideBandDebye, type WideBandDebyeInput } from "./wide-band-debye";
export { COPPER_CONDUCTIVITY, skinDepth, surfaceImpedance, surfaceResistance } from "./skin-effect";
export {
  cannonballRoughness,
  hammerstadRoughness,
  hurayRoughness,
  roughnessFactor,
  type Roughness,
} from "./roughness";
export { hammerstadJensenDispersion, hammerstadJensenDispersionNote } from "./hammerstad-jensen-dispersion";
export {
  kirschningJansenDispersion,
  kirschningJansenDispersionNote,
  type DispersedLine,
} from "./kirschning-jansen-1982";
export { kirschningJansenPairDispersion, kirschningJansenPairDispersionNote } from "./kirschning-jansen-1984";
export { lineLoss, type ConductorInput, type LineLoss, type LineLossOptions } from "./line-loss";
export type { ModeLoss } from "./mode-loss";
export { resistanceFactor } from "./wall-recession";
export { dispersionNote, type DispersionNote } from "./dispersion-note";
