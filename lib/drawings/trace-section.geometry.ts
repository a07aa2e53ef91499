import {
  type Drawing,
  emptyDrawing,
  group,
  type GroupMark,
  line,
  type Mark,
  type Point,
  polygon,
  polyline,
  rect,
  text,
} from "./marks";
import { lengthText, type LengthUnit } from "./number-text";
import { scaleBar } from "./scale-bar";
import { maskOutline } from "./trace-mask-outline";
import { PLANE, traceDimensions } from "./trace-dimensions";
import { AIR, placeTrace } from "./trace-placement";
import type { Placement, TraceSectionShape } from "./trace-shape";
import { describeTrace } from "./trace-words";

/** A line of equal potential, solved elsewhere [m]. */
export interface Equipotential {
  /** share of the trace's voltage, 0 to 1 */
  level: number;
  points: readonly (readonly [x: number, y: number])[];
}

export interface TraceSectionOptions {
  width: number;
  height?: number;
  unit: LengthUnit;
  title?: string;
  equipotentials?: readonly Equipotential[];
}

/** One trace or pair over or between its planes, to scale, with its dimensions. */
export function traceSection(
  shape: TraceSectionShape,
  options: TraceSectionOptions,
): Drawing & { scale: number } {
  const { width, height = 340, unit } = options;
  const title = options.title ?? "Trace cross-section";
  const first = shape.traces[0];
  const laminate = shape.layers.reduce((sum, l) => sum + l.thickness, 0);
  const sizes = [
    laminate,
    ...shape.traces.flatMap((t) => [t.x, t.y, t.thickness, t.widthBottom, t.widthTop]),
  ];
  if (!first || !(laminate > 0) || sizes.some((v) => !Number.isFinite(v)))
    return { ...emptyDrawing(title, "The cross-section is not complete.", width, height), scale: 0 };

  const { at, left, right, centre, base, crest, compact } = placeTrace(shape, first, laminate, width, height);
  const { scale } = at;

  const { bodies, labels } = dielectrics(shape, at, left, right, unit);
  const marks: Mark[] = [
    ...bodies,
    ...(shape.mask
      ? [
          polygon(
            maskOutline(shape, (left - centre) / scale, (right - centre) / scale).map(([x, y]): Point => [
              at.x(x),
              at.y(y),
            ]),
            { fill: "pass", fillOpacity: 0.24, stroke: "pass", weight: 0.75 },
          ),
        ]
      : []),
    ...potentials(options.equipotentials ?? [], at, {
      x: left,
      y: at.y(crest) - (shape.upperPlane ? 0 : AIR),
      width: right - left,
      height: base - at.y(crest) + (shape.upperPlane ? 0 : AIR),
    }),
    ...labels,
    plane(left, right, at.y(0), at.y(0) + PLANE),
    ...(shape.upperPlane ? [plane(left, right, at.y(laminate) - PLANE, at.y(laminate))] : []),
    ...coplanarGround(shape, at, left, right),
    ...shape.traces.map((t) =>
      polygon(
        [
          [at.x(t.x - t.widthBottom / 2), at.y(t.y)],
          [at.x(t.x + t.widthBottom / 2), at.y(t.y)],
          [at.x(t.x + t.widthTop / 2), Math.min(at.y(t.y + t.thickness), at.y(t.y) - 1.5)],
          [at.x(t.x - t.widthTop / 2), Math.min(at.y(t.y + t.thickness), at.y(t.y) - 1.5)],
        ],
        { fill: "copper", hit: "trace" },
      ),
    ),
    ...traceDimensions(shape, at, laminate, left, right, unit, base, compact),
    ...scaleBar(left, height - 8, scale, 100, unit),
  ];
  return {
    width,
    height,
    title,
    description: describeTrace(shape, unit) + linesWords(options.equipotentials),
    marks,
    scale,
  };
}

function linesWords(lines: readonly Equipotential[] = []): string {
  return lines.length > 0 ? " Lines of equal potential at every tenth of the trace’s voltage." : "";
}

function potentials(lines: readonly Equipotential[], at: Placement, clip: GroupMark["clip"]): Mark[] {
  if (lines.length === 0) return [];
  return [
    group(
      lines.map(({ points, level }) =>
        polyline(
          points.map(([x, y]): Point => [at.x(x), at.y(y)]),
          { stroke: "violet", weight: 0.8, opacity: 0.35 + 0.5 * Math.abs(level) },
        ),
      ),
      { clip },
    ),
  ];
}

function plane(left: number, right: number, top: number, bottom: number): Mark {
  return rect(left, top, right - left, bottom - top, { fill: "copper", fillOpacity: 0.9 });
}

function dielectrics(
  shape: TraceSectionShape,
  at: Placement,
  left: number,
  right: number,
  unit: LengthUnit,
): { bodies: Mark[]; labels: Mark[] } {
  const bodies: Mark[] = [];
  const labels: Mark[] = [];
  let y = 0;
  shape.layers.forEach((layer, i) => {
    const [bottom, top] = [at.y(y), at.y(y + layer.thickness)];
    bodies.push(
      rect(left, top, right - left, bottom - top, {
        fill: "rule-line",
        fillOpacity: i % 2 === 0 ? 0.65 : 0.4,
      }),
    );
    if (i > 0)
      bodies.push(line(left, bottom, right, bottom, { stroke: "ink-soft", weight: 0.5, opacity: 0.5 }));
    const holdsTrace = shape.traces.some(
      (t) => t.y + 1e-9 < y + layer.thickness && t.y + t.thickness > y + 1e-9,
    );
    const facts = [
      `Dk ${layer.er.toFixed(2)}`,
      // the height dimensions tell those beside the trace, which are higher by the copper
      ...(holdsTrace ? [] : [lengthText(layer.thickness, unit)]),
      ...(layer.name ? [layer.name] : []),
    ];
    if (bottom - top >= 13)
      labels.push(text(left + 8, (top + bottom) / 2 + 4, facts.join(", "), { ink: "ink-soft", halo: true }));
    y += layer.thickness;
  });
  return { bodies, labels };
}

function coplanarGround(shape: TraceSectionShape, at: Placement, left: number, right: number): Mark[] {
  const { coplanar, traces } = shape;
  const [first, last] = [traces[0], traces.at(-1)];
  if (!coplanar || !first || !last) return [];
  const lean = (first.widthBottom - first.widthTop) / 2;
  const [bottom, top] = [at.y(first.y), at.y(first.y + first.thickness)];
  const edgeLeft = first.x - first.widthBottom / 2 - coplanar.gap;
  const edgeRight = last.x + last.widthBottom / 2 + coplanar.gap;
  return [
    polygon(
      [
        [left, bottom],
        [at.x(edgeLeft), bottom],
        [at.x(edgeLeft - lean), top],
        [left, top],
      ],
      { fill: "copper", fillOpacity: 0.9 },
    ),
    polygon(
      [
        [right, bottom],
        [at.x(edgeRight), bottom],
        [at.x(edgeRight + lean), top],
        [right, top],
      ],
      { fill: "copper", fillOpacity: 0.9 },
    ),
  ];
}
