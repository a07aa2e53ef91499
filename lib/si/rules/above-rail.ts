import { partLimit, type EdgeRule } from "./rule";
import type { RuleDefinition } from "./types";

const definition: RuleDefinition = {
  id: "above-rail",
  title: "Above rail",
  measures: "How far a receiver's voltage rises above its supply after a rising edge.",
  unit: "V",
  direction: "max",
  defaultLimit: 0.3,
  near: { absolute: 0.05 },
  severity: "error",
  selector: false,
  enabledByDefault: true,
  source:
    "Common limit of CMOS data sheets, from memory; the part's absolute maximum where its model states one.",
};

/**
 * max(V) − VDD [V] over the window of a rising edge, at the receiver. Negative where the rail is never reached. All
 * corners matter; the fast driver at high impedance is usually worst. The receiver's own maximum outranks the project.
 */
export const aboveRail: EdgeRule = {
  kind: "edge",
  definition,
  family: "bounce",
  edges: ["rise"],
  applies: () => true,
  lacks: () => null,
  limit: (path, receiver) => partLimit(path, definition, receiver.maxAbove),
  read: (seen) => ({ value: seen.max - seen.receiver.vdd, time: seen.maxTime }),
};
