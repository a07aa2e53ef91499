import type { RuleDefinition } from "./types";

/**
 * The share of production predicted to lie within target ± tolerance [%], from the spread of the line's cross-section
 * over the fabricator's process tolerances. One finding for each distinct cross-section (class, layer), never one a
 * net: `checkImpedance` judges it.
 */
export const impedanceYield: RuleDefinition = {
  id: "impedance-yield",
  title: "Impedance yield",
  measures:
    "Predicted share of production within the class's tolerance, from the spread of the cross-section.",
  unit: "%",
  direction: "min",
  defaultLimit: 95,
  near: { absolute: 3 },
  severity: "warning",
  selector: false,
  enabledByDefault: true,
  source: "Common practice, no source.",
};
