export { dimensions, type Dimension, type Quantity } from "./quantity";
export { Decimal } from "./decimal";
export { METRES_PER_OUNCE } from "./unit-table";
export { findUnit, unitsOf } from "./find-unit";
export { canonicalUnit, parseQuantity } from "./parse-quantity";
export { parsePrintedValue, type PartDimension } from "./printed-value";
export {
  addExact,
  addWeightedExact,
  convert,
  fromSi,
  toSi,
  toSiExact,
  type WeightedQuantity,
} from "./convert";
export { formatQuantity, formatSi, formatSiParts, NO_VALUE, type FormatOptions } from "./format";
export { eSeriesBetween, nearestESeries, type ESeries, type ESeriesValue } from "./e-series";
