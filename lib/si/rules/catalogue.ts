import { aboveRail } from "./above-rail";
import { belowRail } from "./below-rail";
import { criticalLength } from "./critical-length";
import { flightTime } from "./flight-time";
import { impedanceCentring } from "./impedance-centring";
import { impedanceYield } from "./impedance-yield";
import { levelMargin } from "./level-margin";
import { overshoot } from "./overshoot";
import { ringback } from "./ringback";
import type { EdgeRule, StaticRule } from "./rule";
import { settling } from "./settling";
import { spacing } from "./spacing";
import { terminationValue } from "./termination-value";
import type { RuleDefinition } from "./types";

/** Judged on simulated edges. A new rule is a file and a line here. */
export const edgeRules: readonly EdgeRule[] = [
  aboveRail,
  belowRail,
  overshoot,
  ringback,
  settling,
  levelMargin,
  flightTime,
];

/** Judged without simulation. */
export const staticRules: readonly StaticRule[] = [terminationValue, criticalLength, spacing];

/** Every rule, in the order in which pages list them. */
export const ruleCatalogue: readonly RuleDefinition[] = [
  ...edgeRules.map((rule) => rule.definition),
  ...staticRules.map((rule) => rule.definition),
  impedanceCentring,
  impedanceYield,
];

/** Every mechanism a finding can carry, with the title of the problem it makes. */
export const mechanismTitles: Readonly<Record<string, string>> = {
  "driver mismatch": "Driver does not match the line",
  "end mismatch": "End of the line does not match",
  "impedance step": "Impedance step on the way",
  branch: "Branch splits the wave",
  "capacitive load": "Receiver capacitance loads the line",
  "static level": "Steady level beyond the rail",
  level: "Steady level too close to the threshold",
  "late arrival": "Arrives late",
  "cross-section": "Width misses the target impedance",
  spread: "Production spreads beyond the tolerance",
  spacing: "Close neighbour",
  "long line": "Long for its edge",
  "missing input": "Input missing",
};
