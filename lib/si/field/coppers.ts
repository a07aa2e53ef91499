import type { CrossSection } from "../cross-section";
import { GROUND } from "./segment";

/** A trace, or coplanar ground, as the outline sees it. */
export interface Copper {
  owner: number;
  y: number;
  top: number;
  /** bottom and top x of the left and right side; infinite for coplanar ground */
  left: [number, number];
  right: [number, number];
}

/** A height at which the permittivity steps. */
export interface Level {
  y: number;
  below: number;
  above: number;
}

/** Steps in height or permittivity below this share are rounding, not structure. */
export const SNAP = 1e-6;

/** Copper with faces snapped to interfaces that they all but touch, coplanar ground last. */
export function coppersOf(section: CrossSection, levels: Level[], height: number): Copper[] {
  const snap = (y: number) => levels.find((level) => Math.abs(level.y - y) <= SNAP * height)?.y ?? y;
  const coppers = section.traces.map((trace, owner): Copper => {
    const { x, widthBottom, widthTop, thickness } = trace;
    const half = [widthBottom / 2, (thickness > 0 ? widthTop : widthBottom) / 2] as const;
    const y = snap(trace.y);
    return {
      owner,
      y,
      top: thickness > 0 ? snap(trace.y + thickness) : y,
      left: [x - half[0], x - half[1]],
      right: [x + half[0], x + half[1]],
    };
  });
  if (section.coplanar) {
    const { gap } = section.coplanar;
    const edge = (pick: (c: Copper) => number, best: (...v: number[]) => number) => {
      const value = best(...coppers.map(pick));
      return coppers.find((c) => pick(c) === value) as Copper;
    };
    const outer = edge((c) => c.right[0], Math.max);
    const inner = edge((c) => c.left[0], Math.min);
    const rightTop = 2 * outer.right[0] + gap - outer.right[1];
    const leftTop = 2 * inner.left[0] - gap - inner.left[1];
    const ground = { owner: GROUND, y: outer.y, top: outer.top };
    coppers.push({ ...ground, left: [outer.right[0] + gap, rightTop], right: [Infinity, Infinity] });
    coppers.push({
      ...ground,
      y: inner.y,
      top: inner.top,
      left: [-Infinity, -Infinity],
      right: [inner.left[0] - gap, leftTop],
    });
  }
  return coppers;
}

/** x of a side at height y. */
export function sideAt(copper: Copper, side: [number, number], y: number): number {
  if (y === copper.y || !Number.isFinite(side[0])) return side[0];
  if (y === copper.top) return side[1];
  return side[0] + ((side[1] - side[0]) * (y - copper.y)) / (copper.top - copper.y);
}
