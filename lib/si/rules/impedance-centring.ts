import type { RuleDefinition } from "./types";

/**
 * |nominal − target| / target [%] of a controlled line: the class's width on a layer against the class's target, the
 * nominal by the closed form that fits. One finding for each distinct cross-section (class, layer), never one a net:
 * `checkImpedance` judges it. The value says how far the middle of production will lie from the middle of the tolerance.
 */
export const impedanceCentring: RuleDefinition = {
  id: "impedance-centring",
  title: "Impedance centring",
  measures: "How far the nominal impedance of a class's width on a layer is from the class's target.",
  unit: "%",
  direction: "max",
  defaultLimit: 2,
  near: { absolute: 1 },
  severity: "warning",
  selector: false,
  enabledByDefault: true,
  source: "Common practice, no source.",
};
