import {
  bottomAxis,
  type Domain,
  leftAxis,
  linear,
  padded,
  type PlotBox,
  type Scale,
  ticksFor,
} from "./axis";
import { circle, type Drawing, emptyDrawing, group, line, type Mark, type Point, polyline } from "./marks";
import { textWidth } from "./text-width";
import { extent, type Samples, thinned, voltsAt } from "./wave-samples";
import { type WaveRole, waveStyle } from "./wave-style";
import { endNames, LABEL, limitNames, worstNotes } from "./waveform-labels";
import { bands, findViolations, shade, type Violation } from "./waveform-violations";
import { describeWaveforms } from "./waveform-words";

export interface WaveProbe extends Samples {
  id: string;
  label: string;
  role?: WaveRole;
}

/** A rule's limit on the voltage, drawn where it holds. */
export interface LimitLine {
  id: string;
  /** the rule's name, as shown at the line */
  label: string;
  volts: number;
  /** "max": the voltage may not pass above it; "min": not below */
  side: "max" | "min";
  /** when it holds [s]; always, if left out */
  from?: number;
  to?: number;
  /** probes it judges; all but sources, if left out */
  probes?: readonly string[];
  /** a threshold or rail that is only shown, not judged */
  reference?: boolean;
}

export interface WaveformOptions {
  width: number;
  height?: number;
  title?: string;
  /** the probe that is drawn strongest; the first, if left out */
  focus?: string;
  /** the part of the time that is shown [s] */
  span?: Domain;
  /** the voltages that are shown; all, if left out */
  volts?: Domain;
}

export interface WaveformDrawing extends Drawing {
  box: PlotBox;
  span: Domain;
  violations: Violation[];
  /** pixels of a time and of a voltage, and back */
  x: (seconds: number) => number;
  y: (volts: number) => number;
  timeAt: (pixel: number) => number;
}

/** Voltages of several probes over time, with limits, what passes them, and a name at each line's end. */
export function waveformChart(
  probes: readonly WaveProbe[],
  limits: readonly LimitLine[],
  options: WaveformOptions,
): WaveformDrawing {
  const { width, height = 300 } = options;
  const title = options.title ?? "Waveforms";
  const range = extent(probes);
  const times = probes.flatMap((p) =>
    p.time.length > 0 ? [p.time[0] ?? 0, p.time[p.time.length - 1] ?? 0] : [],
  );
  const span: Domain = options.span ?? [Math.min(...times), Math.max(...times)];
  if (!range || !(span[1] > span[0]) || !span.every(Number.isFinite)) return nothing(title, width, height);

  const sound = limits.filter((l) => Number.isFinite(l.volts));
  const volts =
    options.volts ??
    padded(
      Math.min(range.low, ...sound.map((l) => l.volts)),
      Math.max(range.high, ...sound.map((l) => l.volts)),
      0.1,
    );
  const endRoom = Math.max(...probes.map((p) => textWidth(p.label, LABEL, true)), 40);
  const box: PlotBox = {
    left: 62,
    top: 12,
    right: width - Math.min(endRoom + 20, width * 0.3),
    bottom: height - 30,
  };
  const x = linear(span, [box.left, box.right]);
  const y = linear(volts, [box.bottom, box.top]);
  const focus = probes.find((p) => p.id === options.focus)?.id ?? probes[0]?.id ?? "";
  const violations = findViolations(probes, sound, span);

  const names = limitNames(sound, violations, x, y, box);
  const inside = { x: box.left, y: box.top, width: box.right - box.left, height: box.bottom - box.top };
  const marks: Mark[] = [
    ...leftAxis(y, ticksFor(volts, (box.bottom - box.top) / 44, "V").ticks, box),
    ...bottomAxis(x, ticksFor(span, (box.right - box.left) / 90, "s").ticks, box),
    group(
      [
        ...bands(violations, x, box),
        ...violations.flatMap((v) => shade(v, v.probe === focus, x, y)),
        ...sound.map((l) => limitLine(l, x, y, box)),
        ...[...probes]
          .sort((a, b) => Number(a.id === focus) - Number(b.id === focus))
          .map((p) => curve(p, p.id === focus, span, x, y, box)),
      ],
      { clip: inside },
    ),
    ...names,
    ...worstNotes(violations, x, y, box, names),
    ...endNames(probes, focus, span, y, box),
  ];
  return {
    width,
    height,
    title,
    description: describeWaveforms(probes, sound, violations, span),
    marks,
    box,
    span,
    violations,
    x: (s) => x(s),
    y: (v) => y(v),
    timeAt: (pixel) => Math.min(Math.max(x.invert(pixel), span[0]), span[1]),
  };
}

/** What moves with the cursor: its line and a dot on each wave. */
export function waveformCursor(
  drawing: WaveformDrawing,
  probes: readonly WaveProbe[],
  time: number | null,
): Mark[] {
  if (time === null || drawing.empty || time < drawing.span[0] || time > drawing.span[1]) return [];
  const x = drawing.x(time);
  const dots = probes.flatMap((p) => {
    const v = voltsAt(p, time);
    return v === null
      ? []
      : [circle(x, drawing.y(v), 3.5, { fill: "sheet", stroke: waveStyle(p.role).stroke, weight: 1.75 })];
  });
  return [
    line(x, drawing.box.top, x, drawing.box.bottom, { stroke: "ink", weight: 1, opacity: 0.7 }),
    ...dots,
  ];
}

function nothing(title: string, width: number, height: number): WaveformDrawing {
  const box = { left: 0, top: 0, right: width, bottom: height };
  const flat = () => 0;
  return {
    ...emptyDrawing(title, "No waveform to show.", width, height),
    box,
    span: [0, 0],
    violations: [],
    x: flat,
    y: flat,
    timeAt: flat,
  };
}

function limitLine(limit: LimitLine, x: Scale, y: Scale, box: PlotBox): Mark {
  const from = limit.from === undefined ? box.left : x(limit.from);
  const to = limit.to === undefined ? box.right : x(limit.to);
  return line(from, y(limit.volts), to, y(limit.volts), {
    stroke: limit.reference ? "ink-soft" : "fail",
    weight: limit.reference ? 0.9 : 1.1,
    dash: limit.reference ? "2 3" : "7 3",
  });
}

function curve(p: WaveProbe, focused: boolean, span: Domain, x: Scale, y: Scale, box: PlotBox): Mark {
  const points = thinned(p, span[0], span[1], Math.ceil(box.right - box.left)).map(([t, v]): Point => [
    x(t),
    y(v),
  ]);
  return polyline(points, { ...waveStyle(p.role, focused), hit: p.id });
}
