import { circle, line, type Mark, path, polygon, px, rect } from "./marks";
import type { PartKind } from "./topology-graph";

const BODY = 26;
const HALF = 6;

/** A two-terminal part between x1 and x2 on a level line: leads and the schematic symbol. */
export function partSymbol(part: PartKind, x1: number, x2: number, y: number): Mark[] {
  const centre = (x1 + x2) / 2;
  const half = part === "C" ? 3 : part === "D" ? 6 : BODY / 2;
  const [a, b] = [centre - half, centre + half];
  const leads = [line(x1, y, a, y, { weight: 1.25 }), line(b, y, x2, y, { weight: 1.25 })];
  const body = { stroke: "ink", weight: 1.5 } as const;
  switch (part) {
    case "R":
      return [...leads, rect(a, y - HALF + 1, BODY, 2 * HALF - 2, { ...body, fill: "sheet" })];
    case "C":
      return [
        ...leads,
        line(a, y - 9, a, y + 9, { ...body, weight: 2 }),
        line(b, y - 9, b, y + 9, { ...body, weight: 2 }),
      ];
    case "L": {
      const arc = BODY / 3;
      const arcs = `M${px(a)} ${px(y)}${`a${px(arc / 2)} ${px(arc / 2)} 0 0 1 ${px(arc)} 0`.repeat(3)}`;
      return [...leads, path(arcs, body)];
    }
    case "D":
      return [
        ...leads,
        polygon(
          [
            [a, y - 6],
            [a, y + 6],
            [b, y],
          ],
          { ...body, fill: "sheet" },
        ),
        line(b, y - 6, b, y + 6, body),
      ];
  }
}

/** A buffer: the triangle of a driver (filled) or a receiver. Its tip points along the signal. */
export function bufferSymbol(x: number, y: number, driving: boolean): Mark {
  return polygon(
    [
      [x, y - 9],
      [x + 17, y],
      [x, y + 9],
    ],
    { stroke: "ink", weight: 1.5, fill: driving ? "ink" : "sheet" },
  );
}

/** Ground: three bars, downward. Another rail: one bar on top of a stem. */
export function railSymbol(x: number, y: number, ground: boolean): Mark[] {
  const style = { stroke: "ink", weight: 1.5 } as const;
  if (!ground) return [line(x, y, x, y - 8, style), line(x - 7, y - 8, x + 7, y - 8, style)];
  return [
    line(x, y, x, y + 5, style),
    line(x - 8, y + 5, x + 8, y + 5, style),
    line(x - 5, y + 8.5, x + 5, y + 8.5, style),
    line(x - 2, y + 12, x + 2, y + 12, style),
  ];
}

export function viaSymbol(x1: number, x2: number, y: number): Mark[] {
  const centre = (x1 + x2) / 2;
  return [
    line(x1, y, x2, y, { stroke: "copper", weight: 2 }),
    circle(centre, y, 6, { fill: "sheet", stroke: "copper", weight: 2.5 }),
  ];
}

export function isGround(rail: string): boolean {
  return rail === "0" || /^(a|d|p)?(gnd|vss)/i.test(rail);
}
