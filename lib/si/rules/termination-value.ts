import { mainSection, PathTrace, type Route } from "../path/trace";
import type { PathPart, PathPin, ResolvedPath } from "../path/types";
import { pathLimit, type Missing, type StaticReading, type StaticRule } from "./rule";
import { ohms, picoseconds, withArticle } from "./words";
import { PULL } from "./pulls";
import type { RuleDefinition } from "./types";

const definition: RuleDefinition = {
  id: "termination-value",
  title: "Termination value",
  measures: "How far the termination is from matching the line, at the typical driver and nominal impedance.",
  unit: "%",
  direction: "max",
  defaultLimit: 15,
  near: { absolute: 5 },
  severity: "warning",
  selector: false,
  enabledByDefault: true,
  source: "Common practice, no source.",
};

/** Below this share of the fast edge a line needs no resistor: one sixth, as in `critical-length`. */
const SHORT = 1 / 6;

/**
 * Series: |Rs − (Z0 − Rdrv)| / Z0; parallel, Thevenin and RC: |R − Z0| / Z0 with R the parallel value at the end [%],
 * at typical (corners are judged by simulation). A class that asks for a series resistor on a line longer than a sixth
 * of the fast edge, but whose path has none, is judged with Rs = 0. Z0 is that of the longest section beyond the
 * driver's resistor.
 */
export const terminationValue: StaticRule = {
  kind: "static",
  definition,
  read(path) {
    let worst: StaticReading | null = null;
    let missing: Missing | null = null;
    for (const pin of path.drivers) {
      const reading = readDriver(path, pin);
      if (reading && "input" in reading) missing ??= reading;
      else if (reading && (reading.corners[0]?.value ?? 0) > (worst?.corners[0]?.value ?? -1))
        worst = reading;
    }
    return worst ?? missing;
  },
};

function readDriver(path: ResolvedPath, pin: PathPin): StaticReading | Missing | null {
  const trace = new PathTrace(path, pin.node);
  const route = farthest(path, trace, pin);
  if (!pin.driver || !route) return null;
  const series = route.steps.findIndex((step) => step.kind === "part" && step.part.kind === "R");
  const end = endResistance(path, route);
  const { scheme } = path.termination;
  if (end && (scheme === "none" || scheme === "parallel" || scheme === "thevenin" || scheme === "rc"))
    return judgeEnd(path, route, end);
  if (series >= 0 && isNearDriver(route, series)) return judgeSeries(path, pin, route, series);
  if (route.delay === null || route.delay < SHORT * pin.driver.riseTime.fast) return null;
  if (scheme === "series" && series < 0) return judgeSeries(path, pin, route, -1);
  if (scheme === "parallel" || scheme === "thevenin" || scheme === "rc")
    return {
      input: `end resistor of ${path.name}`,
      detail: `Class ${path.className ?? ""} asks for a ${scheme} termination; no part ends this path.`,
    };
  return null;
}

function farthest(path: ResolvedPath, trace: PathTrace, pin: PathPin): Route | null {
  let longest: Route | null = null;
  for (const receiver of path.receivers) {
    if (receiver.node === pin.node || !trace.reaches(receiver.node)) continue;
    const route = trace.to(receiver.node);
    if (!longest || (route.delay ?? 0) > (longest.delay ?? 0)) longest = route;
  }
  return longest;
}

/** A resistor in the far half belongs to the driver at the other end. */
function isNearDriver(route: Route, index: number): boolean {
  let before = 0;
  let all = 0;
  route.steps.forEach((step, i) => {
    if (step.kind !== "section") return;
    all += step.section.length;
    if (i < index) before += step.section.length;
  });
  return before <= all / 2;
}

function judgeSeries(path: ResolvedPath, pin: PathPin, route: Route, index: number): StaticReading | null {
  const line = mainSection(route, index + 1)?.impedance?.nominal;
  const part = route.steps[index];
  const value = part?.kind === "part" ? part.part.value : 0;
  if (!pin.driver || !line || value === null) return null;
  const wanted = line - pin.driver.resistance.typical;
  const name = part?.kind === "part" ? `${part.part.reference} of ${ohms(value)}` : "No series resistor";
  return {
    corners: [
      { corner: { driver: "typical", impedance: "nominal" }, value: (100 * Math.abs(value - wanted)) / line },
    ],
    limit: pathLimit(path, definition),
    pin: pin.pin,
    mechanism: "driver mismatch",
    restsOnAssumed: pin.driver.assumed,
    cause: () =>
      wanted > 0
        ? `${name} with the ${ohms(pin.driver?.resistance.typical ?? 0)} driver stands before ${withArticle(ohms(line))} line; ${ohms(wanted)} would match it.`
        : `The driver's ${ohms(pin.driver?.resistance.typical ?? 0)} is already above the ${ohms(line)} line${part ? `, and ${name} adds to it` : ""}.`,
  };
}

interface EndResistance {
  value: number;
  parts: PathPart[];
}

/** Resistors to rails (directly, or through a capacitor) on the last half of the route, in parallel. */
function endResistance(path: ResolvedPath, route: Route): EndResistance | null {
  const nodes = new Set(
    route.steps.slice(Math.floor(route.steps.length / 2)).flatMap((step) => [step.from, step.to]),
  );
  const isPull = (part: PathPart, line: number) =>
    part.value === null || part.value <= 0 || part.value > PULL * line;
  const line = mainSection(route)?.impedance?.nominal;
  if (!line) return null;
  const parts = path.parts.filter((part) => {
    if (part.kind !== "R" || isPull(part, line)) return false;
    if (part.role === "termination") return nodes.has(part.a);
    const far = nodes.has(part.a) ? part.b : nodes.has(part.b) ? part.a : null;
    const onRoute = route.steps.some((step) => step.kind === "part" && step.part === part);
    return (
      far !== null &&
      !onRoute &&
      path.parts.some((other) => other.kind === "C" && other.role === "termination" && other.a === far)
    );
  });
  if (parts.length === 0) return null;
  return { parts, value: 1 / parts.reduce((sum, part) => sum + 1 / (part.value ?? Infinity), 0) };
}

function judgeEnd(path: ResolvedPath, route: Route, end: EndResistance): StaticReading | null {
  const line = mainSection(route)?.impedance?.nominal;
  if (!line) return null;
  const names = end.parts.map((part) => part.reference).join(" and ");
  return {
    corners: [
      {
        corner: { driver: "typical", impedance: "nominal" },
        value: (100 * Math.abs(end.value - line)) / line,
      },
    ],
    limit: pathLimit(path, definition),
    pin: null,
    mechanism: "end mismatch",
    restsOnAssumed: false,
    cause: () =>
      `${names} ends ${withArticle(ohms(line))} line with ${ohms(end.value)}${route.delay === null ? "" : ` after ${picoseconds(route.delay)}`}.`,
  };
}
