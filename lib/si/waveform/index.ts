export { measureEdge, type EdgeMeasures, type EdgeWindow } from "./measure-edge";
export { measureExcursion, type Excursion } from "./measure-excursion";
