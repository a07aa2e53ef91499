import { describe, expect, it } from "vitest";
import {
  COPPER_CONDUCTIVITY,
  lineLoss,
  roughnessFactor,
  skinDepth,
  surfaceResistance,
  type ConductorInput,
} from "@/lib/si/frequency";
import { solveCrossSection } from "@/lib/si/field";
import type { CrossSection } from "@/lib/si/cross-section";
import { LIGHT_SPEED } from "@/lib/si/physical-constants";
import lossReference from "../../reference/impedance/loss.json";
import impedanceReference from "../../reference/impedance/rl.json";
import { referenceSection, type ReferenceSectionCase } from "../../support/reference-cross-section";

const SIGMA = COPPER_CONDUCTIVITY;
const copper: ConductorInput = { conductivity: SIGMA };
const MM = 1e-3;

interface LossResult {
  kR_per_m: number;
  filling_dlnC_dlneps: Record<string, number>;
  R_hf_ohm_per_m_at_1GHz_rho1p724e8: number;
}
type LossCase = ReferenceSectionCase & { results: Record<string, LossResult> };

/** Materials get loss tangents that tell them apart, in the order of the reference's names. */
function lossy(section: CrossSection): CrossSection {
  return {
    ...section,
    layers: section.layers.map((layer, i) => ({ ...layer, tanD: 0.01 + i * 1e-3 })),
    ...(section.mask && { mask: { ...section.mask, tanD: 0.03 } }),
  };
}

const microstrip: CrossSection = {
  layers: [{ thickness: 0.2 * MM, er: 4.2, tanD: 0.015 }],
  upperPlane: false,
  traces: [{ x: 0, y: 0.2 * MM, thickness: 35e-6, widthBottom: 0.35 * MM, widthTop: 0.33 * MM }],
};

describe("high-frequency loss against tests/reference/impedance/loss.json (finite elements)", () => {
  for (const entry of lossReference.cases as unknown as LossCase[]) {
    const bare = referenceSection({ ...entry, structure: entry.structure.replace(/^loss-/, "") });
    if (!bare) throw new Error(`${entry.id} is no cross-section.`);
    const section = lossy(bare);
    const loss = lineLoss(section, solveCrossSection(section), copper, Float64Array.of(1e9, 1e11));
    for (const [name, wanted] of Object.entries(entry.results)) {
      const mode = loss.modes.find((candidate) => candidate.name === name);
      it(`${entry.id} ${name}: kR within 0.1 %, filling factors within 0.1 %, R at 1 GHz within 2 % of Rs kR`, () => {
        expect(Math.abs((mode?.resistanceFactor ?? 0) / wanted.kR_per_m - 1)).toBeLessThan(1e-3);
        expect(
          Math.abs((mode?.resistance[0] ?? 0) / wanted.R_hf_ohm_per_m_at_1GHz_rho1p724e8 - 1),
        ).toBeLessThan(0.02);
        const order = ["er", "er_lower", "er_fill", "er_upper", "er_mask"];
        const factors = order.flatMap((key) => wanted.filling_dlnC_dlneps[key] ?? []);
        expect(mode?.filling).toHaveLength(factors.length);
        mode?.filling.forEach(({ factor }, i) => {
          expect(Math.abs(factor - (factors[i] ?? Number.NaN))).toBeLessThan(1e-3);
        });
      });
    }
  }
});

describe("R(f) and L(f) against tests/reference/impedance/rl.json (finite elements, 1 kHz to 10 GHz)", () => {
  for (const entry of impedanceReference.cases) {
    const g = entry.geometry_mm;
    const section: CrossSection = {
      layers: [{ thickness: g.h * MM, er: 1 }],
      upperPlane: false,
      traces: [{ x: 0, y: g.h * MM, thickness: g.t * MM, widthBottom: g.w * MM, widthTop: g.w * MM }],
    };
    const conductor: ConductorInput = {
      conductivity: 1 / entry.conductor.rho_ohm_m,
      planeThickness: g.plane_thickness * MM,
      planeWidth: g.plane_width * MM,
    };
    const { table, R_dc_ohm_per_m: direct } = entry.results;
    const listed = table.map((row) => row.f_Hz);

    it(`${entry.id}: R within 1 % and L within 0.5 % at every frequency, alone or between many others`, () => {
      const many = Array.from({ length: 120 }, (_, i) => 1e3 * 10 ** ((i * 7) / 119));
      const params = solveCrossSection(section);
      for (const frequencies of [listed, [...listed, ...many]]) {
        const loss = lineLoss(section, params, conductor, Float64Array.from(frequencies));
        table.forEach((row, k) => {
          expect(
            Math.abs((loss.resistance[k] ?? 0) / row.R_ohm_per_m - 1),
            `R at ${row.f_Hz} Hz`,
          ).toBeLessThan(0.01);
          expect(Math.abs((loss.inductance[k] ?? 0) / row.L_H_per_m - 1), `L at ${row.f_Hz} Hz`).toBeLessThan(
            0.005,
          );
        });
      }
    });

    it(`${entry.id}: R at direct current is that of trace and plane in series to 1e-6 (computed)`, () => {
      const loss = lineLoss(section, solveCrossSection(section), conductor, Float64Array.of(0));
      expect(Math.abs((loss.resistance[0] ?? 0) / direct - 1)).toBeLessThan(1e-6);
    });
  }
});

describe("loss over frequency", () => {
  const frequencies = Float64Array.from({ length: 60 }, (_, i) => 1e5 * 10 ** (i / 10));
  const params = solveCrossSection(microstrip);
  const smooth = lineLoss(microstrip, params, copper, frequencies);

  it("R rises and L falls with frequency everywhere, also across the joint of both methods", () => {
    for (let k = 1; k < frequencies.length; k++) {
      expect(smooth.resistance[k]!).toBeGreaterThan(smooth.resistance[k - 1]!);
      expect(smooth.inductance[k]!).toBeLessThan(smooth.inductance[k - 1]!);
    }
  });

  it("parts sum to the real part of γ = √((R + jωL)(G + jωC)) to 1e-9 (telegrapher's equations)", () => {
    frequencies.forEach((f, k) => {
      const w = 2 * Math.PI * f;
      const [r, l, g, c] = [
        smooth.resistance[k]!,
        smooth.inductance[k]!,
        smooth.conductance[k]!,
        smooth.capacitance[k]!,
      ];
      const re = r * g - w * w * l * c;
      const im = w * (r * c + l * g);
      const alpha = Math.sqrt((Math.sqrt(re * re + im * im) + re) / 2);
      // at low loss the subtraction in `alpha` itself leaves few digits
      expect(Math.abs(smooth.attenuation[k]! / alpha - 1)).toBeLessThan(1e-6);
      expect(smooth.total[k]!).toBeCloseTo(smooth.conductor[k]! + smooth.dielectric[k]!, 9);
    });
  });

  it("dielectric part is (π f/c) √εeff Σ q tanδ within 1 % at the frequency of the data (loss.json's definition)", () => {
    const at = lineLoss(microstrip, params, copper, Float64Array.of(1e9));
    const q = at.filling[0]!.factor;
    const e = params.single!.effectivePermittivity;
    const wanted = ((Math.PI * 1e9) / LIGHT_SPEED) * Math.sqrt(e) * q * 0.015 * (20 / Math.LN10);
    expect(Math.abs(at.dielectric[0]! / wanted - 1)).toBeLessThan(0.01);
  });

  it("impedance and permittivity tend to the static values: Z within 0.5 %, εeff within 2 % at 10 GHz", () => {
    const at = lineLoss(microstrip, params, copper, Float64Array.of(1e10), { dielectricsAt_Hz: 1e10 });
    expect(Math.abs(at.impedance[0]! / params.single!.impedance - 1)).toBeLessThan(0.005);
    expect(Math.abs(at.effectivePermittivity[0]! / params.single!.effectivePermittivity - 1)).toBeLessThan(
      0.02,
    );
  });

  it("Dk falls with frequency, so impedance at 10 GHz is above that at 1 GHz (causal dielectric)", () => {
    const at = lineLoss(microstrip, params, copper, Float64Array.of(1e9, 1e10));
    expect(at.impedance[1]!).toBeGreaterThan(at.impedance[0]!);
    expect(at.effectivePermittivity[1]!).toBeLessThan(at.effectivePermittivity[0]!);
  });

  it("roughness multiplies R by its factor", () => {
    const roughness = { model: "cannonball", tenPoint: 3e-6 } as const;
    const rough = lineLoss(microstrip, params, { ...copper, roughness }, frequencies);
    frequencies.forEach((f, k) => {
      const factor = roughnessFactor(roughness, skinDepth(SIGMA, f));
      expect(rough.resistance[k]! / smooth.resistance[k]!).toBeCloseTo(factor, 9);
    });
  });

  it("a pair's odd mode gives the figures at the top; far apart, both modes are the single line's within 1 %", () => {
    const traces = [-2.5, 2.5].map((x) => ({ ...microstrip.traces[0]!, x: x * MM }));
    const pair = { ...microstrip, traces };
    const at = Float64Array.of(1e8, 1e10);
    const one = lineLoss(microstrip, params, { ...copper, planeWidth: 12 * MM }, at);
    const two = lineLoss(pair, solveCrossSection(pair), { ...copper, planeWidth: 12 * MM }, at);
    expect(two.resistance).toEqual(two.odd?.resistance);
    for (const mode of [two.odd, two.even]) {
      at.forEach((_, k) => {
        expect(Math.abs(mode!.resistance[k]! / one.resistance[k]! - 1)).toBeLessThan(0.01);
        expect(Math.abs(mode!.total[k]! / one.total[k]! - 1)).toBeLessThan(0.01);
      });
    }
  });

  it("of unequal and broadside pairs has two modes whose resistances tend to Rs kR within 2 % (limit)", () => {
    const [left] = microstrip.traces;
    const unequal: CrossSection = {
      ...microstrip,
      traces: [
        { ...left!, x: -0.3 * MM },
        { ...left!, x: 0.3 * MM, widthBottom: 0.25 * MM, widthTop: 0.23 * MM },
      ],
    };
    const broadside = (upper: number): CrossSection => ({
      layers: [{ thickness: 0.8 * MM, er: 4, tanD: 0.01 }],
      upperPlane: true,
      traces: [0.25, upper].map((y) => ({
        x: 0,
        y: y * MM,
        thickness: 35e-6,
        widthBottom: 0.2 * MM,
        widthTop: 0.2 * MM,
      })),
    });
    for (const section of [unequal, broadside(0.5), broadside(0.515)]) {
      const loss = lineLoss(section, solveCrossSection(section), copper, Float64Array.of(1e7, 1e11));
      expect(loss.modes).toHaveLength(2);
      for (const mode of loss.modes) {
        const rule = surfaceResistance(SIGMA, 1e11) * mode.resistanceFactor;
        expect(Math.abs(mode.resistance[1]! / rule - 1)).toBeLessThan(0.02);
        expect(mode.resistance[0]!).toBeGreaterThan(0);
        expect(mode.total[1]!).toBeGreaterThan(mode.total[0]!);
      }
    }
  });

  it("refuses what it cannot compute, naming the field", () => {
    const at = Float64Array.of(1e9);
    const thin = { ...microstrip, traces: [{ ...microstrip.traces[0]!, thickness: 0 }] };
    expect(() => lineLoss(thin, solveCrossSection(thin), copper, at)).toThrow(
      expect.objectContaining({ field: "traces[0].thickness" }),
    );
    expect(() => lineLoss(microstrip, params, { conductivity: -1 }, at)).toThrow(
      expect.objectContaining({ field: "conductor.conductivity" }),
    );
    expect(() => lineLoss(microstrip, params, copper, Float64Array.of(Number.NaN))).toThrow(
      expect.objectContaining({ field: "frequencies" }),
    );
  });
});
