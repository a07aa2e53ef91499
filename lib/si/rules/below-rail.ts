import { partLimit, type EdgeRule } from "./rule";
import type { RuleDefinition } from "./types";

const definition: RuleDefinition = {
  id: "below-rail",
  title: "Below rail",
  measures: "How far a receiver's voltage falls below 0 V after a falling edge.",
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
 * VSS − min(V) [V] over the window of a falling edge, at the receiver; VSS is 0 V. Mirror of `above-rail`. All corners
 * matter; the fast driver at high impedance is usually worst.
 */
export const belowRail: EdgeRule = {
  kind: "edge",
  definition,
  family: "bounce",
  edges: ["fall"],
  applies: () => true,
  lacks: () => null,
  limit: (path, receiver) => partLimit(path, definition, receiver.maxBelow),
  read: (seen) => ({ value: -seen.min, time: seen.minTime }),
};
