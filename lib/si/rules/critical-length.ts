import { PathTrace } from "../path/trace";
import type { ResolvedPath } from "../path/types";
import { driverSpeeds } from "./corners";
import { pathLimit, type StaticRule } from "./rule";
import { number, picoseconds } from "./words";
import { PULL } from "./pulls";
import type { RuleDefinition } from "./types";

const definition: RuleDefinition = {
  id: "critical-length",
  title: "Critical length",
  measures: "One-way delay of an unterminated path over the driver's rise time: when a route becomes a line.",
  unit: "1",
  direction: "max",
  defaultLimit: 0.1667,
  near: null,
  severity: "warning",
  selector: true,
  enabledByDefault: true,
  source: "Common practice, no source.",
};

/**
 * One-way delay from the driver to its farthest receiver ÷ 10–90 % rise time [1], at each driver speed; the fast edge
 * is worst. It only chooses what to look at: length rules do not predict overshoot (10 Ω on 50 Ω overshoots 17.3 % at
 * an edge of six delays and 11.1 % at four). Not asked of paths with a series or an end resistor.
 */
export const criticalLength: StaticRule = {
  kind: "static",
  definition,
  read(path) {
    if (isTerminated(path)) return null;
    let longest: { pin: string; delay: number; riseTime: Record<string, number>; assumed: boolean } | null =
      null;
    for (const pin of path.drivers) {
      if (!pin.driver) continue;
      const delay = farthestDelay(path, pin.node);
      if (delay === null) continue;
      if (!longest || delay / pin.driver.riseTime.fast > longest.delay / (longest.riseTime.fast ?? 1))
        longest = { pin: pin.pin, delay, riseTime: pin.driver.riseTime, assumed: pin.driver.assumed };
    }
    const first = path.missing[0];
    if (!longest) return first ? { input: first.input, detail: first.detail } : null;
    const { delay, riseTime, assumed, pin } = longest;
    return {
      corners: driverSpeeds.map((driver) => ({
        corner: { driver, impedance: "nominal" },
        value: delay / (riseTime[driver] ?? delay),
      })),
      limit: pathLimit(path, definition),
      pin,
      mechanism: "long line",
      restsOnAssumed: assumed,
      cause: (value) =>
        `The unterminated route takes ${picoseconds(delay)} one way, ${number(value, 2)} of the driver's ${picoseconds(delay / value)} rise time.`,
    };
  },
};

export function isTerminated(path: ResolvedPath): boolean {
  const line = path.sections.find((section) => section.impedance)?.impedance?.nominal ?? 50;
  return path.parts.some(
    (part) =>
      part.kind === "R" &&
      part.value !== null &&
      part.value > 0 &&
      (part.role === "series" || part.value < PULL * line),
  );
}

function farthestDelay(path: ResolvedPath, start: string): number | null {
  const trace = new PathTrace(path, start);
  let farthest: number | null = null;
  for (const pin of path.receivers) {
    if (pin.node === start || !trace.reaches(pin.node)) continue;
    const { delay } = trace.to(pin.node);
    if (delay !== null && delay > (farthest ?? 0)) farthest = delay;
  }
  return farthest;
}
