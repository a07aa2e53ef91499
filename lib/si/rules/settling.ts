import { pathLimit, type EdgeRule } from "./rule";
import type { RuleDefinition } from "./types";

const definition: RuleDefinition = {
  id: "settling",
  title: "Settling",
  measures: "How long ringing lasts after the first threshold crossing, as a share of the bit.",
  unit: "% of bit",
  direction: "max",
  defaultLimit: 50,
  near: { share: 0.1 },
  severity: "error",
  selector: false,
  enabledByDefault: true,
  source: "Common practice, no source.",
};

/**
 * Time from the receiver's first threshold crossing (VIL rising, VIH falling) until it stays within 10 % of swing of
 * its DC level, divided by the time to the next edge [% of bit]. One that is not settled when the next edge comes
 * fails without a value. Signals declared slow have no bit to settle in and are not judged. All corners matter.
 */
export const settling: EdgeRule = {
  kind: "edge",
  definition,
  family: "bounce",
  edges: ["rise", "fall"],
  applies: (path) => path.signal !== "slow" || path.bitTime !== null,
  lacks: (path) =>
    path.bitTime !== null
      ? null
      : {
          input: path.className ? `rate of class ${path.className}` : `class of ${path.name}`,
          detail: "Without a data or clock rate there is no bit in which to settle.",
        },
  limit: (path) => pathLimit(path, definition),
  read(seen) {
    if (seen.path.bitTime === null) return { value: null, time: null };
    if (seen.settled === null || seen.firstThreshold === null)
      return { value: null, time: null, fails: true };
    return {
      value: (100 * Math.max(0, seen.settled - seen.firstThreshold)) / seen.path.bitTime,
      time: seen.settled,
    };
  },
};
