import { DomainError } from "../errors";
import type { Driver, IvTable, Network, Part, Pwl, Section, Sine } from "./types";

/**
 * Refuses a network that means nothing physically, naming the item and the field at fault.
 *
 * @throws DomainError with `field` such as "sections[2].delay"
 */
export function validateNetwork(network: Network): void {
  network.rails.forEach((rail, i) => number(rail.volts, `rails[${i}].volts`, rail.name));
  network.drivers.forEach((driver, i) => checkDriver(driver, `drivers[${i}]`));
  network.sections.forEach((section, i) => checkSection(section, `sections[${i}]`));
  network.parts.forEach((part, i) => checkPart(part, `parts[${i}]`));
  const known = new Set(["0"]);
  for (const rail of network.rails) known.add(rail.node);
  for (const driver of network.drivers) known.add(driver.node);
  for (const section of network.sections) for (const node of ends(section)) known.add(node);
  for (const part of network.parts) known.add(part.a).add(part.b);
  const names = new Set<string>();
  network.probes.forEach((probe, i) => {
    if (!known.has(probe.node))
      throw new DomainError(
        `Probe ${probe.name} is at node ${probe.node}, which nothing else touches.`,
        `probes[${i}].node`,
      );
    if (names.has(probe.name))
      throw new DomainError(
        `Two probes are called ${probe.name}; give each its own name.`,
        `probes[${i}].name`,
      );
    names.add(probe.name);
  });
}

function ends(section: Section): string[] {
  return section.kind === "pair" ? [section.a1, section.a2, section.b1, section.b2] : [section.a, section.b];
}

function checkDriver(driver: Driver, field: string) {
  if (driver.kind === "thevenin") {
    notNegative(driver.resistance, `${field}.resistance`, driver.name);
    if (driver.wave.kind === "sine") checkSine(driver.wave, `${field}.wave`, driver.name);
    else checkPwl(driver.wave, `${field}.wave`, driver.name);
    return;
  }
  number(driver.vdd, `${field}.vdd`, driver.name);
  checkTable(driver.pullup, `${field}.pullup`, driver.name);
  checkTable(driver.pulldown, `${field}.pulldown`, driver.name);
  checkPwl(driver.pullupWeight, `${field}.pullupWeight`, driver.name);
  checkPwl(driver.pulldownWeight, `${field}.pulldownWeight`, driver.name);
  if (driver.capacitance !== undefined) notNegative(driver.capacitance, `${field}.capacitance`, driver.name);
}

function checkSection(section: Section, field: string) {
  const { name } = section;
  if (section.kind === "line") {
    positive(section.impedance, `${field}.impedance`, name);
    positive(section.delay, `${field}.delay`, name);
    if (section.skin !== undefined) notNegative(section.skin, `${field}.skin`, name);
  } else if (section.kind === "pair") {
    for (const mode of ["even", "odd"] as const) {
      positive(section[mode].impedance, `${field}.${mode}.impedance`, name);
      positive(section[mode].delay, `${field}.${mode}.delay`, name);
    }
  } else {
    positive(section.l, `${field}.l`, name);
    positive(section.c, `${field}.c`, name);
    notNegative(section.r, `${field}.r`, name);
    positive(section.length, `${field}.length`, name);
  }
}

function checkPart(part: Part, field: string) {
  if (part.kind === "diode") {
    positive(part.saturationCurrent, `${field}.saturationCurrent`, part.name);
    positive(part.emission, `${field}.emission`, part.name);
    positive(part.thermalVoltage, `${field}.thermalVoltage`, part.name);
    notNegative(part.seriesResistance, `${field}.seriesResistance`, part.name);
  } else if (part.kind === "iv") checkTable(part.points, `${field}.points`, part.name);
  else notNegative(part.value, `${field}.value`, part.name);
}

function checkPwl(wave: Pwl, field: string, name: string) {
  const { time, value } = wave;
  if (time.length === 0 || time.length !== value.length)
    throw new DomainError(
      `The wave of ${name} needs as many values as times, at least one.`,
      `${field}.time`,
    );
  for (let i = 0; i < time.length; i++) {
    number(time[i] ?? NaN, `${field}.time[${i}]`, name);
    number(value[i] ?? NaN, `${field}.value[${i}]`, name);
    if (i > 0 && (time[i] ?? 0) < (time[i - 1] ?? 0))
      throw new DomainError(
        `The wave of ${name} goes back in time at point ${i + 1}; times must not decrease.`,
        `${field}.time[${i}]`,
      );
  }
  if ((time[0] ?? 0) < 0)
    throw new DomainError(
      `The wave of ${name} starts before t = 0, where the circuit is at rest.`,
      `${field}.time[0]`,
    );
}

function checkSine(wave: Sine, field: string, name: string) {
  positive(wave.frequency, `${field}.frequency`, name);
  number(wave.offset, `${field}.offset`, name);
  number(wave.amplitude, `${field}.amplitude`, name);
  number(wave.phase, `${field}.phase`, name);
  notNegative(wave.start, `${field}.start`, name);
}

function checkTable(points: IvTable, field: string, name: string) {
  if (points.length < 2) throw new DomainError(`The I-V table of ${name} needs two points at least.`, field);
  points.forEach(([volts, amperes], i) => {
    number(volts, `${field}[${i}]`, name);
    number(amperes, `${field}[${i}]`, name);
    if (i > 0 && volts <= (points[i - 1]?.[0] ?? 0))
      throw new DomainError(
        `The I-V table of ${name} must go up in volts; point ${i + 1} does not.`,
        `${field}[${i}]`,
      );
  });
}

function number(value: number, field: string, name: string) {
  if (!Number.isFinite(value)) throw new DomainError(`${name}: ${last(field)} must be a number.`, field);
}

function positive(value: number, field: string, name: string) {
  if (!(Number.isFinite(value) && value > 0))
    throw new DomainError(`${name}: ${last(field)} must be above zero.`, field);
}

function notNegative(value: number, field: string, name: string) {
  if (!(Number.isFinite(value) && value >= 0))
    throw new DomainError(`${name}: ${last(field)} must be zero or more.`, field);
}

function last(field: string): string {
  return field.slice(field.lastIndexOf(".") + 1);
}
