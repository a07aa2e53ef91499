import { bottomAxis, type Domain, linear, padded, type PlotBox } from "./axis";
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
import { lengthText, type LengthUnit, numberText, ohmsText, withUnit } from "./number-text";

/** Impedance at a foot width; low and high are its spread by manufacturing. */
export interface WidthPoint {
  /** [m] */
  width: number;
  /** [Ω] */
  impedance: number;
  low?: number;
  high?: number;
}

export interface ImpedanceWidthOptions {
  width: number;
  height?: number;
  title?: string;
  unit: LengthUnit;
  target?: { ohms: number; tolerance: number /* fraction */ } | null;
  /** the width now chosen [m] */
  chosen?: number | null;
  /** step of widths [m]: marked along the axis where they have room */
  grid?: number | null;
  /** least width that is etched [m] */
  least?: number | null;
}

/** Impedance against foot width, its spread as a band, the target's tolerance as another, the chosen width marked. */
export function impedanceWidth(
  points: readonly WidthPoint[],
  options: ImpedanceWidthOptions,
): Drawing & { box: PlotBox; widthAt: (pixel: number) => number; chosenOhms: number | null } {
  const { width, height = 240, unit, target, chosen, grid, least } = options;
  const title = options.title ?? "Impedance against width";
  const sound = points
    .filter((p) => p.width > 0 && Number.isFinite(p.impedance))
    .sort((a, b) => a.width - b.width);
  const [first, last] = [sound[0], sound.at(-1)];
  const box: PlotBox = { left: 54, top: 14, right: width - 88, bottom: height - 30 };
  if (!first || !last || first === last)
    return {
      ...emptyDrawing(title, "Not enough widths were computed.", width, height),
      box,
      widthAt: () => 0,
      chosenOhms: null,
    };

  const metre = unit === "mm" ? 1e-3 : 25.4e-6;
  const x = linear([first.width / metre, last.width / metre], [box.left, box.right]);
  const lows = sound.map((p) => p.low ?? p.impedance);
  const highs = sound.map((p) => p.high ?? p.impedance);
  const goal: Domain | null = target
    ? [target.ohms * (1 - target.tolerance), target.ohms * (1 + target.tolerance)]
    : null;
  const y = linear(padded(Math.min(...lows, ...(goal ?? [])), Math.max(...highs, ...(goal ?? []))), [
    box.bottom,
    box.top,
  ]);
  const at = (p: WidthPoint, z: number): Point => [x(p.width / metre), y(z)];

  const span = (last.width - first.width) / metre;
  const decimals = span < 0.05 ? 3 : span < 5 ? 2 : 0;
  const ticks = x
    .ticks(Math.max(Math.round((box.right - box.left) / 90), 2))
    .map((v) => ({ value: v, label: withUnit(numberText(v, decimals), unit) }));
  const ohms = chosen && chosen >= first.width && chosen <= last.width ? between(sound, chosen) : null;
  const marks: Mark[] = [
    ...y
      .ticks((box.bottom - box.top) / 40)
      .flatMap((v) => [
        line(box.left, y(v), box.right, y(v), { stroke: "rule-line" }),
        text(box.left - 8, y(v) + 4, ohmsText(v), { anchor: "end", ink: "ink-soft" }),
      ]),
    ...bottomAxis(x, ticks, box),
    ...(grid ? gridSteps(grid, [first.width, last.width], (m) => x(m / metre), box) : []),
    ...(least && least > first.width ? leastWidth(x(Math.min(least, last.width) / metre), box) : []),
    ...(goal && target ? goalBand(goal, target, y, box) : []),
    group(
      [
        polygon(
          [
            ...sound.map((p) => at(p, p.high ?? p.impedance)),
            ...[...sound].reverse().map((p) => at(p, p.low ?? p.impedance)),
          ],
          { fill: "copper", fillOpacity: 0.18 },
        ),
        polyline(
          sound.map((p) => at(p, p.impedance)),
          { stroke: "ink", weight: 2 },
        ),
      ],
      { clip: { x: box.left, y: box.top, width: box.right - box.left, height: box.bottom - box.top } },
    ),
  ];
  if (chosen && ohms !== null) {
    const [cx, cy] = [x(chosen / metre), y(ohms)];
    const leftward = cx > (box.left + box.right) / 2;
    marks.push(
      line(cx, cy, cx, box.bottom, { stroke: "ink", dash: "3 3" }),
      circle(cx, cy, 4.5, { fill: "sheet", stroke: "ink", weight: 2 }),
      text(cx + (leftward ? -9 : 9), cy - 8, `${ohmsText(ohms)} at ${lengthText(chosen, unit)}`, {
        weight: 650,
        halo: true,
        anchor: leftward ? "end" : "start",
      }),
    );
  }
  const description = [
    `Impedance falls from ${ohmsText(first.impedance)} at foot width ${lengthText(first.width, unit)} to ${ohmsText(last.impedance)} at ${lengthText(last.width, unit)}.`,
    target ? `Target ${ohmsText(target.ohms)} ± ${numberText(target.tolerance * 100, 0)}\u2009%.` : "",
    least ? `Widths below ${lengthText(least, unit)} are not etched.` : "",
    chosen && ohms !== null ? `Chosen: ${lengthText(chosen, unit)}, ${ohmsText(ohms)}.` : "",
  ]
    .filter((s) => s !== "")
    .join(" ");
  return {
    width,
    height,
    title,
    description,
    marks,
    box,
    chosenOhms: ohms,
    widthAt: (pixel) => x.invert(Math.min(Math.max(pixel, box.left), box.right)) * metre,
  };
}

/** Below this distance steps of the grid run together [px]. */
const STEP_ROOM = 2.5;

function gridSteps(grid: number, [from, to]: Domain, at: (metres: number) => number, box: PlotBox): Mark[] {
  const every = [1, 2, 5, 10, 20, 50, 100].find((n) => at(n * grid) - at(0) >= STEP_ROOM);
  if (!every) return [];
  const first = Math.ceil(from / (grid * every) - 1e-9);
  const count = Math.floor(to / (grid * every) + 1e-9) - first + 1;
  return Array.from({ length: Math.max(count, 0) }, (_, i) => {
    const x = at((first + i) * grid * every);
    return line(x, box.bottom - 4, x, box.bottom, { stroke: "ink-soft", weight: 0.5 });
  });
}

/** What is too narrow to be etched, hatched. */
function leastWidth(x: number, box: PlotBox): Mark[] {
  const room = x - box.left;
  return [
    rect(box.left, box.top, room, box.bottom - box.top, { fill: "hatch-soft" }),
    line(x, box.top, x, box.bottom, { stroke: "near", weight: 1, dash: "3 3" }),
    text(x + 5, box.bottom - 8, "least etched", { ink: "near", halo: true }),
  ];
}

/** The curve as rows, headings first. */
export function curveRows(points: readonly WidthPoint[], unit: LengthUnit): (string | number | null)[][] {
  const digits = (value: number | undefined): number | null =>
    value === undefined ? null : Number(value.toPrecision(6));
  return [
    [`width (${unit})`, "impedance (Ω)", "0.5th percentile (Ω)", "99.5th percentile (Ω)"],
    ...points.map((p) => [
      Number((p.width / (unit === "mm" ? 1e-3 : 25.4e-6)).toPrecision(6)),
      digits(p.impedance),
      digits(p.low),
      digits(p.high),
    ]),
  ];
}

function goalBand(
  goal: Domain,
  target: { ohms: number; tolerance: number },
  y: ReturnType<typeof linear>,
  box: PlotBox,
): Mark[] {
  const words = `${ohmsText(target.ohms)} \u00b1\u2009${numberText(target.tolerance * 100, 0)}\u2009%`;
  return [
    rect(box.left, y(goal[1]), box.right - box.left, y(goal[0]) - y(goal[1]), {
      fill: "pass",
      fillOpacity: 0.12,
    }),
    line(box.left, y(goal[0]), box.right, y(goal[0]), { stroke: "pass", weight: 0.75, dash: "7 3" }),
    line(box.left, y(goal[1]), box.right, y(goal[1]), { stroke: "pass", weight: 0.75, dash: "7 3" }),
    line(box.left, y(target.ohms), box.right, y(target.ohms), { stroke: "pass", weight: 1 }),
    text(box.right + 6, y(target.ohms) + 4, words, { ink: "pass" }),
  ];
}

/** Straight line between the two computed widths around one. */
function between(points: readonly WidthPoint[], width: number): number | null {
  const i = points.findIndex((p) => p.width >= width);
  const [a, b] = [points[Math.max(i - 1, 0)], points[i]];
  if (!a || !b) return null;
  return a === b
    ? a.impedance
    : a.impedance + ((b.impedance - a.impedance) * (width - a.width)) / (b.width - a.width);
}
