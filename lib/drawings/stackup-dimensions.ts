import { arrow } from "./dimension";
import { circle, line, type Mark, text } from "./marks";
import { lengthNumber, type LengthUnit, numberText, THIN_SPACE } from "./number-text";
import type { PlacedLayer } from "./stackup-section.geometry";

/** Where the chain of dimensions runs, to the right of the board. */
const CHAIN = 20;
const ROOM_FOR_ARROWS = 18;

/**
 * The thickness of every layer as a chain of dimensions: extension lines from each face, arrows where there
 * is room and dots where there is not (as ISO 129 allows), and a leader to the number's row.
 */
export function dimensionColumn(
  placed: readonly PlacedLayer[],
  rows: readonly number[],
  right: number,
  unit: LengthUnit,
): Mark[] {
  const marks: Mark[] = [];
  const x = right + CHAIN;
  const thin = { stroke: "ink-soft", weight: 0.75 } as const;
  const first = placed[0];
  const last = placed.at(-1);
  if (!first || !last) return marks;
  const faces = [...placed.map((p) => p.y), last.y + last.height];
  for (const y of faces) marks.push(line(right + 4, y, x + 5, y, thin));
  marks.push(line(x, first.y, x, last.y + last.height, thin));

  placed.forEach((p, i) => {
    const row = rows[i] ?? 0;
    const middle = p.y + p.height / 2;
    if (p.height >= ROOM_FOR_ARROWS) marks.push(arrow(x, p.y, "up"), arrow(x, p.y + p.height, "down"));
    else
      marks.push(
        circle(x, p.y, 1.6, { fill: "ink-soft" }),
        circle(x, p.y + p.height, 1.6, { fill: "ink-soft" }),
      );
    const leader = { stroke: "ink-soft", weight: 0.6, opacity: 0.7 } as const;
    marks.push(line(x + 6, middle, right + 46, row, leader), line(right + 46, row, right + 60, row, leader));
    marks.push(...numbers(p, row, right, unit));
  });
  return marks;
}

function numbers(p: PlacedLayer, row: number, right: number, unit: LengthUnit): Mark[] {
  const { layer } = p;
  const soft = "ink-soft" as const;
  if (layer.thickness_m === null)
    return [text(right + 122, row + 4, "no data", { anchor: "end", ink: "fail" })];
  const marks: Mark[] = [
    text(
      right + 122,
      row + 4,
      [
        ...(p.exaggerated ? [{ text: "\u2248 ", ink: soft }] : []),
        { text: lengthNumber(layer.thickness_m, unit) },
        { text: `${THIN_SPACE}${unit}`, ink: soft },
      ],
      { anchor: "end" },
    ),
  ];
  if (layer.dk !== null && layer.dk !== undefined)
    marks.push(text(right + 178, row + 4, numberText(layer.dk, 2), { anchor: "end" }));
  return marks;
}
