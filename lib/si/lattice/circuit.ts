import { DomainError, UnsupportedError } from "../errors";
import { restValue } from "../network/wave";
import type { IvDriver, Network, Pwl, Section, Sine } from "../network/types";
import { CurrentTable, diodeTable, driverElement, type TableElement } from "./current-table";

/** ≥ 0: a free node; < 0: the fixed node −1 − ref (−1 is ground). */
export type Ref = number;

/** An ideal voltage: ground, a rail, or the inside of a driver. */
export interface Fixed {
  name: string;
  /** before t = 0 [V] */
  rest: number;
  wave: Pwl | Sine | null;
}

export interface Branch {
  name: string;
  kind: "R" | "C" | "L";
  a: Ref;
  b: Ref;
  value: number;
}

/** One end of a wave line. A line sees one node; a mode of a pair sees (v1 + sign · v2)/2. */
export interface Port {
  node: Ref;
  second: Ref | null;
  sign: 1 | -1;
}

/** One wave-carrying line: a section, or one mode of a pair. */
export interface WaveLine {
  /** index in Network.sections */
  section: number;
  mode: "line" | "even" | "odd";
  a: Port;
  b: Port;
  impedance: number;
  delay: number;
  /** [√s]; 0: lossless */
  skin: number;
}

/** The linear circuit with shorts joined, nodes numbered and drivers turned into ideal voltages behind resistors. */
export interface Circuit {
  nodeCount: number;
  ref: (node: string) => Ref;
  fixed: Fixed[];
  branches: Branch[];
  lines: WaveLine[];
  elements: TableElement[];
}

/**
 * @throws DomainError where two ideal voltages meet in one node
 * @throws UnsupportedError where the network holds what the linear lattice does not simulate
 */
export function buildCircuit(network: Network): Circuit {
  const shorts = joinShorts(network);
  const refs = new Map<string, Ref>([[find(shorts, "0"), -1]]);
  const fixed: Fixed[] = [{ name: "ground", rest: 0, wave: null }];
  const fix = (node: string, item: Fixed, field: string) => {
    const root = find(shorts, node);
    const taken = refs.get(root);
    if (taken !== undefined) {
      const other = fixed[-1 - taken];
      if (other && !item.wave && !other.wave && other.rest === item.rest) return;
      throw new DomainError(
        `${item.name} and ${other?.name ?? "ground"} both hold node ${node} at a voltage of their own; put a resistance between them.`,
        field,
      );
    }
    refs.set(root, -1 - fixed.length);
    fixed.push(item);
  };
  network.rails.forEach((rail, i) =>
    fix(rail.node, { name: rail.name, rest: rail.volts, wave: null }, `rails[${i}].node`),
  );
  const branches: Branch[] = [];
  const tables: IvDriver[] = [];
  const behind: { node: string; source: Ref; name: string; ohms: number }[] = [];
  network.drivers.forEach((driver, i) => {
    if (driver.kind === "iv") {
      tables.push(driver);
      return;
    }
    const item: Fixed = { name: driver.name, rest: restValue(driver.wave), wave: driver.wave };
    if (driver.resistance === 0) fix(driver.node, item, `drivers[${i}].node`);
    else {
      behind.push({
        node: driver.node,
        source: -1 - fixed.length,
        name: driver.name,
        ohms: driver.resistance,
      });
      fixed.push(item);
    }
  });
  let nodeCount = 0;
  const ref = (node: string): Ref => {
    const root = find(shorts, node);
    let at = refs.get(root);
    if (at === undefined) refs.set(root, (at = nodeCount++));
    return at;
  };
  const lines = network.sections.flatMap((section, i) => waveLines(section, i, ref));
  for (const { node, source, name, ohms } of behind)
    branches.push({ name, kind: "R", a: source, b: ref(node), value: ohms });
  const elements: TableElement[] = [];
  for (const driver of tables) {
    const node = ref(driver.node);
    elements.push(driverElement(driver, node, -1));
    if (driver.capacitance)
      branches.push({ name: driver.name, kind: "C", a: node, b: -1, value: driver.capacitance });
  }
  network.parts.forEach((part) => {
    if (part.kind === "diode" || part.kind === "iv") {
      const table = part.kind === "diode" ? diodeTable(part) : new CurrentTable(part.points);
      elements.push({ name: part.name, a: ref(part.a), b: ref(part.b), terms: [{ table, weight: null }] });
      return;
    }
    const branch: Branch = {
      name: part.name,
      kind: part.kind,
      a: ref(part.a),
      b: ref(part.b),
      value: part.value,
    };
    const idle =
      branch.a === branch.b || (branch.a < 0 && branch.b < 0) || (part.kind === "C" && part.value === 0);
    if (!idle) branches.push(branch);
  });
  for (const probe of network.probes) ref(probe.node);
  // Between two fixed nodes an element changes nothing that is looked at.
  return {
    nodeCount,
    ref,
    fixed,
    branches,
    lines,
    elements: elements.filter(({ a, b }) => a !== b && (a >= 0 || b >= 0)),
  };
}

function waveLines(section: Section, index: number, ref: (node: string) => Ref): WaveLine[] {
  const field = `sections[${index}]`;
  const port = (node: string): Port => ({ node: ref(node), second: null, sign: 1 });
  if (section.kind === "line") {
    return [
      {
        section: index,
        mode: "line",
        a: port(section.a),
        b: port(section.b),
        impedance: section.impedance,
        delay: section.delay,
        skin: section.skin ?? 0,
      },
    ];
  }
  if (section.kind === "rlc") {
    if (section.r > 0)
      throw new UnsupportedError(
        `${section.name} has series loss, which is not simulated yet.`,
        `${field}.r`,
      );
    const delay = section.length * Math.sqrt(section.l * section.c);
    return [
      {
        section: index,
        mode: "line",
        a: port(section.a),
        b: port(section.b),
        impedance: Math.sqrt(section.l / section.c),
        delay,
        skin: 0,
      },
    ];
  }
  return (["even", "odd"] as const).map((mode) => {
    const both = (first: string, second: string): Port => ({
      node: ref(first),
      second: ref(second),
      sign: mode === "even" ? 1 : -1,
    });
    return {
      section: index,
      mode,
      a: both(section.a1, section.a2),
      b: both(section.b1, section.b2),
      ...section[mode],
      skin: 0,
    };
  });
}

function joinShorts(network: Network): Map<string, string> {
  const parent = new Map<string, string>();
  for (const part of network.parts) {
    if ((part.kind !== "R" && part.kind !== "L") || part.value !== 0) continue;
    const a = find(parent, part.a);
    const b = find(parent, part.b);
    if (a !== b) parent.set(a, b);
  }
  return parent;
}

function find(parent: Map<string, string>, node: string): string {
  let top = node;
  for (let up = parent.get(top); up !== undefined; up = parent.get(top)) top = up;
  return top;
}
