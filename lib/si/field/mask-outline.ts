import type { Mask } from "../cross-section";
import { INTERFACE, PLAIN, WEAK, type Segment } from "./segment";

/** Copper as the mask sees it: foot edges, how the sides lean (dx/dy), whether it runs out of the picture. */
export interface Hump {
  y: number;
  top: number;
  left: number;
  right: number;
  leftOpen: boolean;
  rightOpen: boolean;
  leftSlope: number;
  rightSlope: number;
}

interface Point {
  x: number;
  y: number;
}

/**
 * The air side of a conformal mask from left to right, humps that meet at the floor merged with a flat top.
 * Side face = copper side face shifted outward by `side` and prolonged straight.
 */
export function maskOutline(
  mask: Mask,
  laminate: number,
  humps: Hump[],
  far: { left: number; right: number },
): Segment[] {
  const floor = laminate + mask.overLaminate;
  const raised = humps
    .filter((hump) => hump.top + mask.overTrace > floor * (1 + 1e-9))
    .sort((a, b) => a.left - b.left);
  const points: Point[] = [];
  let roof = floor;
  raised.forEach((hump, index) => {
    const top = hump.top + mask.overTrace;
    const before = raised[index - 1];
    const leftAt = (y: number) => hump.left - mask.side + hump.leftSlope * (y - hump.y);
    const rightAt = (y: number) => hump.right + mask.side + hump.rightSlope * (y - hump.y);
    const merged = before !== undefined && rightFoot(before, mask, floor) >= leftAt(floor);
    if (hump.leftOpen) points.push({ x: far.left, y: top });
    else if (merged) {
      // the valley is filled to the lower of both tops
      const foot = points.pop() as Point;
      const shoulder = points.at(-1) as Point;
      const level = Math.abs(top - roof) <= 1e-9 * roof;
      if (level || top > roof) points.pop(); // the flat top runs on
      if (!level && top > roof) points.push({ x: leftAt(roof), y: roof }, { x: leftAt(top), y: top });
      if (!level && top < roof) {
        const share = (top - floor) / (roof - floor);
        points.push({ x: foot.x + (shoulder.x - foot.x) * share, y: top });
      }
    } else {
      if (points.length === 0) points.push({ x: far.left, y: floor });
      points.push({ x: leftAt(floor), y: floor }, { x: leftAt(top), y: top });
    }
    if (hump.rightOpen) points.push({ x: far.right, y: top });
    else points.push({ x: rightAt(top), y: top }, { x: rightAt(floor), y: floor });
    roof = top;
  });
  const last = raised.at(-1);
  if (!last) points.push({ x: far.left, y: floor });
  if (!last?.rightOpen) points.push({ x: far.right, y: floor });
  return joined(withoutLoops(points, floor), mask.er, far);
}

function rightFoot(hump: Hump, mask: Mask, floor: number): number {
  return hump.right + mask.side + hump.rightSlope * (floor - hump.y);
}

/** Where both sides lean so far in that they cross below the top, the hump ends in their crossing. */
function withoutLoops(points: Point[], floor: number): Point[] {
  const clean: Point[] = [];
  for (let i = 0; i < points.length; i++) {
    const [a, b, c, d] = [points[i], points[i + 1], points[i + 2], points[i + 3]];
    const loop =
      a && b && c && d && a.y === floor && d.y === floor && b.y === c.y && b.x >= c.x && b.y > floor;
    if (loop) {
      const share = (d.x - a.x) / (d.x - a.x + (b.x - c.x));
      clean.push(a, { x: a.x + (b.x - a.x) * share, y: floor + (b.y - floor) * share });
      i += 2;
    } else if (a) clean.push(a);
  }
  return clean;
}

function joined(points: Point[], er: number, far: { left: number; right: number }): Segment[] {
  const segments: Segment[] = [];
  for (let i = 0; i + 1 < points.length; i++) {
    const a = points[i] as Point;
    const b = points[i + 1] as Point;
    const fromFar = a.x === far.left;
    const toFar = b.x === far.right;
    segments.push({
      x1: a.x,
      y1: a.y,
      x2: b.x,
      y2: b.y,
      end1: fromFar ? PLAIN : WEAK,
      end2: toFar ? PLAIN : WEAK,
      owner: INTERFACE,
      right: er,
      left: 1,
      outward: fromFar ? (toFar ? 2 : -1) : toFar ? 1 : 0,
    });
  }
  return segments;
}
