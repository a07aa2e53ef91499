import { horizontalDimension, verticalDimension } from "./dimension";
import type { Mark } from "./marks";
import { lengthText, type LengthUnit } from "./number-text";
import type { Placement, TraceSectionShape } from "./trace-shape";

/** Drawn thickness of a plane [px]: planes are references, their own thickness does not enter. */
export const PLANE = 9;

/** Every dimension of the trace in words, its value at arrows and extension lines. */
export function traceDimensions(
  shape: TraceSectionShape,
  at: Placement,
  laminate: number,
  left: number,
  right: number,
  unit: LengthUnit,
  base: number,
  compact: boolean,
): Mark[] {
  const [first, second] = shape.traces;
  if (!first) return [];
  const words = (name: string, m: number): string => `${name} ${lengthText(m, unit)}`;
  const beside = (name: string, m: number): string | [string, string] =>
    compact ? [name, lengthText(m, unit)] : words(name, m);
  const top = first.y + first.thickness;
  const ceiling = shape.upperPlane
    ? at.y(laminate) - PLANE
    : at.y(Math.max(laminate, top + (shape.mask?.overTrace ?? 0)));
  const edge = (t: typeof first, side: -1 | 1, w: number): number => at.x(t.x + (side * w) / 2);

  const marks: Mark[] = [
    ...horizontalDimension({
      x1: edge(first, -1, first.widthBottom),
      x2: edge(first, 1, first.widthBottom),
      y: base + PLANE + 14,
      from1: at.y(first.y),
      from2: at.y(first.y),
      label: words("foot width", first.widthBottom),
      below: true,
    }),
    ...horizontalDimension({
      x1: edge(first, -1, first.widthTop),
      x2: edge(first, 1, first.widthTop),
      y: ceiling - 12,
      from1: at.y(top),
      from2: at.y(top),
      label: words("crown width", first.widthTop),
    }),
    ...verticalDimension({
      y1: at.y(0),
      y2: at.y(first.y),
      x: right + 14,
      from1: right,
      from2: right,
      label: beside("height below", first.y),
    }),
    ...verticalDimension({
      y1: at.y(first.y),
      y2: at.y(top),
      x: left - 14,
      from1: left,
      from2: left,
      label: lengthText(first.thickness, unit),
      left: true,
    }),
  ];
  if (shape.upperPlane)
    marks.push(
      ...verticalDimension({
        y1: at.y(top),
        y2: at.y(laminate),
        x: right + 14,
        from1: right,
        from2: right,
        label: beside("height above", laminate - top),
      }),
    );
  if (second && Math.abs(second.y - first.y) < 1e-12) {
    marks.push(
      ...horizontalDimension({
        x1: edge(first, 1, first.widthBottom),
        x2: edge(second, -1, second.widthBottom),
        y: ceiling - 34,
        from1: at.y(first.y),
        from2: at.y(second.y),
        label: words("gap", second.x - first.x - (first.widthBottom + second.widthBottom) / 2),
      }),
    );
  } else if (!second && shape.coplanar) {
    marks.push(
      ...horizontalDimension({
        x1: edge(first, 1, first.widthBottom),
        x2: edge(first, 1, first.widthBottom) + shape.coplanar.gap * at.scale,
        y: ceiling - 34,
        from1: at.y(first.y),
        from2: at.y(first.y),
        label: words("gap", shape.coplanar.gap),
      }),
    );
  }
  return textLast(marks);
}

/** Labels over all lines, so that their paper covers what crosses them. */
function textLast(marks: Mark[]): Mark[] {
  return [...marks.filter((m) => m.kind !== "text"), ...marks.filter((m) => m.kind === "text")];
}
