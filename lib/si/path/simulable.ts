import { coupledBias, couplingTime, isCoupling } from "./coupling";
import { PathTrace } from "./trace";
import type { PathPart, PathPin, ResolvedPath } from "./types";

export interface Unsimulated {
  input: string;
  detail: string;
}

/** A filter this many times slower than the path's lines and edge would need millions of steps. */
const SLOWEST_FILTER = 2000;

/** What keeps a resolved path from being simulated, with any of its drivers; null where nothing does. */
export function cannotSimulate(path: ResolvedPath): Unsimulated | null {
  const first = path.missing[0];
  if (first) return first;
  if (path.drivers.length === 0) return { input: "a driving pin", detail: `No pin of ${path.name} drives.` };
  if (path.parts.every((part) => part.kind !== "C")) return null;
  for (const pin of path.drivers) {
    const reason = seriesFilter(path, pin) ?? floatingReceiver(path, pin) ?? slowFilter(path, pin);
    if (reason) return reason;
  }
  return null;
}

function seriesFilter(path: ResolvedPath, pin: PathPin): Unsimulated | null {
  if (!pin.driver) return null;
  const slowest = couplingTime(path, pin.driver);
  const trace = new PathTrace(path, pin.node);
  for (const receiver of path.receivers)
    for (const step of trace.to(receiver.node).steps) {
      if (step.kind !== "part" || step.part.kind !== "C" || isCoupling(path, step.part, slowest)) continue;
      const { reference } = step.part;
      return {
        input: `simulation of ${reference}`,
        detail: `${reference} is in series but too small to pass whole bits; such a filter is not simulated yet.`,
      };
    }
  return null;
}

function floatingReceiver(path: ResolvedPath, pin: PathPin): Unsimulated | null {
  if (!pin.driver) return null;
  const slowest = couplingTime(path, pin.driver);
  for (const receiver of path.receivers) {
    if (receiver.node === pin.node || !Number.isNaN(coupledBias(path, pin.node, receiver.node, slowest) ?? 0))
      continue;
    const detail = `A capacitor blocks the DC level of ${receiver.pin}, and no resistor to a rail sets it. Import the resistor that does, or have a reviewer accept that it stays unknown.`;
    return { input: `bias of ${receiver.net}`, detail };
  }
  return null;
}

function slowFilter(path: ResolvedPath, pin: PathPin): Unsimulated | null {
  const { driver } = pin;
  if (!driver) return null;
  const delay = path.sections.reduce(
    (sum, { length, delayPerMeter }) => sum + length * (delayPerMeter ?? 0),
    0,
  );
  const source = path.parts.reduce(
    (sum, part) => (part.kind === "R" && part.role === "series" ? sum + (part.value ?? 0) : sum),
    driver.resistance.typical,
  );
  const slow = (part: PathPart) =>
    part.kind === "C" &&
    part.role === "termination" &&
    (part.value ?? 0) * source > SLOWEST_FILTER * (delay + driver.riseTime.fast);
  const part = path.parts.find(slow);
  if (!part) return null;
  return {
    input: `simulation of ${part.reference}`,
    detail: `${part.reference} slows the path far beyond its lines; such a filter is not simulated yet.`,
  };
}
