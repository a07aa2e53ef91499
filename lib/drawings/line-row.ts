import { linear } from "./axis";
import { line, type Mark, text } from "./marks";
import { lengthText, type LengthUnit, ohmsText, quantityText } from "./number-text";
import { textWidth } from "./text-width";

/** Sections in a row, from the driver to one receiver: the place axis of two drawings. */
export interface RowSection {
  id: string;
  /** [Ω]; null when not known */
  impedance: number | null;
  /** one way [s], > 0 */
  delay: number;
  /** [m]; needed for a place axis by length */
  length?: number | null;
}

export interface LineRow {
  sections: readonly RowSection[];
  /** names of the sections' ends, one more than sections */
  nodes: readonly string[];
}

export type PlaceBy = "delay" | "length";

export interface RowScale {
  /** [px] of each node, left to right */
  nodes: number[];
  /** [px] at a share (0 to 1) of a section */
  at: (section: number, share: number) => number;
  by: PlaceBy;
}

export function usableRow(row: LineRow): boolean {
  return row.sections.length > 0 && row.sections.every((s) => Number.isFinite(s.delay) && s.delay > 0);
}

/** Places a row across a width: by delay, or by length where every section has one. */
export function rowScale(row: LineRow, left: number, right: number, by: PlaceBy = "delay"): RowScale {
  const lengths = row.sections.map((s) => s.length ?? 0);
  const byLength = by === "length" && lengths.every((l) => l > 0);
  const sizes = byLength ? lengths : row.sections.map((s) => s.delay);
  const ends = [0];
  for (const size of sizes) ends.push((ends.at(-1) ?? 0) + size);
  const scale = linear([0, ends.at(-1) ?? 1], [left, right]);
  const nodes = ends.map((e) => scale(e));
  return {
    nodes,
    by: byLength ? "length" : "delay",
    at: (section, share) => {
      const [a, b] = [nodes[section] ?? left, nodes[section + 1] ?? right];
      return a + (b - a) * share;
    },
  };
}

/** Node names and, between them, Z0 and delay or length of each section; what has no room is left out. */
export function rowHeader(row: LineRow, scale: RowScale, y: number, unit: LengthUnit): Mark[] {
  const marks: Mark[] = [];
  const clear = new Clearance();
  const last = scale.nodes.length - 1;
  // Ends first: they matter most.
  for (const i of [0, last, ...scale.nodes.keys()].filter((n, k, all) => all.indexOf(n) === k)) {
    const x = scale.nodes[i] ?? 0;
    const label = row.nodes[i] ?? "";
    const anchor = i === 0 ? "start" : i === last ? "end" : "middle";
    const w = textWidth(label, 12, true);
    const from = anchor === "start" ? x : anchor === "end" ? x - w : x - w / 2;
    if (label && clear.take(from, from + w)) marks.push(text(x, y, label, { anchor, weight: 600 }));
  }
  row.sections.forEach((s, i) => {
    const [a, b] = [scale.nodes[i] ?? 0, scale.nodes[i + 1] ?? 0];
    const size = scale.by === "length" ? lengthText(s.length, unit) : quantityText(s.delay, "s");
    const both = `${ohmsText(s.impedance)}, ${size}`;
    const words = [both, ohmsText(s.impedance)].find((w) => textWidth(w, 12) + 8 <= b - a);
    if (words) marks.push(text((a + b) / 2, y + 17, words, { anchor: "middle", ink: "ink-soft" }));
  });
  return marks;
}

/** Upright lines at the nodes. */
export function rowUprights(scale: RowScale, top: number, bottom: number): Mark[] {
  const last = scale.nodes.length - 1;
  return scale.nodes.map((x, i) =>
    line(x, top, x, bottom, {
      stroke: i === 0 || i === last ? "ink-soft" : "rule-line",
      weight: i === 0 || i === last ? 1.25 : 1,
    }),
  );
}

/** Keeps spans along a line from touching each other. */
export class Clearance {
  private readonly taken: (readonly [number, number])[] = [];
  constructor(private readonly gap = 8) {}

  /** Takes a span, free or not: something is drawn there. */
  block(from: number, to: number): void {
    this.taken.push([from, to]);
  }

  /** Takes a span if it is free. */
  take(from: number, to: number): boolean {
    if (this.taken.some(([a, b]) => from < b + this.gap && to > a - this.gap)) return false;
    this.taken.push([from, to]);
    return true;
  }
}
