export { dielectricFamilies, type DielectricFamily } from "./dielectrics";
export { glassKinds, type GlassKind } from "./glass-kinds";
export { findGlassStyle, glassStyles, type GlassStyle } from "./glass-styles";
export { copperFoils, foilTreatments, type CopperFoil, type FoilTreatment } from "./copper-foils";
export {
  mixedPermittivity,
  pressedPlyThickness,
  resinPermittivity,
  resinVolume,
  RESIN_DENSITY,
  type Permittivity,
} from "./mixing-rule";
export { plyOfFamily, type FamilyPly } from "./plies";
export { dkAtFrequency } from "./dk-at-frequency";
export { genericMaterials, type LibraryMaterial, type MaterialKind } from "./library";
