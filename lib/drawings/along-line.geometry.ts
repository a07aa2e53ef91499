import { bottomAxis, type Domain, leftAxis, linear, type PlotBox, ticksFor } from "./axis";
import {
  type LineRow,
  type PlaceBy,
  type RowScale,
  rowHeader,
  rowScale,
  rowUprights,
  usableRow,
} from "./line-row";
import { circle, type Drawing, emptyDrawing, line, type Mark, type Point, polyline, text } from "./marks";
import { type LengthUnit, numberText, voltsText, withUnit } from "./number-text";
import { spreadLabels } from "./spread-labels";
import { type SectionWaves, voltagesAlong } from "./line-voltages";
import { waveStyle } from "./wave-style";
import type { LimitLine } from "./waveform-chart.geometry";

export interface AlongLineOptions {
  width: number;
  height?: number;
  title?: string;
  unit: LengthUnit;
  by?: PlaceBy;
  limits?: readonly LimitLine[];
  /** voltages shown; fixed for all times, so that nothing jumps */
  volts: Domain;
}

export interface AlongLineDrawing extends Drawing {
  box: PlotBox;
  row: RowScale | null;
  y: (volts: number) => number;
  volts: Domain;
  /** limit names, drawn over the waves */
  front: Mark[];
}

/** Axes, junctions and limits; the waves themselves are `alongLineWaves`, which move with the cursor. */
export function alongLine(row: LineRow, options: AlongLineOptions): AlongLineDrawing {
  const { width, height = 260, volts, limits = [] } = options;
  const title = options.title ?? "Voltage along the line";
  const box: PlotBox = { left: 62, top: 44, right: width - 84, bottom: height - 30 };
  if (!usableRow(row))
    return {
      ...emptyDrawing(title, "No section of this line has a delay yet.", width, height),
      box,
      row: null,
      y: () => 0,
      volts,
      front: [],
    };
  const y = linear(volts, [box.bottom, box.top]);
  const scale = rowScale(row, box.left, box.right, options.by);
  const sound = limits.filter((l) => Number.isFinite(l.volts));
  const names = spreadLabels(
    sound.map((l) => y(l.volts) + (l.side === "max" ? -10 : 10)),
    15,
    box.top,
    box.bottom,
  );
  const marks: Mark[] = [
    ...leftAxis(y, ticksFor(volts, (box.bottom - box.top) / 40, "V").ticks, box),
    ...rowUprights(scale, box.top, box.bottom),
    ...rowHeader(row, scale, 14, options.unit),
    ...placeAxis(row, scale, box, options.unit),
    ...sound.map((l) =>
      line(box.left, y(l.volts), box.right, y(l.volts), {
        stroke: l.reference ? "ink-soft" : "fail",
        dash: l.reference ? "2 3" : "7 3",
      }),
    ),
  ];
  const front = sound.map((l, i) =>
    text(box.left + 8, (names[i] ?? 0) + 4, `${l.label} ${voltsText(l.volts)}`, {
      ink: l.reference ? "ink-soft" : "fail",
      halo: true,
    }),
  );
  const size = scale.by === "length" ? "length" : "delay";
  const description = `Voltage over place, by ${size}, at the cursor's time: incident, reflected and total, across ${row.nodes.join(", ")}.`;
  return { width, height, title, description, marks, box, row: scale, y: (v) => y(v), volts, front };
}

/** Incident (copper), reflected (violet, dashed) and total (ink) at an instant, named at their ends. */
export function alongLineWaves(
  drawing: AlongLineDrawing,
  row: LineRow,
  waves: readonly SectionWaves[],
  time: number,
): Mark[] {
  const { row: scale, box } = drawing;
  if (!scale) return [];
  const places = voltagesAlong(row, waves, time);
  if (places.length === 0) return [];
  const inside = (v: number): number => Math.min(Math.max(drawing.y(v), box.top), box.bottom);
  const kinds = [
    ["incident", "incident"],
    ["reflected", "reflected"],
    ["total", "total"],
  ] as const;
  const last = places.at(-1);
  const rows = spreadLabels(
    kinds.map(([k]) => inside(last?.[k] ?? 0)),
    15,
    box.top,
    box.bottom,
  );
  const ends = places.filter((p, i) => p.share === 1 || i === 0);
  return kinds.flatMap(([kind, label], i): Mark[] => {
    const style = waveStyle(kind);
    const at = inside(last?.[kind] ?? 0);
    return [
      // Each section on its own: incident and reflected jump at a junction, the total does not.
      ...row.sections.map((_, s) =>
        polyline(
          places.filter((p) => p.section === s).map((p): Point => [scale.at(s, p.share), inside(p[kind])]),
          style,
        ),
      ),
      ...(kind === "total"
        ? ends.map((p) => circle(scale.at(p.section, p.share), inside(p.total), 2.5, { fill: "ink" }))
        : []),
      polyline(
        [
          [box.right + 1, at],
          [box.right + 5, at],
          [box.right + 11, rows[i] ?? at],
        ],
        { ...style, weight: 1, dash: undefined },
      ),
      text(box.right + 14, (rows[i] ?? at) + 4, label, {
        ink: style.stroke,
        weight: kind === "total" ? 650 : 400,
      }),
    ];
  });
}

function placeAxis(row: LineRow, scale: RowScale, box: PlotBox, unit: LengthUnit): Mark[] {
  const sum = (pick: (s: LineRow["sections"][number]) => number): number =>
    row.sections.reduce((t, s) => t + pick(s), 0);
  if (scale.by === "delay") {
    const domain: Domain = [0, sum((s) => s.delay)];
    return bottomAxis(
      linear(domain, [box.left, box.right]),
      ticksFor(domain, (box.right - box.left) / 110, "s").ticks,
      box,
      false,
    );
  }
  const metres = unit === "mm" ? 1e-3 : 25.4e-6;
  const axis = linear([0, sum((s) => s.length ?? 0) / metres], [box.left, box.right]);
  const ticks = axis
    .ticks(Math.max((box.right - box.left) / 110, 2))
    .map((v) => ({ value: v, label: withUnit(numberText(v, v % 1 ? 1 : 0), unit) }));
  return bottomAxis(axis, ticks, box, false);
}
