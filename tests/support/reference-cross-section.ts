import type { CrossSection, LineParameters, Trace } from "@/lib/si/cross-section";

/** A case of tests/reference/impedance (fem.json, exact.json); its README says what the fields mean. Lengths in mm. */
export interface ReferenceSectionCase {
  id: string;
  structure: string;
  geometry_mm: Record<string, number>;
  dielectrics: Record<string, number>;
  results: Record<string, unknown>;
  source?: string;
}

/** The case as a cross-section; null for what is none of the contract's structures (no plane, round wires). */
export function referenceSection(entry: ReferenceSectionCase): CrossSection | null {
  const lengths = inMetres(entry.geometry_mm);
  const { structure, dielectrics: d } = entry;
  if (/^(cpw-|cps-|wire|coax|twin)/.test(structure)) return null;
  if (structure.startsWith("stripline-broadside")) return broadside(lengths, d);
  if (structure.startsWith("stripline")) return stripline(lengths, d);
  if (!structure.startsWith("cpwg")) return microstrip(lengths, d);
  const { s: slot, g: slotOfPair, ...rest } = lengths;
  const pair = slotOfPair !== undefined;
  return {
    ...microstrip(pair && slot !== undefined ? { ...rest, s: slot } : rest, d),
    coplanar: { gap: has({ slot: (pair ? slotOfPair : slot) ?? Number.NaN }, "slot") },
  };
}

type Numbers = Record<string, number>;

const inMetres = (mm: Numbers): Numbers =>
  Object.fromEntries(Object.entries(mm).map(([name, value]) => [name, value / 1000]));

function has(numbers: Numbers, ...names: string[]): number {
  for (const name of names) {
    const value = numbers[name];
    if (value !== undefined) return value;
  }
  throw new Error(`The case has none of ${names.join(", ")}.`);
}

function microstrip(g: Numbers, d: Numbers): CrossSection {
  const section: CrossSection = {
    layers:
      g.h_lower_layer === undefined
        ? [{ thickness: has(g, "h"), er: has(d, "er", "er_lower") }]
        : [
            { thickness: g.h_lower_layer, er: has(d, "er_lower_layer") },
            { thickness: has(g, "h_upper_layer"), er: has(d, "er_upper_layer") },
          ],
    upperPlane: false,
    traces: traces(g, has(g, "h")),
  };
  if (g.h_cover !== undefined) section.layers.push({ thickness: g.h_cover, er: has(d, "er_cover") });
  if (g.mask_side !== undefined)
    section.mask = {
      overLaminate: has(g, "mask_over_laminate"),
      overTrace: has(g, "mask_over_trace"),
      side: g.mask_side,
      er: has(d, "er_mask"),
    };
  return section;
}

function stripline(g: Numbers, d: Numbers): CrossSection {
  const t = has(g, "t");
  const h1 = g.h1 ?? has(g, "b") / 2;
  const above = g.h2 === undefined ? has(g, "b") - h1 : t + g.h2;
  const lower = has(d, "er_lower", "er");
  const upper = has(d, "er_upper", "er");
  const inverted = g.w_top !== undefined && g.w_bottom !== undefined && g.w_top > g.w_bottom;
  let layers = [
    { thickness: inverted ? h1 + t : h1, er: lower },
    { thickness: inverted ? above - t : above, er: upper },
  ];
  if (d.er_fill !== undefined)
    layers = [
      { thickness: h1, er: lower },
      { thickness: t, er: d.er_fill },
      { thickness: above - t, er: upper },
    ];
  return { layers, upperPlane: true, traces: traces(g, h1) };
}

function broadside(g: Numbers, d: Numbers): CrossSection {
  const t = has(g, "t");
  const s = has(g, "s");
  const h1 = g.h1 ?? (has(g, "b") - s) / 2 - t;
  const h2 = g.h2 ?? h1;
  const wide = has(g, "w_wide", "w");
  const narrow = has(g, "w_narrow", "w");
  return {
    layers: [
      { thickness: h1 + t, er: has(d, "er_lower", "er") },
      { thickness: s, er: has(d, "er_core", "er") },
      { thickness: t + h2, er: has(d, "er_upper", "er") },
    ],
    upperPlane: true,
    traces: [
      { x: 0, y: h1, thickness: t, widthBottom: narrow, widthTop: wide },
      { x: 0, y: h1 + t + s, thickness: t, widthBottom: wide, widthTop: narrow },
    ],
  };
}

function traces(g: Numbers, y: number): Trace[] {
  const thickness = has(g, "t");
  const at = (x: number, widthBottom: number, widthTop: number): Trace => ({
    x,
    y,
    thickness,
    widthBottom,
    widthTop,
  });
  if (g.w1_bottom !== undefined) {
    const [w1, w2] = [g.w1_bottom, has(g, "w2_bottom")];
    const [etch, s] = [has(g, "etch"), has(g, "s")];
    return [at(-(s + w1) / 2, w1, w1 - etch), at((s + w2) / 2, w2, w2 - etch)];
  }
  const bottom = has(g, "w_bottom", "w");
  const top = g.w_top ?? bottom;
  const gap = g.s_top === undefined ? g.s : g.s_top + top - bottom;
  if (gap === undefined) return [at(0, bottom, top)];
  return [at(-(gap + bottom) / 2, bottom, top), at((gap + bottom) / 2, bottom, top)];
}

/** One number of a case, from the reference and from the engine. */
export interface Compared {
  quantity: string;
  unit: string;
  reference: number;
  engine: number;
  /** relative; of off-diagonals to √(C11·C22), of crosstalk the plain difference */
  error: number;
}

/** Every impedance, permittivity, matrix entry and crosstalk coefficient that the case has. */
export function compareWithReference({ results }: ReferenceSectionCase, line: LineParameters): Compared[] {
  const compared: Compared[] = [];
  const add = (
    quantity: string,
    unit: string,
    reference: unknown,
    engine: number | undefined,
    scale?: number,
  ) => {
    if (typeof reference !== "number") return;
    const value = engine ?? Number.NaN;
    compared.push({
      quantity,
      unit,
      reference,
      engine: value,
      error: Math.abs(value - reference) / Math.abs(scale ?? reference),
    });
  };
  const { single, pair } = line;
  add("Z₀", "Ω", results.Z0_ohm, single?.impedance);
  add("effective Dk", "", results.eps_eff, single?.effectivePermittivity);
  add("C", "F/m", results.C_F_per_m, line.capacitance[0]?.[0]);
  add("C in air", "F/m", results.C0_F_per_m, line.airCapacitance[0]?.[0]);
  add("L", "H/m", results.L_H_per_m, line.inductance[0]?.[0]);
  add("Z odd", "Ω", pair?.odd && results.Z_odd_ohm, pair?.odd?.impedance);
  add("Z even", "Ω", pair?.even && results.Z_even_ohm, pair?.even?.impedance);
  add("effective Dk odd", "", pair?.odd && results.eps_eff_odd, pair?.odd?.effectivePermittivity);
  add("effective Dk even", "", pair?.even && results.eps_eff_even, pair?.even?.effectivePermittivity);
  add("Z differential", "Ω", results.Z_diff_ohm, pair?.differential);
  add("Z common", "Ω", results.Z_comm_ohm, pair?.common);
  add("backward crosstalk", "", results.Kb_backward, pair?.backwardCrosstalk, 1);
  if (Array.isArray(results.eps_eff_modes)) {
    const modes = [...(pair?.modes ?? [])].map((mode) => mode.effectivePermittivity).sort((a, b) => a - b);
    const wanted = (results.eps_eff_modes as number[]).toSorted((a, b) => a - b);
    wanted.forEach((value, i) => add(`effective Dk of mode ${i + 1}`, "", value, modes[i]));
  }
  matrix("C", "F/m", results.C_matrix_F_per_m, line.capacitance, add);
  matrix("C in air", "F/m", results.C0_matrix_F_per_m, line.airCapacitance, add);
  matrix("L", "H/m", results.L_matrix_H_per_m, line.inductance, add);
  return compared;
}

function matrix(
  name: string,
  unit: string,
  reference: unknown,
  engine: number[][],
  add: (
    quantity: string,
    unit: string,
    reference: unknown,
    engine: number | undefined,
    scale?: number,
  ) => void,
): void {
  if (!Array.isArray(reference)) return;
  const rows = reference as number[][];
  const scale = Math.sqrt((rows[0]?.[0] ?? 0) * (rows[1]?.[1] ?? 0));
  rows.forEach((row, i) =>
    row.forEach((value, j) =>
      add(`${name}${i + 1}${j + 1}`, unit, value, engine[i]?.[j], i === j ? undefined : scale),
    ),
  );
}
