export {
  impedanceOf,
  widthForImpedance,
  withSpacing,
  withWidth,
  type ImpedanceTarget,
  type WidthRequest,
  type WidthResult,
} from "./width-for-impedance";
export { dimensionForTarget, type DimensionRequest } from "./dimension-for-target";
