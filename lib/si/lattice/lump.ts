import type { Network, Part, Section } from "../network/types";

/**
 * Replaces lines much shorter than the edge by half their capacitance at each end and their inductance between: what
 * they do to the edge is the same, and the step need not follow their echoes.
 *
 * @param shorter  lines below this delay are replaced [s]
 * @returns the same network where there is none
 */
export function lumpShortLines(network: Network, shorter: number): Network {
  const sections: Section[] = [];
  const parts: Part[] = [];
  for (const section of network.sections) {
    if (section.kind !== "line" || section.delay >= shorter || section.skin) {
      sections.push(section);
      continue;
    }
    const { name, a, b, impedance, delay } = section;
    const half = delay / impedance / 2;
    parts.push(
      { name, kind: "L", a, b, value: impedance * delay },
      { name, kind: "C", a, b: "0", value: half },
      { name, kind: "C", a: b, b: "0", value: half },
    );
  }
  return parts.length === 0 ? network : { ...network, sections, parts: [...network.parts, ...parts] };
}
