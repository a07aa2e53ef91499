import { isAtTarget } from "./path-sections";
import { PathTrace, sourceResistors } from "@/lib/si/path/trace";
import type { PathPart, PathPin, PathSection, ResolvedPath } from "@/lib/si/path/types";

/** Changes to try on one path; null leaves the thing as it is. SI units. */
export interface WhatIf {
  /** series resistor at the driver [Ω]; 0 takes it out */
  seriesOhms: number | null;
  /** the driver at typical speed [Ω]; slow and fast keep their ratio to it */
  driverOhms: number | null;
  /** 10–90 % at typical speed [s]; slow and fast keep their ratio to it */
  riseTime: number | null;
  /** factor on the length of every section */
  lengthScale: number | null;
  /** the main line's nominal [Ω]; every section moves by the same factor */
  impedance: number | null;
  /** each receiver's, typical [F]; min and max keep their ratio to it, or take it where it was none */
  capacitance: number | null;
  /** parallel resistor at the far receiver [Ω], 0: none; to half the supply or to ground */
  endOhms: number | null;
  endTo: "ground" | "half";
}

export const NO_CHANGE: WhatIf = {
  seriesOhms: null,
  driverOhms: null,
  riseTime: null,
  lengthScale: null,
  impedance: null,
  capacitance: null,
  endOhms: null,
  endTo: "half",
};

/** What the changes start from: the values of the path as it is. */
export interface WhatIfStart {
  seriesOhms: number;
  /** the resistor that is changed; null: a new one */
  seriesReference: string | null;
  driverOhms: number;
  riseTime: number;
  /** of all sections [m] */
  length: number;
  impedance: number;
  /** its class's target stands for what its width gives */
  atTarget: boolean;
  mainLayer: string;
  mainWidth: number;
  capacitance: number;
  /** the receiver that the end resistor is put at */
  farPin: string | null;
}

export const NEW_SERIES = "new R";
export const NEW_END = "new end R";
const END_RAIL = "rail of the new end R";

export function isChanged(change: WhatIf): boolean {
  const { endTo: _to, ...values } = change;
  return Object.values(values).some((value) => value !== null);
}

/** @returns null where the path lacks what a change would start from */
export function whatIfStart(path: ResolvedPath, driverPin: string): WhatIfStart | null {
  const pin = path.drivers.find((entry) => entry.pin === driverPin);
  const main = longest(path);
  if (!pin?.driver || !main?.impedance) return null;
  const series = seriesResistor(path, pin);
  const loads = path.receivers.flatMap((entry) =>
    entry.receiver && entry.node !== pin.node ? [entry.receiver.capacitance.typical] : [],
  );
  return {
    seriesOhms: series?.value ?? 0,
    seriesReference: series?.reference ?? null,
    driverOhms: pin.driver.resistance.typical,
    riseTime: pin.driver.riseTime.typical,
    length: path.sections.reduce((sum, section) => sum + section.length, 0),
    impedance: main.impedance.nominal,
    atTarget: isAtTarget(main),
    mainLayer: main.layer,
    mainWidth: main.width,
    capacitance: loads[0] ?? 0,
    farPin: farReceiver(path, pin)?.pin ?? null,
  };
}

/** The path with the changes made; the path itself is left alone. */
export function applyWhatIf(path: ResolvedPath, driverPin: string, change: WhatIf): ResolvedPath {
  if (!isChanged(change)) return path;
  const start = whatIfStart(path, driverPin);
  const pin = path.drivers.find((entry) => entry.pin === driverPin);
  if (!start || !pin) return path;
  let changed: ResolvedPath = {
    ...path,
    sections: path.sections.map((section) => changedSection(section, start, change)),
    drivers: path.drivers.map((entry) =>
      entry.pin === driverPin ? changedDriver(entry, start, change) : entry,
    ),
    receivers: path.receivers.map((entry) => changedReceiver(entry, change)),
  };
  if (change.seriesOhms !== null) changed = withSeries(changed, driverPin, change.seriesOhms);
  if (change.endOhms) changed = withEnd(changed, start, pin.driver?.vdd ?? 0, change.endOhms, change.endTo);
  return changed;
}

function changedSection(section: PathSection, start: WhatIfStart, change: WhatIf): PathSection {
  const factor = change.impedance === null ? 1 : change.impedance / start.impedance;
  return {
    ...section,
    length: section.length * (change.lengthScale ?? 1),
    impedance: section.impedance && {
      low: section.impedance.low * factor,
      nominal: section.impedance.nominal * factor,
      high: section.impedance.high * factor,
    },
  };
}

function changedDriver(pin: PathPin, start: WhatIfStart, change: WhatIf): PathPin {
  if (!pin.driver) return pin;
  const { resistance, riseTime } = pin.driver;
  return {
    ...pin,
    driver: {
      ...pin.driver,
      resistance:
        change.driverOhms === null ? resistance : scaled(resistance, start.driverOhms, change.driverOhms),
      riseTime: change.riseTime === null ? riseTime : scaled(riseTime, start.riseTime, change.riseTime),
    },
  };
}

/** An ideal value has no ratio to keep. */
function scaled<K extends string>(values: Record<K, number>, from: number, to: number): Record<K, number> {
  const entries = Object.entries<number>(values).map(([key, value]) => [
    key,
    from > 0 ? (value * to) / from : to,
  ]);
  return Object.fromEntries(entries) as Record<K, number>;
}

function changedReceiver(pin: PathPin, change: WhatIf): PathPin {
  if (!pin.receiver || change.capacitance === null) return pin;
  const { capacitance } = pin.receiver;
  return {
    ...pin,
    receiver: { ...pin.receiver, capacitance: scaled(capacitance, capacitance.typical, change.capacitance) },
  };
}

function withSeries(path: ResolvedPath, driverPin: string, ohms: number): ResolvedPath {
  const pin = path.drivers.find((entry) => entry.pin === driverPin);
  if (!pin) return path;
  const present = seriesResistor(path, pin);
  if (present)
    return { ...path, parts: path.parts.map((part) => (part === present ? { ...part, value: ohms } : part)) };
  if (ohms === 0) return path;
  const node = `${pin.node} before the ${NEW_SERIES}`;
  const part: PathPart = {
    reference: NEW_SERIES,
    kind: "R",
    a: node,
    b: pin.node,
    value: ohms,
    role: "series",
  };
  const moved = (entry: PathPin) => (entry.pin === driverPin ? { ...entry, node } : entry);
  return {
    ...path,
    parts: [...path.parts, part],
    drivers: path.drivers.map(moved),
    receivers: path.receivers.map(moved),
  };
}

function withEnd(
  path: ResolvedPath,
  start: WhatIfStart,
  vdd: number,
  ohms: number,
  to: "ground" | "half",
): ResolvedPath {
  const far = path.receivers.find((entry) => entry.pin === start.farPin);
  if (!far) return path;
  const volts = to === "half" ? vdd / 2 : 0;
  return {
    ...path,
    parts: [
      ...path.parts,
      { reference: NEW_END, kind: "R", a: far.node, b: END_RAIL, value: ohms, role: "termination" },
    ],
    rails: [...path.rails, { name: to === "half" ? "half the supply" : "ground", node: END_RAIL, volts }],
  };
}

function seriesResistor(path: ResolvedPath, pin: PathPin): PathPart | null {
  const trace = new PathTrace(path, pin.node);
  const far = farReceiver(path, pin);
  if (!far) return null;
  const [first] = sourceResistors(trace.to(far.node));
  return first ?? null;
}

function farReceiver(path: ResolvedPath, pin: PathPin): PathPin | null {
  const trace = new PathTrace(path, pin.node);
  let far: PathPin | null = null;
  let longest = -1;
  for (const entry of path.receivers) {
    if (entry.node === pin.node || !trace.reaches(entry.node)) continue;
    const delay = trace.to(entry.node).delay ?? 0;
    if (delay > longest) {
      far = entry;
      longest = delay;
    }
  }
  return far;
}

function longest(path: ResolvedPath): PathSection | null {
  return path.sections.reduce<PathSection | null>(
    (most, section) => (section.impedance && section.length > (most?.length ?? 0) ? section : most),
    null,
  );
}
