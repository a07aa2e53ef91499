import { bottomAxis, linear, type PlotBox } from "./axis";
import { type Drawing, emptyDrawing, line, type Mark, rect, text } from "./marks";
import { numberText, ohmsText, withUnit } from "./number-text";

/** Samples between two impedances [Ω]. */
export interface ImpedanceBin {
  from: number;
  to: number;
  count: number;
}

export interface SpreadHistogramOptions {
  width: number;
  height?: number;
  title?: string;
  target: { ohms: number; tolerance: number /* fraction */ };
  /** 0.5th and 99.5th percentile [Ω] */
  low: number;
  high: number;
}

/** Production's impedances as bars; those outside the tolerance hatched; target and limits as lines. */
export function spreadHistogram(bins: readonly ImpedanceBin[], options: SpreadHistogramOptions): Drawing {
  const { width, height = 160, target, low, high } = options;
  const title = options.title ?? "Spread of production";
  const total = bins.reduce((sum, b) => sum + b.count, 0);
  const [first, last] = [bins[0], bins.at(-1)];
  if (!first || !last || !(total > 0)) return emptyDrawing(title, "Nothing was sampled.", width, height);

  const least = target.ohms * (1 - target.tolerance);
  const most = target.ohms * (1 + target.tolerance);
  const from = Math.min(first.from, least - 0.15 * (most - least));
  const to = Math.max(last.to, most + 0.15 * (most - least));
  const box: PlotBox = { left: 8, top: 22, right: width - 8, bottom: height - 24 };
  const x = linear([from, to], [box.left, box.right]);
  const y = linear([0, Math.max(...bins.map((b) => b.count))], [box.bottom, box.top + 6]);
  const ticks = x
    .ticks(Math.max(Math.round((box.right - box.left) / 80), 3))
    .map((value) => ({ value, label: withUnit(String(Number(value.toFixed(2))), "Ω") }))
    .filter(({ value }) => x(value) > box.left + 14 && x(value) < box.right - 14);
  const bars = bins
    .filter((b) => b.count > 0)
    .flatMap((b) => barOf(b, { least, most }, total, { x, y, box }));
  const marks: Mark[] = [
    rect(x(least), box.top, x(most) - x(least), box.bottom - box.top, { fill: "pass", fillOpacity: 0.1 }),
    ...bars,
    ...bottomAxis(x, ticks, box, false),
    ...[least, most].map((v) =>
      line(x(v), box.top - 2, x(v), box.bottom, { stroke: "pass", weight: 1, dash: "7 3" }),
    ),
    line(x(target.ohms), box.top - 2, x(target.ohms), box.bottom, { stroke: "pass", weight: 1 }),
    text(x(target.ohms), 13, `${ohmsText(target.ohms)} ±\u2009${percentText(target.tolerance)}`, {
      ink: "pass",
      anchor: "middle",
    }),
  ];
  const outside = bins.reduce((sum, b) => {
    const within = Math.max(0, Math.min(b.to, most) - Math.max(b.from, least)) / (b.to - b.from);
    return sum + b.count * (1 - within);
  }, 0);
  const description =
    `99\u2009% of production is predicted between ${ohmsText(low)} and ${ohmsText(high)}; the tolerance runs from ${ohmsText(least)} to ${ohmsText(most)}. ` +
    `About ${numberText((100 * outside) / total, 1)}\u2009% lies outside.`;
  return { width, height, title, description, marks };
}

/** The bins as rows, headings first. */
export function histogramRows(bins: readonly ImpedanceBin[]): (string | number)[][] {
  return [
    ["from (Ω)", "to (Ω)", "samples"],
    ...bins.map((b) => [Number(b.from.toPrecision(7)), Number(b.to.toPrecision(7)), b.count]),
  ];
}

interface Plot {
  x: (value: number) => number;
  y: (value: number) => number;
  box: PlotBox;
}

/** A bar, cut where a limit goes through it. */
function barOf(
  bin: ImpedanceBin,
  { least, most }: { least: number; most: number },
  total: number,
  { x, y, box }: Plot,
): Mark[] {
  const top = Math.min(y(bin.count), box.bottom - 1);
  const tip = `${numberText(bin.from, 1)} to ${withUnit(numberText(bin.to, 1), "Ω")}: ${numberText((100 * bin.count) / total, 1)}\u2009%`;
  const cuts = [bin.from, ...[least, most].filter((v) => v > bin.from && v < bin.to), bin.to];
  return cuts.slice(1).flatMap((end, i): Mark[] => {
    const start = cuts[i] ?? bin.from;
    const [left, right] = [x(start) + (start === bin.from ? 0.5 : 0), x(end) - (end === bin.to ? 0.5 : 0)];
    const at = [left, top, Math.max(right - left, 0.5), box.bottom - top] as const;
    const middle = (start + end) / 2;
    return middle >= least && middle <= most
      ? [rect(...at, { fill: "copper", fillOpacity: 0.75, tip })]
      : [
          rect(...at, { fill: "fail", fillOpacity: 0.18 }),
          rect(...at, { fill: "hatch-fail", stroke: "fail", weight: 0.75, tip }),
        ];
  });
}

const percentText = (fraction: number): string => withUnit(String(Number((100 * fraction).toFixed(1))), "%");
