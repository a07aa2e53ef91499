import { type Drawing, emptyDrawing, type Mark, rect, text } from "./marks";
import { textWidth } from "./text-width";
import { SHOWN_VERDICTS, type ShownVerdict, VERDICT_INK, verdictMark } from "./verdict-mark";

export type VerdictCounts = Partial<Record<ShownVerdict, number>>;

export interface VerdictBarOptions {
  width: number;
  title?: string;
  /** what is counted: "paths" */
  noun?: string;
  /** leave the words under the bar out (the bar's text alternative keeps them) */
  bare?: boolean;
}

const BAR = 14;
/** A count above zero is never too thin to be seen. */
const LEAST = 4;

/** Width of each verdict's piece [px]: in proportion, each at least `LEAST`, together the whole width. */
export function verdictPieces(
  counts: VerdictCounts,
  width: number,
): { verdict: ShownVerdict; count: number; x: number; width: number }[] {
  const present = SHOWN_VERDICTS.map((verdict) => ({
    verdict,
    count: Math.max(counts[verdict] ?? 0, 0),
  })).filter((p) => p.count > 0);
  const total = present.reduce((sum, p) => sum + p.count, 0);
  const small = present.filter((p) => (p.count / total) * width < LEAST);
  const free = width - small.length * LEAST;
  const rest = total - small.reduce((sum, p) => sum + p.count, 0);
  let x = 0;
  return present.map((p) => {
    const w = small.includes(p) ? LEAST : (p.count / rest) * free;
    const piece = { ...p, x, width: w };
    x += w;
    return piece;
  });
}

/** Counts of fail, near, no data, waived and pass in one bar, each with its mark, number and word below. */
export function verdictBar(counts: VerdictCounts, options: VerdictBarOptions): Drawing {
  const { width, noun = "paths", bare = false } = options;
  const title = options.title ?? "Verdicts";
  const pieces = verdictPieces(counts, width);
  if (pieces.length === 0)
    return emptyDrawing(title, `No ${noun} checked yet.`, width, bare ? BAR : BAR + 30);

  const marks: Mark[] = pieces.flatMap((p) => {
    const ink = VERDICT_INK[p.verdict];
    const at = [p.x + (p.x > 0 ? 1 : 0), 0, p.width - (p.x > 0 ? 1 : 0), BAR] as const;
    const hit = { hit: p.verdict, tip: `${p.count} ${p.verdict}` };
    switch (p.verdict) {
      case "waived":
        return [rect(...at, { fill: "hatch-waived", stroke: ink, weight: 1, ...hit })];
      case "no data":
        return [rect(...at, { fill: "sheet", stroke: ink, weight: 1, dash: "2 2", ...hit })];
      case "near":
        return [rect(...at, { fill: ink, fillOpacity: 0.35, stroke: ink, weight: 1, ...hit })];
      default:
        return [rect(...at, { fill: ink, ...hit })];
    }
  });
  let height = BAR;
  if (!bare) {
    let [x, y] = [7, BAR + 20];
    for (const p of pieces) {
      const number = p.count.toLocaleString("en-US");
      const room = 14 + textWidth(`${number} ${p.verdict}`, 13, true) + 18;
      if (x + room - 18 > width && x > 7) [x, y] = [7, y + 22];
      marks.push(
        ...verdictMark(p.verdict, x, y - 4),
        text(
          x + 13,
          y,
          [
            { text: number, weight: 650 },
            { text: ` ${p.verdict}`, ink: VERDICT_INK[p.verdict] },
          ],
          { size: 13 },
        ),
      );
      x += room;
    }
    height = y + 8;
  }
  const total = pieces.reduce((sum, p) => sum + p.count, 0);
  const description = `${total.toLocaleString("en-US")} ${noun}: ${pieces.map((p) => `${p.count.toLocaleString("en-US")} ${p.verdict}`).join(", ")}.`;
  return { width, height, title, description, marks };
}
