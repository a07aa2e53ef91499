import { type Domain, linear, type PlotBox, type Scale, ticksFor } from "./axis";
import type { BounceRay, NodeVoltage } from "./bounce-rays";
import { rayLabel, RayRoom } from "./bounce-ray-labels";
import { describeBounces } from "./bounce-words";
import { type LineRow, type RowScale, rowHeader, rowScale, rowUprights, usableRow } from "./line-row";
import { nodeVoltages } from "./node-voltages";
import { arrowAlong } from "./ray-arrow";
import { circle, type Drawing, emptyDrawing, group, line, type Mark, text } from "./marks";
import { type LengthUnit, voltsText } from "./number-text";

export interface BounceOptions {
  width: number;
  height?: number;
  title?: string;
  /** the time that is shown, downward [s] */
  span: Domain;
  unit: LengthUnit;
  /** the ray that does the harm */
  emphasis?: string | null;
}

export interface BounceDrawing extends Drawing {
  box: PlotBox;
  span: Domain;
  y: (seconds: number) => number;
  timeAt: (pixel: number) => number;
  row: RowScale | null;
  drawn: BounceRay[];
  /** rays too weak to be drawn */
  left: number;
}

/** More rays than this make a grey field, not a drawing. */
const MOST_RAYS = 400;
const MARGIN = 132;

/** The lattice of a line: place across, time down; each wave a ray from junction to junction. */
export function bounceDiagram(
  row: LineRow,
  rays: readonly BounceRay[],
  voltages: readonly NodeVoltage[],
  options: BounceOptions,
): BounceDrawing {
  const { width, height = 420, span } = options;
  const title = options.title ?? "Bounce diagram";
  const box: PlotBox = { left: MARGIN, top: 48, right: width - 84, bottom: height - 12 };
  const y = linear(span, [box.top, box.bottom]);
  const shown = rays.filter(
    (r) =>
      Number.isFinite(r.amplitude) &&
      r.start < span[1] &&
      row.sections[r.section] &&
      r.start + (row.sections[r.section]?.delay ?? 0) > span[0],
  );
  if (!usableRow(row) || shown.length === 0 || !(span[1] > span[0])) {
    const reason = !usableRow(row)
      ? "No section of this line has a delay yet."
      : "No wave crosses this line in the time shown.";
    return {
      ...emptyDrawing(title, reason, width, height),
      box,
      span,
      y: () => 0,
      timeAt: () => span[0],
      row: null,
      drawn: [],
      left: 0,
    };
  }

  const scale = rowScale(row, box.left, box.right);
  const strongest = [...shown].sort(
    (a, b) => Math.abs(b.amplitude) - Math.abs(a.amplitude) || a.start - b.start,
  );
  const kept = new Set(strongest.slice(0, MOST_RAYS));
  const emphasized = shown.find((r) => r.id === options.emphasis);
  if (emphasized) kept.add(emphasized);
  const drawn = shown.filter((r) => kept.has(r));
  const largest = Math.abs(strongest[0]?.amplitude ?? 0) || 1;
  const lines = drawn.map((r) => ({
    ray: r,
    ...rayLine(r, row, scale, y),
    strength: Math.abs(r.amplitude) / largest,
  }));

  const room = new RayRoom();
  const inOrder = [...lines].sort(
    (a, b) => Number(b.ray === emphasized) - Number(a.ray === emphasized) || b.strength - a.strength,
  );
  const labels = inOrder.flatMap((l) => rayLabel(l, l.ray === emphasized, room, box));
  const marks: Mark[] = [
    ...timeAxis(span, y, box),
    ...rowUprights(scale, box.top, box.bottom),
    ...rowHeader(row, scale, 16, options.unit),
    group(
      lines
        .filter((l) => l.ray !== emphasized)
        .sort((a, b) => a.strength - b.strength)
        .map((l) => rayMark(l))
        .concat(lines.filter((l) => l.ray === emphasized).flatMap((l) => emphasisMarks(l))),
      {
        clip: { x: box.left - 4, y: box.top, width: box.right - box.left + 8, height: box.bottom - box.top },
      },
    ),
    ...labels,
    ...nodeVoltages(voltages, 0, span, y, box),
    ...nodeVoltages(voltages, row.sections.length, span, y, box),
  ];
  return {
    width,
    height,
    title,
    marks,
    box,
    span,
    drawn,
    row: scale,
    left: shown.length - drawn.length,
    description: describeBounces(row, drawn, voltages, emphasized ?? null, shown.length - drawn.length, span),
    y: (s) => y(s),
    timeAt: (pixel) => Math.min(Math.max(y.invert(pixel), span[0]), span[1]),
  };
}

/** What moves with the cursor: a level line at its time and a dot where each drawn wave is just then. */
export function bounceCursor(drawing: BounceDrawing, row: LineRow, time: number | null): Mark[] {
  const { box, row: scale, span } = drawing;
  if (time === null || !scale || time < span[0] || time > span[1]) return [];
  const at = drawing.y(time);
  const strongest = Math.max(...drawing.drawn.map((r) => Math.abs(r.amplitude)));
  const fronts = drawing.drawn.flatMap((r) => {
    const share = (time - r.start) / (row.sections[r.section]?.delay ?? 1);
    if (share < 0 || share > 1 || Math.abs(r.amplitude) < 0.05 * strongest) return [];
    const x = scale.at(r.section, r.outward ? share : 1 - share);
    return [circle(x, at, 3.5, { fill: "sheet", stroke: r.outward ? "copper" : "violet", weight: 1.75 })];
  });
  return [line(box.left, at, box.right, at, { stroke: "ink", opacity: 0.7 }), ...fronts];
}

export interface RayLine {
  ray: BounceRay;
  x1: number;
  y1: number;
  x2: number;
  y2: number;
  /** share of the strongest ray's amplitude */
  strength: number;
}

function rayLine(r: BounceRay, row: LineRow, scale: RowScale, y: Scale): Omit<RayLine, "ray" | "strength"> {
  const delay = row.sections[r.section]?.delay ?? 0;
  const [from, to] = r.outward ? [0, 1] : [1, 0];
  return {
    x1: scale.at(r.section, from),
    y1: y(r.start),
    x2: scale.at(r.section, to),
    y2: y(r.start + delay),
  };
}

function rayMark({ ray, x1, y1, x2, y2, strength }: RayLine): Mark {
  return line(x1, y1, x2, y2, {
    stroke: ray.outward ? "copper" : "violet",
    weight: 1.5,
    dash: ray.outward ? undefined : "5 3",
    opacity: 0.16 + 0.84 * Math.sqrt(strength),
    hit: ray.id,
    tip: voltsText(ray.amplitude, true),
  });
}

/** The harmful bounce: a broad band beneath, a heavy line in its own look, an arrow at its end. */
function emphasisMarks(l: RayLine): Mark[] {
  const ink = l.ray.outward ? "copper" : "violet";
  return [
    line(l.x1, l.y1, l.x2, l.y2, { stroke: "fail", weight: 10, opacity: 0.18 }),
    line(l.x1, l.y1, l.x2, l.y2, {
      stroke: ink,
      weight: 3,
      dash: l.ray.outward ? undefined : "7 3",
      hit: l.ray.id,
    }),
    arrowAlong(l.x1, l.y1, l.x2, l.y2, ink),
  ];
}

function timeAxis(span: Domain, y: Scale, box: PlotBox): Mark[] {
  return ticksFor(span, (box.bottom - box.top) / 48, "s").ticks.flatMap(({ value, label }) => [
    line(box.left, y(value), box.right, y(value), { stroke: "rule-line" }),
    text(52, y(value) + 4, label, { anchor: "end", ink: "ink-soft" }),
  ]);
}
