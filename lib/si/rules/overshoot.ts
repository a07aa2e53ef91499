import { pathLimit, type EdgeRule } from "./rule";
import type { RuleDefinition } from "./types";

const definition: RuleDefinition = {
  id: "overshoot",
  title: "Overshoot, relative",
  measures: "How far a receiver's voltage goes beyond its final level, as a share of the swing.",
  unit: "%",
  direction: "max",
  defaultLimit: 20,
  near: { absolute: 10 },
  severity: "error",
  selector: false,
  enabledByDefault: true,
  source: "Common practice, no source.",
};

/**
 * (max(V) − V_hi) / (V_hi − V_lo) [%] on a rising edge, (V_lo − min(V)) / (V_hi − V_lo) on a falling one; levels are
 * the DC levels of the pin. Judged only where the receiver states no maximum of its own on that side, which says more.
 * All corners matter; the fast driver is worst.
 */
export const overshoot: EdgeRule = {
  kind: "edge",
  definition,
  family: "bounce",
  edges: ["rise", "fall"],
  applies: (_path, receiver, edge) => (edge === "rise" ? receiver?.maxAbove : receiver?.maxBelow) == null,
  lacks: () => null,
  limit: (path) => pathLimit(path, definition),
  read(seen) {
    const beyond = seen.edge === "rise" ? seen.max - seen.high : seen.low - seen.min;
    return {
      value: (100 * Math.max(0, beyond)) / (seen.high - seen.low),
      time: seen.edge === "rise" ? seen.maxTime : seen.minTime,
    };
  },
};
