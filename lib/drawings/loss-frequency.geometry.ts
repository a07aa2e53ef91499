import { scaleLog } from "@visx/scale";
import { leftAxis, linear, type PlotBox } from "./axis";
import { type Drawing, emptyDrawing, group, line, type Mark, type Point, polyline, text } from "./marks";
import { type LengthUnit, numberText, quantityText, withUnit } from "./number-text";
import { spreadLabels } from "./spread-labels";

/** Loss at a frequency [Hz], [dB/m]. */
export interface LossPoint {
  frequency: number;
  conductor: number;
  dielectric: number;
}

export interface LossFrequencyOptions {
  width: number;
  height?: number;
  title?: string;
  /** mm: dB/m; mil: dB/in */
  unit: LengthUnit;
  /** where the quasi-static solution stops being good [Hz] */
  dispersionFrom?: number | null;
}

const INCH = 0.0254;

const CURVES = [
  { name: "total", of: (p: LossPoint) => p.conductor + p.dielectric, style: { stroke: "ink", weight: 2 } },
  { name: "conductor", of: (p: LossPoint) => p.conductor, style: { stroke: "copper", weight: 1.5 } },
  {
    name: "dielectric",
    of: (p: LossPoint) => p.dielectric,
    style: { stroke: "violet", weight: 1.5, dash: "6 4" },
  },
] as const;

/** Loss per length against frequency, on logarithmic frequency: conductor, dielectric and both together. */
export function lossFrequency(points: readonly LossPoint[], options: LossFrequencyOptions): Drawing {
  const { width, height = 240, unit, dispersionFrom = null } = options;
  const title = options.title ?? "Loss against frequency";
  const sound = points.filter((p) => p.frequency > 0 && Number.isFinite(p.conductor + p.dielectric));
  const [first, last] = [sound[0], sound.at(-1)];
  if (!first || !last || first === last) return emptyDrawing(title, "No loss is known.", width, height);

  const per = lossUnit(unit);
  const box: PlotBox = { left: 58, top: 14, right: width - 88, bottom: height - 30 };
  const x = scaleLog<number>({ domain: [first.frequency, last.frequency], range: [box.left, box.right] });
  const most = Math.max(...sound.map((p) => (p.conductor + p.dielectric) * per.factor));
  const y = linear([0, most * 1.05], [box.bottom, box.top]);
  const values = y.ticks(Math.max((box.bottom - box.top) / 45, 2));
  const step = (values[1] ?? 1) - (values[0] ?? 0);
  const decimals = Math.max(0, -Math.floor(Math.log10(step) + 1e-9));
  const ticks = values.map((value) => ({ value, label: numberText(value, decimals) }));
  const ends = spreadLabels(
    CURVES.map(({ of }) => y(of(last) * per.factor)),
    15,
    box.top - 6,
    box.bottom + 6,
  );
  const marks: Mark[] = [
    ...leftAxis(y, ticks, box),
    text(box.left - 8, box.top - 3, per.name, { anchor: "end", ink: "ink-soft" }),
    ...decades(x, box, first.frequency, last.frequency),
    ...(dispersionFrom !== null && dispersionFrom > first.frequency && dispersionFrom < last.frequency
      ? [
          line(x(dispersionFrom), box.top, x(dispersionFrom), box.bottom, { stroke: "near", dash: "3 3" }),
          text(x(dispersionFrom) - 5, box.top + 10, "dispersion", { ink: "near", anchor: "end", halo: true }),
        ]
      : []),
    group(
      CURVES.map(({ of, style }) =>
        polyline(
          sound.map((p): Point => [x(p.frequency), y(of(p) * per.factor)]),
          style,
        ),
      ).reverse(),
    ),
    ...CURVES.map(({ name, style }, i) =>
      text(box.right + 8, (ends[i] ?? 0) + 4, name, { ink: style.stroke, weight: i === 0 ? 650 : undefined }),
    ),
  ];
  const at = (p: LossPoint): string =>
    `${quantityText(p.frequency, "Hz")} ${lossText(p.conductor + p.dielectric, unit)} (conductor ${lossText(p.conductor, unit)}, dielectric ${lossText(p.dielectric, unit)})`;
  const description = `Loss per length: at ${at(first)}, at ${at(last)}.`;
  return { width, height, title, description, marks };
}

/** The curves as rows, headings first. */
export function lossRows(points: readonly LossPoint[], unit: LengthUnit): (string | number)[][] {
  const per = lossUnit(unit);
  const digits = (value: number): number => Number((value * per.factor).toPrecision(6));
  return [
    ["frequency (Hz)", `conductor (${per.name})`, `dielectric (${per.name})`, `total (${per.name})`],
    ...points.map((p) => [
      Number(p.frequency.toPrecision(7)),
      digits(p.conductor),
      digits(p.dielectric),
      digits(p.conductor + p.dielectric),
    ]),
  ];
}

/** "6.8 dB/m", "0.17 dB/in". */
export function lossText(dbPerMetre: number, unit: LengthUnit): string {
  const per = lossUnit(unit);
  const value = dbPerMetre * per.factor;
  return withUnit(String(Number(value.toPrecision(3))), per.name);
}

function lossUnit(unit: LengthUnit): { name: string; factor: number } {
  return unit === "mm" ? { name: "dB/m", factor: 1 } : { name: "dB/in", factor: INCH };
}

/** Room that a frequency's label needs [px]. */
const LABEL = 56;

/** A line at 1, 2 and 5 of every decade; the decades have their labels first, the others where there is room. */
function decades(x: (f: number) => number, box: PlotBox, from: number, to: number): Mark[] {
  const marks: Mark[] = [line(box.left, box.bottom, box.right, box.bottom, { stroke: "ink-soft" })];
  const steps: { at: number; f: number; whole: boolean }[] = [];
  for (let decade = Math.floor(Math.log10(from) + 1e-9); 10 ** decade <= to; decade++)
    for (const digit of [1, 2, 5]) {
      const f = digit * 10 ** decade;
      if (f >= from * (1 - 1e-9) && f <= to * (1 + 1e-9)) steps.push({ at: x(f), f, whole: digit === 1 });
    }
  const labelled: number[] = [];
  for (const { at, f, whole } of [...steps.filter((s) => s.whole), ...steps.filter((s) => !s.whole)]) {
    marks.push(line(at, box.top, at, box.bottom, { stroke: "rule-line", opacity: whole ? 1 : 0.5 }));
    if (labelled.some((other) => Math.abs(other - at) < LABEL)) continue;
    labelled.push(at);
    const words = quantityText(f, "Hz").replace(/\.0+(?=\u2009)/, "");
    marks.push(text(at, box.bottom + 18, words, { anchor: "middle", ink: "ink-soft" }));
  }
  return marks;
}
