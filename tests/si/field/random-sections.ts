import fc from "fast-check";
import type { CrossSection, Trace } from "@/lib/si/cross-section";

/**
 * Random cross-sections of every structure. Heights are the unit: w/h 0.1…20, t/h 0.02…1 (no more than w), sides leaning
 * in by up to 0.4 t, gaps 0.1…5 h, Dk 1…12, mask 5…150 % of the copper's thickness.
 */
export interface RandomSection {
  kind: Kind;
  section: CrossSection;
}

const kinds = [
  "microstrip",
  "masked",
  "embedded",
  "stripline",
  "two-dielectric stripline",
  "three-dielectric stripline",
  "half-sunk",
  "coplanar",
  "masked coplanar",
  "strip without thickness",
  "microstrip pair",
  "masked pair",
  "embedded pair",
  "stripline pair",
  "three-dielectric stripline pair",
  "coplanar pair",
  "masked coplanar pair",
  "pair without thickness",
  "unequal pair",
  "unequal masked pair",
  "broadside pair",
  "offset broadside pair",
] as const;
export type Kind = (typeof kinds)[number];

interface Draw {
  kind: Kind;
  h: number;
  width: number;
  other: number;
  thick: number;
  lean: number;
  gap: number;
  slot: number;
  above: number;
  cover: number;
  er: number[];
  two: boolean;
  lid: boolean;
  mask: number[];
}

const between = (low: number, high: number) => fc.double({ min: low, max: high, noNaN: true });
const spread = (low: number, high: number) => between(Math.log(low), Math.log(high)).map(Math.exp);
const permittivity = fc.oneof(
  { weight: 1, arbitrary: fc.constant(1) },
  { weight: 6, arbitrary: between(1, 12) },
);

export function randomSection(only: readonly Kind[] = kinds): fc.Arbitrary<RandomSection> {
  return fc
    .record<Draw>({
      kind: fc.constantFrom(...only),
      h: spread(2e-5, 1e-3),
      width: spread(0.1, 20),
      other: spread(0.1, 20),
      thick: spread(0.02, 1),
      lean: between(0, 0.4),
      gap: spread(0.1, 5),
      slot: spread(0.1, 5),
      above: spread(0.3, 5),
      cover: between(0.3, 3),
      er: fc.array(permittivity, { minLength: 4, maxLength: 4 }),
      two: fc.boolean(),
      lid: fc.boolean(),
      mask: fc.tuple(between(0.1, 0.95), between(0.05, 1.5), between(0.05, 1.5), between(2, 5)),
    })
    .map((draw) => ({ kind: draw.kind, section: build(draw) }));
}

function build(d: Draw): CrossSection {
  const { kind, h } = d;
  const thin = kind.includes("without thickness");
  const t = thin ? 0 : Math.min(d.thick, d.width, d.other) * h;
  const [e1 = 1, e2 = 1, e3 = 1, e4 = 1] = d.er;
  const layer = (thickness: number, er: number) => ({ thickness, er });
  const base = d.two ? [layer(0.6 * h, e1), layer(0.4 * h, e2)] : [layer(h, e1)];
  const trace = (x: number, y: number, width: number, wideOnTop = false): Trace => {
    const narrow = Math.max(width - 2 * d.lean * t, 0.3 * width);
    return {
      x,
      y,
      thickness: t,
      widthBottom: wideOnTop ? narrow : width,
      widthTop: wideOnTop || thin ? width : narrow,
    };
  };
  const w = d.width * h;
  const w2 = kind.includes("unequal") || kind.includes("offset") ? d.other * h : w;
  const s = d.gap * h;
  const beside = [trace(-(s + w) / 2, h, w), trace((s + w2) / 2, h, w2)];
  const traces = kind.includes("pair") ? beside : [trace(0, h, w)];
  const inner = { upperPlane: true, traces };
  const outer = { upperPlane: false, traces };
  const upper = d.above * h;
  switch (kind) {
    case "stripline":
    case "stripline pair":
      return { ...inner, layers: [layer(h, e1), layer(upper + t, e1)] };
    case "two-dielectric stripline":
      return { ...inner, layers: [...base, layer(upper + t, e3)] };
    case "three-dielectric stripline":
    case "three-dielectric stripline pair":
      return { ...inner, layers: [...base, layer(t, e3), layer(upper, e4)] };
    case "half-sunk":
      return { layers: [layer(h + 0.5 * t, e1), layer(upper + t, e3)], upperPlane: d.lid, traces };
    case "strip without thickness":
    case "pair without thickness":
      return { layers: [...base, layer(upper, e3)], upperPlane: d.lid, traces };
    case "embedded":
    case "embedded pair":
      return { ...outer, layers: [...base, layer(d.cover * t, e3), layer(0.2 * upper, e4)] };
    case "broadside pair":
    case "offset broadside pair": {
      const x = kind === "broadside pair" ? 0 : (d.lean - 0.2) * 5 * w;
      return {
        layers: [layer(h + t, e1), layer(s, e2), layer(upper + t, e3)],
        upperPlane: true,
        traces: [trace(0, h, w, true), trace(x, h + t + s, w2)],
      };
    }
    case "unequal pair":
      return { layers: [...base, layer(upper + t, e3)], upperPlane: d.lid, traces };
    default:
      return {
        ...outer,
        layers: base,
        ...(kind.includes("coplanar") ? { coplanar: { gap: d.slot * h } } : {}),
        ...(kind.includes("masked")
          ? {
              mask: {
                overLaminate: d.mask[0]! * t,
                overTrace: d.mask[1]! * t,
                side: d.mask[2]! * t,
                er: d.mask[3]!,
              },
            }
          : {}),
      };
  }
}
