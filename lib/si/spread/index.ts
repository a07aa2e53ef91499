export {
  impedanceSpread,
  type ImpedanceSpread,
  type QuantitySpread,
  type Sensitivity,
  type SpreadOptions,
} from "./impedance-spread";
export type { SectionTolerances, Tolerance } from "./tolerances";
export type { SpreadQuantity } from "./quantities";
export { predictedYield, spreadStatistics, type SpreadStatistics } from "./statistics";
