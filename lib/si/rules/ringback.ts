import { pathLimit, type EdgeRule, type Missing } from "./rule";
import type { ReceiverModel } from "../path/types";
import type { RuleDefinition } from "./types";

const definition: RuleDefinition = {
  id: "ringback",
  title: "Ringback",
  measures: "After the input was read once, how far the dip back stays clear of the threshold.",
  unit: "mV",
  direction: "min",
  defaultLimit: 0,
  near: { absolute: 100 },
  severity: "error",
  selector: false,
  enabledByDefault: true,
  source: "Memory-interface practice (VIH ac and dc levels), from memory.",
};

/**
 * After the first crossing of VIH(ac): min(V) until the next edge − VIH(dc) [mV]; mirrored to VIL(dc) − max(V) on the
 * falling edge. Where the part states no ac level the dc level stands for it. A pin that never gets across has its
 * highest level for value. All corners matter; the fast driver is worst.
 */
export const ringback: EdgeRule = {
  kind: "edge",
  definition,
  family: "bounce",
  edges: ["rise", "fall"],
  applies: () => true,
  lacks: (_path, receiver) => lacksThresholds(receiver),
  limit: (path) => pathLimit(path, definition),
  read(seen) {
    if (seen.ringbackMargin !== null) return { value: 1e3 * seen.ringbackMargin, time: seen.ringbackTime };
    const { vih, vil } = seen.receiver;
    if (vih === null || vil === null) return { value: null, time: null };
    const short = seen.edge === "rise" ? Math.min(0, seen.max - vih) : Math.min(0, vil - seen.min);
    return { value: 1e3 * short, time: null, fails: true };
  },
};

/** The thresholds that a receiver is read at, or what is missing. */
export function lacksThresholds(receiver: ReceiverModel): Missing | null {
  if (receiver.vil !== null && receiver.vih !== null) return null;
  return {
    input: `thresholds of ${receiver.name}`,
    detail: `The model ${receiver.name} states no VIL and VIH.`,
  };
}
