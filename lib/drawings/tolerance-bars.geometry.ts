import { linear } from "./axis";
import { type Drawing, emptyDrawing, line, type Mark, rect, text } from "./marks";
import { numberText, withUnit } from "./number-text";
import { textWidth } from "./text-width";

/** What one tolerance makes of the spread. */
export interface ToleranceShare {
  name: string;
  /** of the variance, as a fraction */
  share: number;
  /** [Ω] */
  ohms: number;
}

export interface ToleranceBarsOptions {
  width: number;
  title?: string;
}

const ROW = 22;
const SIZE = 12;
/** Shares below this are one bar together. */
const SMALL = 0.005;

/** One bar a tolerance, the largest first: its share of the variance, and the ohms it makes. */
export function toleranceBars(shares: readonly ToleranceShare[], options: ToleranceBarsOptions): Drawing {
  const { width } = options;
  const title = options.title ?? "Which tolerance matters most";
  const sorted = [...shares].filter(({ share }) => Number.isFinite(share)).sort((a, b) => b.share - a.share);
  const shown = sorted.filter(({ share }, i) => share >= SMALL || i === 0);
  if (shown.length === 0) return emptyDrawing(title, "No tolerance was varied.", width, 2 * ROW);

  const height = shown.length * ROW + 4;
  const longest = Math.max(...shown.map(({ name }) => textWidth(name, SIZE)));
  const nameWidth = Math.min(longest + 10, width * 0.5);
  // the longest bar leaves room for its own words only
  const most = Math.max(...shown.map(({ share }) => share));
  const x = linear([0, most], [nameWidth, Math.max(width - 104, nameWidth + 24)]);
  const marks: Mark[] = shown.flatMap((entry, i): Mark[] => {
    const y = 2 + i * ROW;
    return [
      text(nameWidth - 8, y + 15, fitted(entry.name, nameWidth - 8), { anchor: "end", tip: entry.name }),
      rect(x(0), y + 4, Math.max(x(entry.share) - x(0), 1), ROW - 8, { fill: "copper", fillOpacity: 0.75 }),
      text(x(entry.share) + 6, y + 15, words(entry)),
    ];
  });
  marks.push(line(x(0), 2, x(0), height - 2, { stroke: "ink-soft" }));
  const left = sorted.length - shown.length;
  const description = `${shown.map((entry) => `${entry.name}: ${words(entry)}`).join("; ")}.${left > 0 ? ` ${left} more below half a per cent.` : ""}`;
  return { width, height, title, description, marks };
}

/** The shares as rows, headings first. */
export function toleranceRows(shares: readonly ToleranceShare[]): (string | number)[][] {
  return [
    ["tolerance", "share of variance (%)", "spread by it (Ω)"],
    ...shares.map((s) => [s.name, Number((100 * s.share).toPrecision(5)), Number(s.ohms.toPrecision(5))]),
  ];
}

/** A name cut to its room. */
function fitted(name: string, room: number): string {
  if (textWidth(name, SIZE) <= room) return name;
  let cut = name;
  while (cut.length > 1 && textWidth(`${cut}…`, SIZE) > room) cut = cut.slice(0, -1);
  return `${cut.trimEnd()}…`;
}

const words = ({ share, ohms }: ToleranceShare): string =>
  `${withUnit(numberText(100 * share, share < 0.0995 ? 1 : 0), "%")}, ±${withUnit(numberText(Math.abs(ohms), 1), "Ω")}`;
