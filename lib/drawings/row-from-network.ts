import type { LineSection, Network } from "@/lib/si/network/types";
import type { TableSection } from "./bounce-rays";
import type { LineRow } from "./line-row";

/** A row of sections and how the network names its pieces. */
export interface NetworkRow {
  row: LineRow;
  /** each section's name and the end that faces the driver */
  sections: TableSection[];
  /** the network's node at each place of the row, one more than sections */
  nodes: string[];
}

export interface RowNames {
  /** what a node is called on the drawing: a pin, a part; unnamed ones stay blank */
  node?: ReadonlyMap<string, string>;
  /** [m] by section name, for a place axis by length */
  length?: ReadonlyMap<string, number>;
}

/**
 * The line sections from one node to another by the fewest steps, in order: the place axis of the bounce diagram and
 * of the voltage along the line. Parts have no length; they stand where two sections meet. Ground and rails are no way
 * through.
 *
 * @returns null when no line leads from one to the other
 */
export function rowFromNetwork(
  network: Network,
  from: string,
  to: string,
  names: RowNames = {},
): NetworkRow | null {
  interface Step {
    node: string;
    before: Step | null;
    section: LineSection | null;
  }
  const links: { a: string; b: string; section: LineSection | null }[] = [
    ...network.sections.flatMap((s) => (s.kind === "line" ? [{ a: s.a, b: s.b, section: s }] : [])),
    ...network.parts.map((p) => ({ a: p.a, b: p.b, section: null })),
  ];
  const seen = new Set([from, "0", ...network.rails.map((r) => r.node)]);
  const queue: Step[] = [{ node: from, before: null, section: null }];
  let found: Step | null = null;
  for (let i = 0; i < queue.length && !found; i++) {
    const here = queue[i];
    if (!here) break;
    for (const { a, b, section } of links) {
      const other = a === here.node ? b : b === here.node ? a : null;
      if (other === null || seen.has(other)) continue;
      seen.add(other);
      const step: Step = { node: other, before: here, section };
      if (other === to) found = step;
      queue.push(step);
    }
  }

  const way: Step[] = [];
  for (let step = found; step; step = step.before) way.unshift(step);
  const result: NetworkRow = { row: { sections: [], nodes: [] }, sections: [], nodes: [] };
  const sections: LineRow["sections"][number][] = [];
  for (const { section, node } of way) {
    if (!section) continue;
    const near = section.b === node ? "a" : "b";
    if (result.nodes.length === 0) result.nodes.push(near === "a" ? section.a : section.b);
    result.nodes.push(node);
    result.sections.push({ section: section.name, near });
    sections.push({
      id: section.name,
      impedance: section.impedance,
      delay: section.delay,
      length: names.length?.get(section.name) ?? null,
    });
  }
  if (sections.length === 0) return null;
  // A row that starts or ends behind a series part is named after the pin itself.
  const called = result.nodes.map((node) => names.node?.get(node) ?? "");
  called[0] = names.node?.get(from) ?? called[0] ?? "";
  called[called.length - 1] = names.node?.get(to) ?? called.at(-1) ?? "";
  result.row = { sections, nodes: called };
  return result;
}
