import type { PathSection, Spread } from "./types";
import type { NodeMap } from "./node-map";

/** A line of the network: one section, or a chain of sections with one impedance. */
export interface PathLine {
  a: string;
  b: string;
  impedance: Spread;
  /** one way [s] */
  delay: number;
  /** ids of the sections it stands for, from a to b */
  sections: string[];
}

/**
 * The lines of a path. Chains of equal impedance with nothing between them become one line, which is exact and
 * saves the simulation a junction and a short step.
 *
 * @param sections  all with impedance and delay; those of no length are already joined in `nodes`
 * @param kept      nodes that must stay: pins, part ends
 */
export function chainLines(
  sections: readonly PathSection[],
  nodes: NodeMap,
  kept: ReadonlySet<string>,
): PathLine[] {
  const lines: PathLine[] = [];
  for (const section of sections) {
    const a = nodes.find(section.a);
    const b = nodes.find(section.b);
    if (!section.impedance || section.delayPerMeter === null || section.length <= 0 || a === b) continue;
    lines.push({
      a,
      b,
      impedance: section.impedance,
      delay: section.length * section.delayPerMeter,
      sections: [section.id],
    });
  }
  const at = new Map<string, Set<PathLine>>();
  const touch = (node: string, line: PathLine) => {
    const set = at.get(node);
    if (set) set.add(line);
    else at.set(node, new Set([line]));
  };
  for (const line of lines) {
    touch(line.a, line);
    touch(line.b, line);
  }
  const merged = new Set(lines);
  for (const [node, ends] of at) {
    if (kept.has(node) || ends.size !== 2) continue;
    const [first, second] = [...ends];
    if (!first || !second || !sameImpedance(first.impedance, second.impedance)) continue;
    const before = first.b === node ? first : flipped(first);
    const after = second.a === node ? second : flipped(second);
    if (before.a === after.b) continue;
    const line: PathLine = {
      a: before.a,
      b: after.b,
      impedance: first.impedance,
      delay: first.delay + second.delay,
      sections: [...before.sections, ...after.sections],
    };
    for (const gone of [first, second]) {
      merged.delete(gone);
      at.get(gone.a)?.delete(gone);
      at.get(gone.b)?.delete(gone);
    }
    merged.add(line);
    touch(line.a, line);
    touch(line.b, line);
  }
  return [...merged];
}

function flipped(line: PathLine): PathLine {
  return { ...line, a: line.b, b: line.a, sections: [...line.sections].reverse() };
}

function sameImpedance(a: Spread, b: Spread): boolean {
  const near = (x: number, y: number) => Math.abs(x - y) <= 1e-9 * x;
  return near(a.low, b.low) && near(a.nominal, b.nominal) && near(a.high, b.high);
}
