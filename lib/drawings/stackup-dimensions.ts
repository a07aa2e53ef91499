import { arrow } from "./dimension";
import { circle, line, type Mark, text } from "./marks";
import { decimalText } from "./decimal-text";
import { lengthNumber, type LengthUnit, numberText } from "./number-text";
import type { PlacedLayer } from "./stackup-layer";

/** Where the chain of dimensions runs, to the right of the board. */
const CHAIN = 20;
/** Where the decimal points of the thicknesses stand, from the board's right edge. */
export const DECIMAL = 84;
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
  if (layer.thickness_m === null) return [text(right + 66, row + 4, "no data", { ink: "fail" })];
  const marks = decimalText(right + DECIMAL, row + 4, lengthNumber(layer.thickness_m, unit), unit);
  if (p.exaggerated) marks.unshift(text(right + 63, row + 4, "\u2248", { ink: "ink-soft" }));
  if (layer.dk !== null && layer.dk !== undefined)
    marks.push(text(right + 186, row + 4, numberText(layer.dk, 2), { anchor: "end" }));
  return marks;
}
