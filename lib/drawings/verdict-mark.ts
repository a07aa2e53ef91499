import { circle, line, type Mark, polygon, polyline, rect } from "./marks";
import type { Ink } from "./palette";

/** What a judged thing may be; waived is a failure that a reviewer accepted. */
export type ShownVerdict = "pass" | "near" | "fail" | "no data" | "waived";
export const SHOWN_VERDICTS: readonly ShownVerdict[] = ["fail", "near", "no data", "waived", "pass"];

export const VERDICT_INK: Record<ShownVerdict, Ink> = {
  pass: "pass",
  near: "near",
  fail: "fail",
  "no data": "ink-soft",
  waived: "waived",
};

/**
 * The shape of a verdict, so that it is told without colour: pass a ticked ring, near a triangle,
 * fail a solid square with a cross, no data a dashed ring, waived a hatched square.
 */
export function verdictMark(verdict: ShownVerdict, cx: number, cy: number, r = 6): Mark[] {
  const ink = VERDICT_INK[verdict];
  switch (verdict) {
    case "pass":
      return [
        circle(cx, cy, r, { fill: "sheet", stroke: ink, weight: 1.5 }),
        polyline(
          [
            [cx - r * 0.5, cy],
            [cx - r * 0.1, cy + r * 0.42],
            [cx + r * 0.52, cy - r * 0.42],
          ],
          { stroke: ink, weight: 1.5 },
        ),
      ];
    case "near":
      return [
        polygon(
          [
            [cx, cy - r],
            [cx + r * 1.05, cy + r * 0.85],
            [cx - r * 1.05, cy + r * 0.85],
          ],
          { fill: "sheet", stroke: ink, weight: 1.5 },
        ),
        line(cx, cy - r * 0.4, cx, cy + r * 0.5, { stroke: ink, weight: 1.5 }),
      ];
    case "fail": {
      const d = r * 0.45;
      return [
        rect(cx - r, cy - r, 2 * r, 2 * r, { fill: ink, radius: 1 }),
        line(cx - d, cy - d, cx + d, cy + d, { stroke: "sheet", weight: 1.6 }),
        line(cx - d, cy + d, cx + d, cy - d, { stroke: "sheet", weight: 1.6 }),
      ];
    }
    case "waived":
      return [rect(cx - r, cy - r, 2 * r, 2 * r, { fill: "hatch-waived", stroke: ink, weight: 1.2 })];
    case "no data":
      return [circle(cx, cy, r, { fill: "sheet", stroke: ink, weight: 1.3, dash: "2 2" })];
  }
}
