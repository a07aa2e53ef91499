import { lengthText, type LengthUnit } from "./number-text";
import type { TraceSectionShape } from "./trace-shape";

/** The cross-section in sentences. */
export function describeTrace(shape: TraceSectionShape, unit: LengthUnit): string {
  const [first, second] = shape.traces;
  if (!first) return "No trace.";
  const laminate = shape.layers.reduce((sum, l) => sum + l.thickness, 0);
  const length = (m: number): string => lengthText(m, unit);
  const parts = [
    second ? "A pair of traces" : "One trace",
    shape.upperPlane ? "between two planes" : "over a plane",
    shape.mask ? "under solder mask" : null,
    shape.coplanar ? "with ground beside" : null,
  ].filter((p) => p !== null);
  const facts = [
    `foot width ${length(first.widthBottom)}`,
    `crown width ${length(first.widthTop)}`,
    `copper thickness ${length(first.thickness)}`,
    `height below ${length(first.y)}`,
    shape.upperPlane ? `height above ${length(laminate - first.y - first.thickness)}` : null,
    second ? `gap ${length(second.x - first.x - (first.widthBottom + second.widthBottom) / 2)}` : null,
    shape.coplanar ? `gap to ground ${length(shape.coplanar.gap)}` : null,
    shape.mask
      ? `mask ${length(shape.mask.overLaminate)} over laminate, ${length(shape.mask.overTrace)} over copper`
      : null,
  ].filter((p) => p !== null);
  const dielectrics = shape.layers.map((l) => `${length(l.thickness)} at Dk ${l.er.toFixed(2)}`).join(", ");
  return `${parts.join(" ")}, to scale: ${facts.join("; ")}. Dielectrics from the lower plane upward: ${dielectrics}.`;
}

/** The dimensions of the cross-section as rows, headings first. */
export function sectionRows(shape: TraceSectionShape, unit: LengthUnit): (string | number)[][] {
  const length = (m: number): number => Number((m / (unit === "mm" ? 1e-3 : 25.4e-6)).toPrecision(7));
  const rows: (string | number)[][] = [["part", "quantity", "value", "unit"]];
  shape.traces.forEach((t, i) => {
    const part = shape.traces.length === 1 ? "trace" : `trace ${i + 1}`;
    rows.push(
      [part, "centre", length(t.x), unit],
      [part, "height below", length(t.y), unit],
      [part, "copper thickness", length(t.thickness), unit],
      [part, "foot width", length(t.widthBottom), unit],
      [part, "crown width", length(t.widthTop), unit],
    );
  });
  shape.layers.forEach((l, i) => {
    rows.push([`dielectric ${i + 1}`, "thickness", length(l.thickness), unit]);
    rows.push([`dielectric ${i + 1}`, "Dk", l.er, ""]);
  });
  if (shape.mask)
    rows.push(
      ["mask", "over laminate", length(shape.mask.overLaminate), unit],
      ["mask", "over copper", length(shape.mask.overTrace), unit],
      ["mask", "Dk", shape.mask.er, ""],
    );
  return rows;
}
