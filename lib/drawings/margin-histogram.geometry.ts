import { linear, type PlotBox } from "./axis";
import { type Drawing, emptyDrawing, line, type Mark, rect, text } from "./marks";
import { numberText, withUnit } from "./number-text";

export interface MarginHistogramOptions {
  width: number;
  height?: number;
  title?: string;
  /** of the margins: "mV", "ps", "%" */
  unit: string;
  /** margins from zero to this pass only nearly */
  near?: number;
}

export interface Bin {
  from: number;
  to: number;
  count: number;
}

const MOST_BINS = 24;

/** Bins of a round width with an edge at zero, so that no bar holds both a pass and a failure. */
export function marginBins(margins: readonly number[], most = MOST_BINS): Bin[] {
  const sound = margins.filter(Number.isFinite);
  if (sound.length === 0) return [];
  let [low, high] = [0, 0];
  for (const m of sound) {
    low = Math.min(low, m);
    high = Math.max(high, m);
  }
  const raw =
    (high - low || Math.abs(high) || 1) / Math.min(most, Math.max(6, Math.ceil(Math.sqrt(sound.length)) * 2));
  const decade = 10 ** Math.floor(Math.log10(raw));
  const step = [1, 2, 2.5, 5, 10].map((n) => n * decade).find((s) => s >= raw * (1 - 1e-9)) ?? raw;
  const first = Math.floor(low / step + 1e-9);
  const last = Math.max(Math.ceil(high / step - 1e-9), first + 1);
  const bins = Array.from({ length: last - first }, (_, i): Bin => ({
    from: (first + i) * step,
    to: (first + i + 1) * step,
    count: 0,
  }));
  for (const m of sound) {
    const bin = bins[Math.min(Math.max(Math.floor(m / step) - first, 0), bins.length - 1)];
    if (bin) bin.count++;
  }
  return bins;
}

/** How margins are spread: failures left of zero, hatched; near ones outlined; the rest solid. */
export function marginHistogram(
  margins: readonly number[],
  options: MarginHistogramOptions,
): Drawing & { bins: Bin[] } {
  const { width, height = 96, unit, near = 0 } = options;
  const title = options.title ?? "Margins";
  const bins = marginBins(margins);
  const [first, last] = [bins[0], bins.at(-1)];
  if (!first || !last) return { ...emptyDrawing(title, "No margin is known.", width, height), bins };

  const box: PlotBox = { left: 6, top: 18, right: width - 6, bottom: height - 22 };
  const x = linear([first.from, last.to], [box.left, box.right]);
  const most = Math.max(...bins.map((b) => b.count));
  const y = linear([0, most], [box.bottom, box.top]);
  const fails = margins.filter((m) => m < 0).length;
  const nears = margins.filter((m) => m >= 0 && m < near).length;
  const known = margins.filter(Number.isFinite).length;
  const bars = bins
    .filter((b) => b.count > 0)
    .flatMap((b): Mark[] => {
      const [left, right] = [x(b.from) + 0.75, x(b.to) - 0.75];
      const top = Math.min(y(b.count), box.bottom - 2);
      const tip = `${numberText(b.from, 0)} to ${withUnit(numberText(b.to, 0), unit)}: ${b.count}`;
      const at = [left, top, right - left, box.bottom - top] as const;
      if (b.to <= 0)
        return [
          rect(...at, { fill: "fail", fillOpacity: 0.18 }),
          rect(...at, { fill: "hatch-fail", stroke: "fail", tip }),
        ];
      if (b.to <= near) return [rect(...at, { fill: "near", fillOpacity: 0.15, stroke: "near", tip })];
      return [rect(...at, { fill: "pass", fillOpacity: 0.7, tip })];
    });
  const label = (value: number): string =>
    withUnit(numberText(value, Math.abs(last.to - first.from) < 10 ? 1 : 0), unit);
  const marks: Mark[] = [
    ...bars,
    line(box.left, box.bottom, box.right, box.bottom, { stroke: "ink-soft" }),
    line(x(0), box.top - 4, x(0), box.bottom + 4, { stroke: "ink", weight: 1.25 }),
    text(x(0) + (x(0) > width / 2 ? -5 : 5), 12, "limit", {
      ink: "ink-soft",
      anchor: x(0) > width / 2 ? "end" : "start",
    }),
    ...(x(0) - box.left > 40 ? [text(box.left, height - 6, label(first.from), { ink: "ink-soft" })] : []),
    ...(box.right - x(0) > 40
      ? [text(box.right, height - 6, label(last.to), { ink: "ink-soft", anchor: "end" })]
      : []),
  ];
  const description = `${known} margins from ${label(Math.min(...margins.filter(Number.isFinite)))} to ${label(Math.max(...margins.filter(Number.isFinite)))}: ${fails} fail, ${nears} near, ${known - fails - nears} pass.`;
  return { width, height, title, description, marks, bins };
}
