export {
  isCopper,
  isDielectric,
  isSignal,
  type Ply,
  type Stackup,
  type StackLayer,
  type StackLayerKind,
} from "./model";
export { stackupFromTyped, type TypedStackLayer } from "./typed-layers";
export { copperSinkingInto, protrusionOf } from "./protrusion";
export {
  builtThickness,
  builtThicknessExact,
  finishedCopper,
  pressedThickness,
  totalThickness,
} from "./thickness";
export { buildCrossSection, type BuiltCrossSection, type TraceShape } from "./build-cross-section";
export {
  FIELD_METHOD,
  lineOnLayer,
  widthOnLayer,
  type LayerLine,
  type LayerWidthRequest,
} from "./line-on-layer";
export { stackupWarnings, type StackupWarning } from "./warnings";
export { stackupTemplates, type StackupTemplate } from "./templates";
export { capabilityOf, type Capability } from "./capability";
export { type Process } from "./process";
export { SPREAD_SAMPLES, spreadOnLayer, yieldOf, type LayerSpread } from "./spread-on-layer";
