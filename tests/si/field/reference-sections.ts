import type { CrossSection, Trace } from "@/lib/si/cross-section";

type Numbers = Record<string, number>;

/** A case of tests/reference/impedance; lengths in mm. */
export interface ReferenceCase {
  id: string;
  structure: string;
  geometry_mm: Numbers;
  dielectrics: Numbers;
  results: Record<string, number | number[] | number[][]>;
}

const mm = 1e-3;

const trace = (x: number, y: number, t: number, bottom: number, top: number): Trace => ({
  x: x * mm,
  y: y * mm,
  thickness: t * mm,
  widthBottom: bottom * mm,
  widthTop: top * mm,
});
const layer = (thickness: number, er: number) => ({ thickness: thickness * mm, er });

/** The cross-section of a case; null where it has no reference plane or is no layered line (coax, wires). */
export function sectionOf({ structure, geometry_mm: g, dielectrics: d }: ReferenceCase): CrossSection | null {
  if (/^(cpw-halfspace|cps-|wire|coax|twin)/.test(structure)) return null;
  const t = g.t ?? 0;
  if (structure.includes("broadside")) return broadside(structure, g, d);
  const inner = structure.startsWith("stripline");
  const h1 = inner ? (g.h1 ?? (at(g, "b") - t) / 2) : at(g, "h");
  return {
    layers: inner ? innerLayers(structure, g, d, h1, t) : outerLayers(g, d),
    upperPlane: inner,
    traces: tracesOf(structure, g, h1, t),
    ...(structure.startsWith("cpwg") ? { coplanar: { gap: (g.g ?? at(g, "s")) * mm } } : {}),
    ...(g.mask_side === undefined
      ? {}
      : {
          mask: {
            overLaminate: at(g, "mask_over_laminate") * mm,
            overTrace: at(g, "mask_over_trace") * mm,
            side: g.mask_side * mm,
            er: at(d, "er_mask"),
          },
        }),
  };
}

function at(numbers: Numbers, name: string): number {
  const value = numbers[name];
  if (value === undefined) throw new Error(`The case has no ${name}.`);
  return value;
}

function innerLayers(structure: string, g: Numbers, d: Numbers, h1: number, t: number) {
  const h2 = g.h2 ?? at(g, "b") - h1 - t;
  const lower = d.er_lower ?? at(d, "er");
  const upper = d.er_upper ?? lower;
  if (structure.includes("inverted")) return [layer(h1 + t, lower), layer(h2, upper)];
  if (d.er_fill !== undefined && t > 0) return [layer(h1, lower), layer(t, d.er_fill), layer(h2, upper)];
  return [layer(h1, lower), layer(t + h2, upper)];
}

function outerLayers(g: Numbers, d: Numbers) {
  if (g.h_lower_layer !== undefined) {
    return [
      layer(g.h_lower_layer, at(d, "er_lower_layer")),
      layer(at(g, "h_upper_layer"), at(d, "er_upper_layer")),
    ];
  }
  const base = layer(at(g, "h"), d.er ?? at(d, "er_lower"));
  return g.h_cover === undefined ? [base] : [base, layer(g.h_cover, at(d, "er_cover"))];
}

function tracesOf(structure: string, g: Numbers, y: number, t: number): Trace[] {
  const etch = g.etch ?? 0;
  if (g.w1_bottom !== undefined) {
    const w1 = g.w1_bottom;
    const w2 = at(g, "w2_bottom");
    const gap = at(g, "s");
    return [trace(-(gap + w1) / 2, y, t, w1, w1 - etch), trace((gap + w2) / 2, y, t, w2, w2 - etch)];
  }
  const w = g.w_bottom ?? at(g, "w");
  const top = g.w_top ?? w;
  const gap = g.s_top !== undefined ? g.s_top + top - w : g.s;
  // single coplanar lines call their slot s
  if (gap === undefined || structure === "cpwg" || structure === "cpwg-masked")
    return [trace(0, y, t, w, top)];
  return [trace(-(gap + w) / 2, y, t, w, top), trace((gap + w) / 2, y, t, w, top)];
}

function broadside(structure: string, g: Numbers, d: Numbers): CrossSection {
  const b = at(g, "b");
  const t = g.t ?? 0;
  const s = at(g, "s");
  const h1 = g.h1 ?? (b - s) / 2 - t;
  const wide = g.w_wide ?? at(g, "w");
  const narrow = g.w_narrow ?? wide;
  const core = d.er_core ?? at(d, "er");
  const lower = d.er_lower ?? core;
  const upper = d.er_upper ?? core;
  return {
    layers: [layer(h1 + t, lower), layer(s, core), layer(b - h1 - t - s, upper)],
    upperPlane: true,
    traces: [trace(0, h1, t, narrow, wide), trace(0, h1 + t + s, t, wide, narrow)],
  };
}
