import { pathLimit, type EdgeRule } from "./rule";
import { lacksThresholds } from "./ringback";
import type { RuleDefinition } from "./types";

const definition: RuleDefinition = {
  id: "level-margin",
  title: "Level margin",
  measures: "How far the steady level clears the receiver's threshold, as a share of its supply.",
  unit: "% of VDD",
  direction: "min",
  defaultLimit: 10,
  // 0.05 V of 3.3 V
  near: { absolute: 1.5 },
  severity: "error",
  selector: false,
  enabledByDefault: true,
  source: "Common practice, no source.",
};

/**
 * (V_hi − VIH) / VDD after a rising edge, (VIL − V_lo) / VDD after a falling one [% of VDD], at DC steady state: what
 * terminations and pulls leave of the swing. The slow (weak) driver matters most; impedance does not.
 */
export const levelMargin: EdgeRule = {
  kind: "edge",
  definition,
  family: "level",
  edges: ["rise", "fall"],
  applies: () => true,
  lacks: (_path, receiver) => lacksThresholds(receiver),
  limit: (path) => pathLimit(path, definition),
  read({ receiver, edge, high, low }) {
    if (receiver.vih === null || receiver.vil === null) return { value: null, time: null };
    const clear = edge === "rise" ? high - receiver.vih : receiver.vil - low;
    return { value: (100 * clear) / receiver.vdd, time: null };
  },
};
