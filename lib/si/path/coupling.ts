import { NodeMap } from "./node-map";
import { PathTrace } from "./trace";
import type { DriverModel, PathPart, ResolvedPath } from "./types";

/** A series capacitor this many times slower than the bit passes the edge whole: a coupling capacitor. */
const COUPLING = 20;

/** Time constant from which a series capacitor couples rather than filters [s]: 20 bits, or 20 times the slow window. */
export function couplingTime(path: ResolvedPath, driver: DriverModel): number {
  const delay = path.sections.reduce(
    (sum, { length, delayPerMeter }) => sum + length * (delayPerMeter ?? 0),
    0,
  );
  return COUPLING * (path.bitTime ?? 20 * delay + driver.riseTime.slow);
}

export function isCoupling(path: ResolvedPath, part: PathPart, slowest: number): boolean {
  if (part.kind !== "C" || part.role !== "series" || part.value === null) return false;
  const line = path.sections.find((section) => section.impedance)?.impedance?.nominal ?? 50;
  return part.value * line >= slowest;
}

/** Copper of no length, 0 Ω links and coupling capacitors are one node for an edge. */
export function joinNodes(path: ResolvedPath, slowest: number): NodeMap {
  const nodes = new NodeMap();
  for (const section of path.sections) if (section.length <= 0) nodes.join(section.a, section.b);
  for (const part of path.parts)
    if ((part.kind === "R" && part.value === 0) || isCoupling(path, part, slowest))
      nodes.join(part.a, part.b);
  return nodes;
}

/**
 * The DC level of a pin behind a coupling capacitor: what the resistors from its side to rails set [V]. Null where no
 * capacitor is between, NaN where nothing sets it.
 */
export function coupledBias(
  path: ResolvedPath,
  driver: string,
  receiver: string,
  slowest: number,
): number | null {
  const blocks = path.parts.filter((part) => isCoupling(path, part, slowest));
  if (blocks.length === 0) return null;
  const route = new PathTrace(path, driver).to(receiver);
  if (!route.steps.some((step) => step.kind === "part" && blocks.includes(step.part))) return null;
  const side = new PathTrace(
    { ...path, parts: path.parts.filter((part) => !blocks.includes(part)) },
    receiver,
  );
  let siemens = 0;
  let amperes = 0;
  for (const part of path.parts) {
    if (part.kind !== "R" || part.role !== "termination" || !part.value || !side.reaches(part.a)) continue;
    const rail = path.rails.find((entry) => entry.node === part.b);
    siemens += 1 / part.value;
    amperes += (rail?.volts ?? 0) / part.value;
  }
  return siemens > 0 ? amperes / siemens : NaN;
}
