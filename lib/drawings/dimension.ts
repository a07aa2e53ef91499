import { line, type Mark, polygon, text } from "./marks";

const ARROW = 7;
const HALF = 2.4;
const SIZE = 12;
/** Below this span arrows point inward from outside, as on a mechanical drawing. */
const ROOM_FOR_ARROWS = 3 * ARROW;

/** Extension lines leave a gap at the part and run a little past the dimension line. */
const GAP = 3;
const PAST = 4;

interface Horizontal {
  x1: number;
  x2: number;
  /** of the dimension line */
  y: number;
  /** where the extension lines start, at the part's face */
  from1: number;
  from2: number;
  label: string;
  /** the label sits above the line (default) or below it */
  below?: boolean;
}

/** A horizontal dimension: two extension lines, arrows, the value centred on the line's far side. */
export function horizontalDimension({ x1, x2, y, from1, from2, label, below = false }: Horizontal): Mark[] {
  const marks = [x1, x2].map((x, i) => {
    const from = i === 0 ? from1 : from2;
    const sign = Math.sign(y - from) || 1;
    return line(x, from + sign * GAP, x, y + sign * PAST, { stroke: "ink-soft", weight: 0.75 });
  }) as Mark[];
  const outside = x2 - x1 < ROOM_FOR_ARROWS;
  if (outside) {
    marks.push(line(x1 - 2 * ARROW, y, x2 + 2 * ARROW, y, { stroke: "ink-soft", weight: 0.75 }));
  } else {
    marks.push(line(x1, y, x2, y, { stroke: "ink-soft", weight: 0.75 }));
  }
  marks.push(arrow(x1, y, outside ? "right" : "left"), arrow(x2, y, outside ? "left" : "right"));
  marks.push(text((x1 + x2) / 2, below ? y + SIZE + 3 : y - 5, label, { anchor: "middle", halo: true }));
  return marks;
}

interface Vertical {
  y1: number;
  y2: number;
  x: number;
  from1: number;
  from2: number;
  /** one line, or two where the room beside is small */
  label: string | readonly [name: string, value: string];
  /** the label sits right (default) or left of the line */
  left?: boolean;
}

/** A vertical dimension; its label reads level, beside the line. */
export function verticalDimension({ y1, y2, x, from1, from2, label, left = false }: Vertical): Mark[] {
  const marks = [y1, y2].map((y, i) => {
    const from = i === 0 ? from1 : from2;
    const sign = Math.sign(x - from) || 1;
    return line(from + sign * GAP, y, x + sign * PAST, y, { stroke: "ink-soft", weight: 0.75 });
  }) as Mark[];
  const [top, bottom] = y1 < y2 ? [y1, y2] : [y2, y1];
  const outside = bottom - top < ROOM_FOR_ARROWS;
  marks.push(
    line(x, outside ? top - 2 * ARROW : top, x, outside ? bottom + 2 * ARROW : bottom, {
      stroke: "ink-soft",
      weight: 0.75,
    }),
    arrow(x, top, outside ? "down" : "up"),
    arrow(x, bottom, outside ? "up" : "down"),
  );
  const lines = typeof label === "string" ? [label] : label;
  lines.forEach((words, i) => {
    const y = (top + bottom) / 2 + 4 + (i - (lines.length - 1) / 2) * (SIZE + 2);
    marks.push(text(left ? x - 8 : x + 8, y, words, { anchor: left ? "end" : "start", halo: true }));
  });
  return marks;
}

/** A solid arrowhead whose tip is at x, y. */
export function arrow(x: number, y: number, to: "left" | "right" | "up" | "down"): Mark {
  const [dx, dy] = { left: [-1, 0], right: [1, 0], up: [0, -1], down: [0, 1] }[to] as [number, number];
  const [bx, by] = [x - dx * ARROW, y - dy * ARROW];
  return polygon(
    [
      [x, y],
      [bx - dy * HALF, by - dx * HALF],
      [bx + dy * HALF, by + dx * HALF],
    ],
    { fill: "ink-soft" },
  );
}
