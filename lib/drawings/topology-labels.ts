import { Clearance } from "./line-row";
import { line, type Mark, text } from "./marks";
import { ohmsText } from "./number-text";
import { textWidth } from "./text-width";
import type { TopologyLayout } from "./topology-layout";
import { delayText, partValue } from "./topology-words";

/** Labels above and below a line, nearest first: the second is used when its neighbours are too close. */
const LANES = { above: [-11, -25], below: [19, 32] } as const;

/** Z0 (or reference) above, delay (or value) below; moved to a second lane, or left to the pointer, where crowded. */
export function rowLabels(layout: TopologyLayout, y: (row: number) => number): Mark[] {
  const marks: Mark[] = [];
  const lanes = new Map<string, Clearance>();
  const lane = (row: number, offset: number): Clearance => {
    const key = `${row}/${offset}`;
    const known = lanes.get(key) ?? new Clearance(6);
    lanes.set(key, known);
    return known;
  };
  // Uprights pass through the lanes of the rows between.
  for (const s of layout.strands)
    for (let r = s.parentRow; r < s.row; r++) {
      for (const offset of LANES.below) lane(r, offset).block(s.x0 - 2, s.x0 + 2);
      for (const offset of LANES.above) lane(r + 1, offset).block(s.x0 - 2, s.x0 + 2);
    }
  for (const s of layout.strands)
    if (s.row > 0 && s.strand.end.kind === "pin")
      for (const offset of LANES.below) lane(s.row, offset).block(s.end - 2, s.end + 60);
  const place = (
    row: number,
    x1: number,
    x2: number,
    words: string,
    offsets: readonly number[],
    soft: boolean,
  ): void => {
    if (words === "") return;
    const half = textWidth(words, 12) / 2;
    for (const offset of offsets) {
      const x = [(x1 + x2) / 2, x1 + half + 8].find((at) => lane(row, offset).take(at - half, at + half));
      if (x === undefined) continue;
      if (offset !== offsets[0]) {
        const [from, to] = offset < 0 ? [offset + 4, -6] : [6, offset - 11];
        marks.push(line(x, y(row) + from, x, y(row) + to, { stroke: "ink-soft", weight: 0.6, opacity: 0.7 }));
      }
      marks.push(
        text(x, y(row) + offset, words, { anchor: "middle", ...(soft ? { ink: "ink-soft" as const } : {}) }),
      );
      return;
    }
  };
  // Long sections first: they have the room, and matter most.
  const edges = layout.strands.flatMap((s) => s.edges).sort((a, b) => b.x2 - b.x1 - (a.x2 - a.x1));
  for (const { edge, x1, x2, row } of edges) {
    if (edge.kind === "line") {
      place(row, x1, x2, ohmsText(edge.impedance), LANES.above, false);
      place(row, x1, x2, delayText(edge.delay), LANES.below, true);
    } else if (edge.kind === "part") {
      place(row, x1, x2, edge.reference, LANES.above, false);
      place(row, x1, x2, partValue(edge.part, edge.value), LANES.below, true);
    } else place(row, x1, x2, edge.label ?? "", LANES.above, true);
  }
  return marks;
}
