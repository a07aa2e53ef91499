import { GEOMETRY_TOLERANCE, stackHeight, validateCrossSection } from "./validate";
import type { CrossSection, Trace } from "./types";

/** One side of the traces: the dielectric up to the plane (or the surface), as one equivalent layer. */
export interface Side {
  /** [m] */
  height: number;
  /** series permittivity Σh / Σ(h/ε) of the layers on that side [1] */
  er: number;
}

/** What a cross-section is, by place, with the few numbers that closed forms take. */
export interface Structure {
  /** outer: air above the laminate; covered: a flat dielectric over the trace, then air; inner: between two planes */
  place: "outer" | "covered" | "inner";
  arrangement: "single" | "equal pair" | "unequal pair" | "broadside pair";
  masked: boolean;
  coplanarSlot: number | null;
  /** mean of bottom and top width of the first trace [m] */
  width: number;
  /** copper thickness [m] */
  thickness: number;
  /** half of what the top lost against the bottom width [m], both sides; negative where the top is wider */
  slope: number;
  /** between the facing sides at half height [m]; null without a pair side by side */
  gap: number | null;
  below: Side;
  /** inner: trace top to the plane; covered: trace foot to the cover's surface; null outer */
  above: Side | null;
  /** true where the sides slope or layers were merged: closed forms then see an equivalent */
  simplified: { slopedSides: boolean; mergedLayers: boolean };
}

/**
 * Recognises a valid cross-section.
 * @throws DomainError as validateCrossSection does
 */
export function classifyCrossSection(section: CrossSection): Structure {
  validateCrossSection(section);
  const first = section.traces[0] as Trace; // validated: there is at least one
  const second = section.traces[1];
  const height = stackHeight(section);
  const slack = GEOMETRY_TOLERANCE * height;
  const covered = !section.upperPlane && height > first.y + slack;
  const place = section.upperPlane ? "inner" : covered ? "covered" : "outer";
  const below = sideBetween(section, 0, first.y);
  const topFace = first.y + first.thickness;
  const above =
    place === "inner"
      ? sideBetween(section, topFace, height)
      : place === "covered"
        ? sideBetween(section, first.y, height)
        : null;
  const sideways = second && Math.abs(second.y - first.y) <= slack;
  return {
    place,
    arrangement: arrangementOf(first, second, slack),
    masked: section.mask !== undefined,
    coplanarSlot: section.coplanar?.gap ?? null,
    width: (first.widthBottom + first.widthTop) / 2,
    thickness: first.thickness,
    slope: (first.widthBottom - first.widthTop) / 2,
    gap: sideways
      ? Math.abs(second.x - first.x) -
        (first.widthBottom + first.widthTop + second.widthBottom + second.widthTop) / 4
      : null,
    below: below.side,
    above: above?.side ?? null,
    simplified: {
      slopedSides: section.traces.some((trace) => trace.widthBottom !== trace.widthTop),
      mergedLayers: below.mixed || (above?.mixed ?? false),
    },
  };
}

function arrangementOf(first: Trace, second: Trace | undefined, slack: number): Structure["arrangement"] {
  if (!second) return "single";
  if (Math.abs(second.y - first.y) > slack) return "broadside pair";
  const equal =
    same(first.widthBottom, second.widthBottom) &&
    same(first.widthTop, second.widthTop) &&
    same(first.thickness, second.thickness);
  return equal ? "equal pair" : "unequal pair";
}

function same(a: number, b: number): boolean {
  return Math.abs(a - b) <= 1e-9 * Math.max(Math.abs(a), Math.abs(b));
}

function sideBetween(section: CrossSection, from: number, to: number): { side: Side; mixed: boolean } {
  let y = 0;
  let height = 0;
  let series = 0;
  const seen = new Set<number>();
  for (const layer of section.layers) {
    const part = Math.min(y + layer.thickness, to) - Math.max(y, from);
    y += layer.thickness;
    if (part <= GEOMETRY_TOLERANCE * layer.thickness) continue;
    height += part;
    series += part / layer.er;
    seen.add(layer.er);
  }
  return { side: { height: to - from, er: series > 0 ? height / series : 1 }, mixed: seen.size > 1 };
}
