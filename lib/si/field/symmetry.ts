import type { CrossSection, Trace } from "../cross-section";

/**
 * How a cross-section mirrors in x: "self" about each trace's own centre (one trace, or two stacked), "swap" about the
 * middle of an equal pair, "none". `axis` is the mirror's x [m].
 */
export interface Symmetry {
  kind: "self" | "swap" | "none";
  axis: number;
}

export function symmetryOf(section: CrossSection): Symmetry {
  const [a, b] = section.traces;
  if (!a) return { kind: "none", axis: 0 };
  if (!b) return { kind: "self", axis: a.x };
  const tolerance = 1e-9 * (a.widthBottom + b.widthBottom);
  if (Math.abs(a.x - b.x) <= tolerance) return { kind: "self", axis: (a.x + b.x) / 2 };
  const axis = (a.x + b.x) / 2;
  return { kind: sameShape(a, b) && Math.abs(a.y - b.y) <= tolerance ? "swap" : "none", axis };
}

/** True for equal traces stacked in a stack that reads the same from above and from below. */
export function isMirroredVertically(section: CrossSection): boolean {
  const [a, b] = section.traces;
  if (!a || !b || !section.upperPlane) return false;
  const { layers } = section;
  const height = layers.reduce((sum, layer) => sum + layer.thickness, 0);
  const close = (p: number, q: number) => Math.abs(p - q) <= 1e-9 * height;
  return (
    close(a.x, b.x) &&
    close(a.thickness, b.thickness) &&
    close(a.widthBottom, b.widthTop) &&
    close(a.widthTop, b.widthBottom) &&
    close(a.y, height - b.y - b.thickness) &&
    layers.every((layer, i) => {
      const other = layers[layers.length - 1 - i];
      return (
        other !== undefined &&
        close(layer.thickness, other.thickness) &&
        close(layer.er * height, other.er * height)
      );
    })
  );
}

function sameShape(a: Trace, b: Trace): boolean {
  const same = (p: number, q: number) => Math.abs(p - q) <= 1e-9 * Math.max(Math.abs(p), Math.abs(q));
  return (
    same(a.widthBottom, b.widthBottom) &&
    same(a.widthTop, b.widthTop) &&
    (a.thickness === b.thickness || same(a.thickness, b.thickness))
  );
}

/** The same section with the mirror at x = 0. */
export function centred(section: CrossSection, axis: number): CrossSection {
  return axis === 0 ? section : { ...section, traces: section.traces.map((t) => ({ ...t, x: t.x - axis })) };
}
