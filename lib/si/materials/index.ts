export { dielectricFamilies, type DielectricFamily } from "./dielectrics";
export { findGlassStyle, glassStyles, type GlassStyle } from "./glass-styles";
export { copperFoils, foilTreatments, type CopperFoil } from "./copper-foils";
