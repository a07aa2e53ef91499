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
