import { DomainError } from "../errors";
import type { CrossSection, Trace } from "./types";

/** Relative to the stack's height: what rounding of sums may leave. */
export const GEOMETRY_TOLERANCE = 1e-9;

/**
 * Checks a cross-section; returns nothing.
 * @throws DomainError whose `field` names the input ("layers[1].er", "traces[0].widthBottom", "mask.overLaminate")
 */
export function validateCrossSection(section: CrossSection): void {
  validateLayers(section);
  if (section.traces.length === 0) throw new DomainError("The cross-section has no trace.", "traces");
  if (section.traces.length > 2) throw new DomainError("A cross-section holds one trace or two.", "traces");
  section.traces.forEach((trace, index) => validateTrace(section, trace, index));
  validateSeparation(section);
  if (section.coplanar) positive(section.coplanar.gap, "coplanar.gap", "slot to the coplanar ground");
  if (section.mask) validateMask(section);
}

/** Height of all dielectric layers [m]. */
export function stackHeight(section: CrossSection): number {
  return section.layers.reduce((sum, layer) => sum + layer.thickness, 0);
}

function validateLayers(section: CrossSection): void {
  if (section.layers.length === 0) {
    throw new DomainError("There is no dielectric over a reference plane, so no impedance.", "layers");
  }
  section.layers.forEach((layer, index) => {
    positive(layer.thickness, `layers[${index}].thickness`, `thickness of dielectric ${index + 1}`);
    permittivity(layer.er, `layers[${index}].er`, `Dk of dielectric ${index + 1}`);
    lossTangent(layer.tanD, `layers[${index}].tanD`, `Df of dielectric ${index + 1}`);
  });
}

function validateTrace(section: CrossSection, trace: Trace, index: number): void {
  const field = (name: string) => `traces[${index}].${name}`;
  const slack = GEOMETRY_TOLERANCE * stackHeight(section);
  finite(trace.x, field("x"), "position of the trace");
  positive(trace.widthBottom, field("widthBottom"), "width of the trace");
  positive(trace.widthTop, field("widthTop"), "width of the trace's top");
  if (!(trace.thickness >= 0 && trace.thickness < 1)) {
    throw new DomainError(
      `The copper thickness must be zero or more; it is ${trace.thickness}.`,
      field("thickness"),
    );
  }
  positive(trace.y, field("y"), "height of the trace over the plane");
  const height = stackHeight(section);
  if (section.upperPlane && trace.y + trace.thickness >= height - slack) {
    throw new DomainError("The trace touches the upper plane.", field("y"));
  }
  if (!section.upperPlane && trace.y > height + slack) {
    throw new DomainError("The trace hangs in the air above the laminate.", field("y"));
  }
}

function validateSeparation(section: CrossSection): void {
  const [a, b] = section.traces;
  if (!a || !b) return;
  const bottom = Math.max(a.y, b.y);
  const top = Math.min(a.y + a.thickness, b.y + b.thickness);
  if (top < bottom) return; // one above the other, apart
  const [left, right] = a.x <= b.x ? [a, b] : [b, a];
  const clear = Math.min(clearanceAt(left, right, bottom), clearanceAt(left, right, Math.max(bottom, top)));
  if (clear > 0) return;
  if (a.y === b.y && clear > -1e-12)
    throw new DomainError("The gap between the traces must be above zero.", "traces");
  throw new DomainError("The traces overlap. Widen the gap between them.", "traces");
}

/** Distance between the facing sides at height y [m]. */
function clearanceAt(left: Trace, right: Trace, y: number): number {
  return right.x - left.x - (widthAt(left, y) + widthAt(right, y)) / 2;
}

function widthAt(trace: Trace, y: number): number {
  const share = trace.thickness === 0 ? 0 : Math.min(1, Math.max(0, (y - trace.y) / trace.thickness));
  return trace.widthBottom + share * (trace.widthTop - trace.widthBottom);
}

function validateMask(section: CrossSection): void {
  const mask = section.mask;
  if (!mask) return;
  if (section.upperPlane)
    throw new DomainError("Solder mask lies on outer layers only; a plane closes this one.", "mask");
  positive(mask.overLaminate, "mask.overLaminate", "mask over the laminate");
  positive(mask.overTrace, "mask.overTrace", "mask over the trace");
  positive(mask.side, "mask.side", "mask beside the trace");
  permittivity(mask.er, "mask.er", "Dk of the mask");
  lossTangent(mask.tanD, "mask.tanD", "Df of the mask");
  const thinnest = Math.min(...section.traces.map((trace) => trace.thickness));
  if (mask.overLaminate >= thinnest * (1 - GEOMETRY_TOLERANCE)) {
    throw new DomainError(
      "The mask over the laminate is as thick as the copper. Describe it as a flat layer instead.",
      "mask.overLaminate",
    );
  }
}

function finite(value: number, field: string, spoken: string): void {
  if (!Number.isFinite(value))
    throw new DomainError(`The ${spoken} must be a number; it is ${value}.`, field);
}

function positive(value: number, field: string, spoken: string): void {
  if (!(value > 0 && Number.isFinite(value))) {
    throw new DomainError(`The ${spoken} must be above zero; it is ${value}.`, field);
  }
}

function permittivity(value: number, field: string, spoken: string): void {
  if (!(value >= 1 && value <= 1e6))
    throw new DomainError(`The ${spoken} must be at least 1 (air); it is ${value}.`, field);
}

function lossTangent(value: number | undefined, field: string, spoken: string): void {
  if (value !== undefined && !(value >= 0 && value < 10)) {
    throw new DomainError(`The ${spoken} must be zero or more; it is ${value}.`, field);
  }
}
