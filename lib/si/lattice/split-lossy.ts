import type { Network, Part, RlcSection, Section } from "../network/types";
import type { Accuracy } from "./step-size";

/** Series resistance of a piece as a share of its impedance. */
const SHARE: Record<Accuracy, number> = { live: 1 / 100, standard: 1 / 250, reference: 1 / 500 };
const FEWEST = 4;
const MOST = 80;

/**
 * Sections with series resistance as equal lossless pieces, each between two halves of its resistance. A piece differs
 * from the lossy line by the square of its R/Z, and what its lumps send back comes in stairs of R/2Z instead of a slope.
 *
 * @returns the same network where there is none
 */
export function splitLossySections(network: Network, accuracy: Accuracy): Network {
  if (!network.sections.some((section) => section.kind === "rlc" && section.r > 0)) return network;
  const sections: Section[] = [];
  const parts: Part[] = [...network.parts];
  for (const section of network.sections) {
    if (section.kind === "rlc" && section.r > 0) split(section, accuracy, sections, parts);
    else sections.push(section);
  }
  return { ...network, sections, parts };
}

function split(
  { name, a, b, l, c, r, length }: RlcSection,
  accuracy: Accuracy,
  sections: Section[],
  parts: Part[],
) {
  const impedance = Math.sqrt(l / c);
  const delay = length * Math.sqrt(l * c);
  const ohms = length * r;
  const pieces = Math.min(MOST, Math.max(FEWEST, Math.ceil(ohms / impedance / SHARE[accuracy])));
  // No node of a network begins with a space.
  const inner = (k: number) => ` ${name} ${k}`;
  for (let k = 0; k < pieces; k++) {
    parts.push({
      name,
      kind: "R",
      a: k === 0 ? a : inner(2 * k),
      b: inner(2 * k + 1),
      value: ohms / pieces / (k === 0 ? 2 : 1),
    });
    sections.push({
      name,
      kind: "line",
      a: inner(2 * k + 1),
      b: inner(2 * k + 2),
      impedance,
      delay: delay / pieces,
    });
  }
  parts.push({ name, kind: "R", a: inner(2 * pieces), b, value: ohms / pieces / 2 });
}
