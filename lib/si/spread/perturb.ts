import { GEOMETRY_TOLERANCE, stackHeight, validateCrossSection } from "../cross-section/validate";
import type { CrossSection, Trace } from "../cross-section";
import { DomainError } from "../errors";
import type { Factor } from "./tolerances";

/** Gap between the facing feet of a pair side by side [m]; null for others. */
export function pairGap(section: CrossSection): number | null {
  const [a, b] = section.traces;
  if (!a || !b || Math.abs(a.y - b.y) > GEOMETRY_TOLERANCE * stackHeight(section)) return null;
  return Math.abs(b.x - a.x) - (a.widthBottom + b.widthBottom) / 2;
}

/** What holds a trace in its stack: a face on a boundary between layers, else its share of a layer. */
interface Seat {
  face: "bottom" | "top" | "middle";
  boundary: number;
  share: number;
  /** layer exactly as thick as the trace beside it (resin), which follows the copper; −1 none */
  beside: number;
}

/**
 * Makes sections out of factor values: `move([…])` takes each factor's deviation from nominal, in its own unit.
 * @throws DomainError (from `move`) where the moved section is not legal
 */
export function sectionMover(
  section: CrossSection,
  factors: readonly Factor[],
): (deviations: ArrayLike<number>) => CrossSection {
  const seats = section.traces.map((trace) => seatOf(section, trace));
  return (deviations) => {
    const moved: CrossSection = {
      ...section,
      layers: section.layers.map((layer) => ({ ...layer })),
      traces: section.traces.map((trace) => ({ ...trace })),
      ...(section.coplanar && { coplanar: { ...section.coplanar } }),
      ...(section.mask && { mask: { ...section.mask } }),
    };
    factors.forEach((factor, i) => apply(moved, factor, deviations[i] ?? 0, seats));
    const boundaries = boundariesOf(moved);
    moved.traces.forEach((trace, i) => {
      trace.y = seated(trace, seats[i]!, boundaries);
    });
    requireLegal(moved);
    return moved;
  };
}

function requireLegal(moved: CrossSection): void {
  try {
    validateCrossSection(moved);
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    throw new DomainError(
      `Within these tolerances the section becomes impossible. ${error.message}`,
      error.field,
      {
        cause: error,
      },
    );
  }
}

function apply(section: CrossSection, { target, nominal }: Factor, by: number, seats: Seat[]): void {
  const { traces, layers, mask, coplanar } = section;
  switch (target.kind) {
    case "width":
      for (const trace of traces) {
        trace.widthBottom += by;
        trace.widthTop += by;
      }
      if (coplanar) coplanar.gap -= by;
      return;
    case "slope":
      for (const trace of traces) trace.widthTop -= 2 * by;
      return;
    case "copper":
      for (const trace of traces) trace.thickness += by;
      for (const layer of new Set(seats.map((seat) => seat.beside))) {
        if (layer >= 0) layers[layer]!.thickness += by;
      }
      return;
    case "gap": {
      const middle = traces.reduce((sum, trace) => sum + trace.x, 0) / traces.length;
      for (const trace of traces) trace.x += trace.x < middle ? -by / 2 : by / 2;
      return;
    }
    case "layer thickness":
      layers[target.layer]!.thickness += by;
      return;
    case "layer er":
      for (const i of target.layers) layers[i]!.er *= 1 + by / nominal;
      return;
    case "mask thickness":
      if (mask) {
        const factor = 1 + by / nominal;
        mask.overTrace *= factor;
        mask.overLaminate *= factor;
        mask.side *= factor;
      }
      return;
    case "mask er":
      if (mask) mask.er += by;
  }
}

function boundariesOf(section: CrossSection): number[] {
  const boundaries = [0];
  for (const layer of section.layers) boundaries.push(boundaries.at(-1)! + layer.thickness);
  return boundaries;
}

function seatOf(section: CrossSection, trace: Trace): Seat {
  const boundaries = boundariesOf(section);
  const slack = 1e-6 * stackHeight(section);
  const at = (y: number) => boundaries.findIndex((boundary) => Math.abs(boundary - y) <= slack);
  const bottom = at(trace.y);
  const top = at(trace.y + trace.thickness);
  const beside = trace.thickness > 0 && bottom >= 0 && top === bottom + 1 ? bottom : -1;
  if (bottom >= 0) return { face: "bottom", boundary: bottom, share: 0, beside };
  if (top >= 0) return { face: "top", boundary: top, share: 0, beside };
  const middle = trace.y + trace.thickness / 2;
  const boundary = Math.max(
    0,
    boundaries.findLastIndex((y) => y <= middle),
  );
  const next = boundaries[boundary + 1];
  const from = boundaries[boundary] ?? 0;
  return {
    face: "middle",
    boundary,
    share: next === undefined ? 0 : (middle - from) / (next - from),
    beside,
  };
}

function seated(trace: Trace, seat: Seat, boundaries: number[]): number {
  const from = boundaries[seat.boundary] ?? 0;
  if (seat.face === "bottom") return from;
  if (seat.face === "top") return from - trace.thickness;
  const next = boundaries[seat.boundary + 1] ?? from;
  return from + seat.share * (next - from) - trace.thickness / 2;
}
