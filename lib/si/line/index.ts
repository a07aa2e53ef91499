export { widthForImpedance, type WidthRequest, type WidthResult } from "./width-for-impedance";
export { fieldDimension, type FieldDimensionRequest } from "./field-dimension";
export { impedanceOf, type ImpedanceTarget } from "./impedance-of";
export { withSpacing, withWidth } from "./reshape";
export { dimensionForTarget, type DimensionRequest } from "./dimension-for-target";
