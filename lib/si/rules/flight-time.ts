import { pathLimit, type EdgeRule } from "./rule";
import type { RuleDefinition } from "./types";

const definition: RuleDefinition = {
  id: "flight-time",
  title: "Flight time",
  measures:
    "From the driver's crossing of the measuring level without load to the receiver's first crossing of it.",
  unit: "ps",
  direction: "max",
  defaultLimit: null,
  near: { absolute: 10 },
  severity: "error",
  selector: false,
  enabledByDefault: true,
  source: "Definition of input/output buffer models (Vmeas), from memory; the limit is the class's.",
};

/**
 * t(receiver first crosses Vmeas) − t(driver's open-circuit wave crosses Vmeas) [ps]. Vmeas is the receiver's, else
 * half its supply. Driver models without a reference load are taken unloaded. A receiver that does not cross before
 * the window ends fails without a value. Judged only where the class or the net sets a limit. The slow driver with
 * the largest receiver capacitance matters most.
 */
export const flightTime: EdgeRule = {
  kind: "edge",
  definition,
  family: "timing",
  edges: ["rise", "fall"],
  applies: (path) => pathLimit(path, definition).limit !== null,
  lacks: () => null,
  limit: (path) => pathLimit(path, definition),
  read(seen) {
    if (seen.measCrossing === null) return { value: null, time: null, fails: true };
    return { value: 1e12 * (seen.measCrossing - seen.sourceCrossing), time: seen.measCrossing };
  },
};
