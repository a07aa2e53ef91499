import { mainSection, PathTrace, sourceResistors, type Route } from "../../path/trace";
import type { DriverModel, PathPin, PathSection, ResolvedPath } from "../../path/types";
import { PULL } from "../pulls";
import type { Corner } from "../types";

/** A piece shorter than this share of the rise time does not act as a step or a branch. */
const SHORT = 0.1;

/** What on a route reflects, and how much, at one corner. */
export interface Anatomy {
  driverOhms: number;
  seriesParts: { reference: string; ohms: number }[];
  /** driver and series resistors [Ω] */
  source: number;
  /** impedance of the route's longest section [Ω] */
  line: number;
  rhoSource: number;
  /** end resistors at the far half [Ω], null: open */
  end: { ohms: number; references: string[] } | null;
  rhoEnd: number;
  step: { rho: number; from: number; to: PathSection; toOhms: number } | null;
  branch: { rho: number; node: string; arms: number; ohms: number; line: number } | null;
  /** receivers' capacitance [F] and its share of the edge: Z0·C / (2·tr) */
  load: { farads: number; strength: number };
  delay: number;
}

export function anatomy(
  path: ResolvedPath,
  driverPin: PathPin,
  driver: DriverModel,
  receiver: PathPin,
  corner: Corner,
): Anatomy | null {
  const route = new PathTrace(path, driverPin.node).to(receiver.node);
  const main = mainSection(route);
  const line = main?.impedance?.[corner.impedance];
  if (!line) return null;
  const riseTime = driver.riseTime[corner.driver];
  const driverOhms = driver.resistance[corner.driver];
  const seriesParts = sourceResistors(route).map((part) => ({
    reference: part.reference,
    ohms: part.value ?? 0,
  }));
  const source = seriesParts.reduce((sum, part) => sum + part.ohms, driverOhms);
  const end = endOf(path, route, line);
  const farads = path.receivers.reduce(
    (sum, pin) => sum + (pin.node === driverPin.node ? 0 : loadOf(pin, corner)),
    0,
  );
  return {
    driverOhms,
    seriesParts,
    source,
    line,
    rhoSource: (source - line) / (source + line),
    end,
    rhoEnd: end ? (end.ohms - line) / (end.ohms + line) : 1,
    step: largestStep(route, corner, SHORT * riseTime),
    branch: largestBranch(path, route, corner, SHORT * riseTime),
    load: { farads, strength: Math.min(1, (line * farads) / (2 * riseTime)) },
    delay: route.delay ?? 0,
  };
}

function loadOf(pin: PathPin, corner: Corner): number {
  const c = pin.receiver?.capacitance;
  if (!c) return 0;
  return corner.driver === "slow" ? c.max : corner.driver === "fast" ? c.min : c.typical;
}

function endOf(path: ResolvedPath, route: Route, line: number): Anatomy["end"] {
  const nodes = new Set(route.steps.flatMap((step) => [step.from, step.to]));
  const parts = path.parts.filter(
    (part) =>
      part.kind === "R" &&
      part.role === "termination" &&
      part.value &&
      part.value < PULL * line &&
      nodes.has(part.a),
  );
  if (parts.length === 0) return null;
  return {
    ohms: 1 / parts.reduce((sum, part) => sum + 1 / (part.value ?? Infinity), 0),
    references: parts.map((part) => part.reference),
  };
}

function delayOf(section: PathSection): number {
  return section.length * (section.delayPerMeter ?? 0);
}

/** Between neighbours long enough to act; shorter pieces between are passed over. */
function largestStep(route: Route, corner: Corner, short: number): Anatomy["step"] {
  let largest: Anatomy["step"] = null;
  let before: number | null = null;
  for (const step of route.steps) {
    if (step.kind === "part") {
      before = null;
      continue;
    }
    const ohms = step.section.impedance?.[corner.impedance];
    if (!ohms || delayOf(step.section) < short) continue;
    if (before !== null) {
      const rho = (ohms - before) / (ohms + before);
      if (Math.abs(rho) > Math.abs(largest?.rho ?? 0))
        largest = { rho, from: before, to: step.section, toOhms: ohms };
    }
    before = ohms;
  }
  return largest;
}

/** Where three or more lines meet: the wave sees the others in parallel. */
function largestBranch(path: ResolvedPath, route: Route, corner: Corner, short: number): Anatomy["branch"] {
  const at = new Map<string, PathSection[]>();
  for (const section of path.sections)
    for (const node of [section.a, section.b]) {
      const list = at.get(node);
      if (list) list.push(section);
      else at.set(node, [section]);
    }
  let largest: Anatomy["branch"] = null;
  for (const step of route.steps) {
    if (step.kind !== "section") continue;
    const arms = (at.get(step.to) ?? []).filter(
      (section) => section !== step.section && delayOf(section) >= short && section.impedance,
    );
    const line = step.section.impedance?.[corner.impedance];
    if (arms.length < 2 || !line) continue;
    const ohms = 1 / arms.reduce((sum, arm) => sum + 1 / (arm.impedance?.[corner.impedance] ?? Infinity), 0);
    const rho = (ohms - line) / (ohms + line);
    if (Math.abs(rho) > Math.abs(largest?.rho ?? 0))
      largest = { rho, node: step.to, arms: arms.length, ohms, line };
  }
  return largest;
}
