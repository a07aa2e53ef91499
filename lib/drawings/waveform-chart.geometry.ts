import { bottomAxis, type Domain, leftAxis, linear, padded, type PlotBox, ticksFor } from "./axis";
import {
  circle,
  type Drawing,
  emptyDrawing,
  group,
  line,
  type Mark,
  type Point,
  polygon,
  polyline,
  rect,
  text,
} from "./marks";
import { voltsText } from "./number-text";
import type { Ink } from "./palette";
import { spreadLabels } from "./spread-labels";
import { textWidth } from "./text-width";
import { type Excess, excesses, extent, type Samples, thinned, voltsAt } from "./wave-samples";
import { describeWaveforms } from "./waveform-words";

/** total: ink; incident: copper; reflected: violet, dashed; source: ink, thin and dotted. */
export type WaveRole = "total" | "incident" | "reflected" | "source";

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

export interface Violation extends Excess {
  probe: string;
  limit: string;
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

const LABEL = 12;
const ROW = 15;

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
    );
  const names = Math.max(...probes.map((p) => textWidth(p.label, LABEL, true)), 40);
  const box: PlotBox = {
    left: 62,
    top: 12,
    right: width - Math.min(names + 20, width * 0.3),
    bottom: height - 30,
  };
  const x = linear(span, [box.left, box.right]);
  const y = linear(volts, [box.bottom, box.top]);
  const focus = probes.find((p) => p.id === options.focus)?.id ?? probes[0]?.id ?? "";
  const violations = findViolations(probes, sound, span);

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
    ...limitNames(sound, violations, y, box),
    ...worstNotes(violations, x, y, box),
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

/** The look of a wave by what it is; one that is not in focus stands back. */
export function waveStyle(
  role: WaveRole = "total",
  focused = true,
): { stroke: Ink; weight: number; dash?: string; opacity?: number } {
  const opacity = focused ? undefined : 0.55;
  switch (role) {
    case "total":
      return { stroke: "ink", weight: focused ? 2 : 1.4, opacity };
    case "incident":
      return { stroke: "copper", weight: 1.5, opacity };
    case "reflected":
      return { stroke: "violet", weight: 1.5, dash: "5 3", opacity };
    case "source":
      return { stroke: "ink-soft", weight: 1.2, dash: "1.5 3" };
  }
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

function findViolations(
  probes: readonly WaveProbe[],
  limits: readonly LimitLine[],
  span: Domain,
): Violation[] {
  return limits
    .filter((l) => !l.reference)
    .flatMap((l) =>
      probes
        .filter((p) => (l.probes ? l.probes.includes(p.id) : p.role === undefined || p.role === "total"))
        .flatMap((p) =>
          excesses(
            p,
            l.volts,
            l.side,
            Math.max(l.from ?? span[0], span[0]),
            Math.min(l.to ?? span[1], span[1]),
          ).map((e) => ({ ...e, probe: p.id, limit: l.id })),
        ),
    );
}

type Scale = ReturnType<typeof linear>;

/** Spans in which any limit is passed, as bands; overlapping ones are one. */
function bands(violations: readonly Violation[], x: Scale, box: PlotBox): Mark[] {
  const spans: [number, number][] = [];
  for (const v of [...violations].sort((a, b) => a.from - b.from)) {
    const last = spans.at(-1);
    if (last && v.from <= last[1]) last[1] = Math.max(last[1], v.to);
    else spans.push([v.from, v.to]);
  }
  return spans.map(([from, to]) =>
    rect(x(from), box.top, Math.max(x(to) - x(from), 1), box.bottom - box.top, {
      fill: "fail",
      fillOpacity: 0.07,
    }),
  );
}

/** What is past the limit: hatched for the wave in focus, tinted for the others. */
function shade(v: Violation, focused: boolean, x: Scale, y: Scale): Mark[] {
  const outline = v.outline.map(([t, u]): Point => [x(t), y(u)]);
  return [
    polygon(outline, { fill: "fail", fillOpacity: focused ? 0.16 : 0.08 }),
    ...(focused ? [polygon(outline, { fill: "hatch-fail" })] : []),
  ];
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

/** Each limit's name on its outer side, at the left, where waves have not yet started to ring. */
function limitNames(
  limits: readonly LimitLine[],
  violations: readonly Violation[],
  y: Scale,
  box: PlotBox,
): Mark[] {
  const wanted = limits.map((l) => y(l.volts) + (l.side === "max" ? -10 : 10));
  const rows = spreadLabels(wanted, ROW, box.top, box.bottom);
  return limits.map((l, i) => {
    const broken = violations.some((v) => v.limit === l.id);
    return text(box.left + 8, (rows[i] ?? 0) + 4, `${l.label} ${voltsText(l.volts)}`, {
      ink: l.reference ? "ink-soft" : "fail",
      weight: broken ? 650 : 400,
      halo: true,
    });
  });
}

/** How far past the limit, at the worst point of each limit. */
function worstNotes(violations: readonly Violation[], x: Scale, y: Scale, box: PlotBox): Mark[] {
  const worst = new Map<string, Violation>();
  for (const v of violations) {
    const known = worst.get(v.limit);
    if (!known || v.worst.past > known.worst.past) worst.set(v.limit, v);
  }
  return [...worst.values()].flatMap((v) => {
    const [cx, cy] = [x(v.worst.time), y(v.worst.volts)];
    const words = `${voltsText(v.worst.past)} past`;
    const room = textWidth(words, LABEL, true) + 12;
    const leftward = cx + room > box.right;
    return [
      circle(cx, cy, 3, { fill: "fail" }),
      text(leftward ? cx - 8 : cx + 8, Math.min(Math.max(cy + 4, box.top + 10), box.bottom - 4), words, {
        ink: "fail",
        weight: 650,
        anchor: leftward ? "end" : "start",
        halo: true,
      }),
    ];
  });
}

/** The name of each wave at its end, moved apart where ends meet. */
function endNames(probes: readonly WaveProbe[], focus: string, span: Domain, y: Scale, box: PlotBox): Mark[] {
  const ends = probes.flatMap((p) => {
    const v = voltsAt(p, span[1]);
    return v === null ? [] : [{ p, y: Math.min(Math.max(y(v), box.top), box.bottom) }];
  });
  const rows = spreadLabels(
    ends.map((e) => e.y),
    ROW,
    box.top,
    box.bottom,
  );
  return ends.flatMap(({ p, y: at }, i) => {
    const row = rows[i] ?? at;
    const style = waveStyle(p.role, p.id === focus);
    return [
      polyline(
        [
          [box.right + 1, at],
          [box.right + 6, at],
          [box.right + 12, row],
        ],
        { ...style, weight: 1 },
      ),
      text(box.right + 15, row + 4, p.label, { ink: style.stroke, weight: p.id === focus ? 650 : 400 }),
    ];
  });
}
