import type { CrossSection } from "@/lib/si/cross-section";
import { equipotentials, fieldSolution } from "@/lib/si/field";
import { attempt, type Outcome } from "./engine-line";
import { remembered } from "./engine-memo";

/** Lines of equal potential of a section, for its drawing. */
export interface FieldJob {
  kind: "line-field";
  section: CrossSection;
  /** what is drawn [m] */
  window: { left: number; right: number; bottom: number; top: number };
}

export interface FieldLines {
  /** that they belong to */
  section: CrossSection;
  lines: { level: number; points: [x: number, y: number][] }[];
}

/** Cells across the window: a line's place is good to a tenth of one. */
const CELLS = 110;
/** Of the trace's voltage; of a pair, which is driven oppositely, with both signs. */
const LEVELS = [0.1, 0.2, 0.3, 0.4, 0.5, 0.6, 0.7, 0.8, 0.9];

export function fieldLines({ section, window }: FieldJob): Outcome<FieldLines> {
  return attempt(() => ({
    section,
    lines: remembered(["field", section, window], () => {
      const pair = section.traces.length === 2;
      const levels = pair ? LEVELS.flatMap((level) => [-level, level]) : LEVELS;
      return equipotentials(
        fieldSolution(section, { accuracy: "live" }),
        levels,
        window,
        CELLS,
        pair ? "odd" : "single",
      ).map(({ level, points }) => ({
        level,
        points: points.map(({ x, y }): [number, number] => [x, y]),
      }));
    }),
  }));
}
