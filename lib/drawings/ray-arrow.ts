import { type Mark, polygon } from "./marks";
import type { Ink } from "./palette";

const LENGTH = 11;
const HALF = 4.5;

/** An arrowhead at the end of a slanted line. */
export function arrowAlong(x1: number, y1: number, x2: number, y2: number, ink: Ink): Mark {
  const size = Math.sqrt((x2 - x1) ** 2 + (y2 - y1) ** 2) || 1;
  const [ux, uy] = [(x2 - x1) / size, (y2 - y1) / size];
  const [bx, by] = [x2 - ux * LENGTH, y2 - uy * LENGTH];
  return polygon(
    [
      [x2, y2],
      [bx - uy * HALF, by + ux * HALF],
      [bx + uy * HALF, by - ux * HALF],
    ],
    { fill: ink },
  );
}
