import { describe, expect, it } from "vitest";
import {
  cannonballRoughness,
  COPPER_CONDUCTIVITY,
  hammerstadRoughness,
  hurayRoughness,
  roughnessFactor,
  skinDepth,
  surfaceImpedance,
  surfaceResistance,
  wideBandDebye,
} from "@/lib/si/frequency";

describe("wide-band Debye dielectric (Djordjević et al. 2001)", () => {
  const glass = wideBandDebye({ er: 4.3, tanD: 0.02, at_Hz: 1e9 });

  it("falls by Δ ln 10 a decade and has a loss tangent flat within 12 % from 1 MHz to 100 GHz", () => {
    expect(glass.at(1e7).re - glass.at(1e8).re).toBeCloseTo(glass.rise * Math.LN10, 6);
    for (const f of [1e6, 1e7, 1e8, 1e9, 1e10, 1e11]) {
      const { re, im } = glass.at(f);
      expect(Math.abs(-im / re / 0.02 - 1)).toBeLessThan(0.12);
    }
  });

  it("is causal: ε'(f) is the Kramers–Kronig integral of ε'' to 0.1 % of the rise (computed)", () => {
    // ε'(f) − ε∞ = (2/π) P∫ x ε''(x)/(x² − f²) dx, in x = f e^u with the pole taken off by symmetry
    for (const f of [1e6, 1e8, 1e9, 3e10]) {
      let sum = 0;
      const step = 2e-3;
      for (let u = step / 2; u < 40; u += step) {
        // x = f e^{±u}: kernels e^{2u}/(e^{2u} − 1) and 1/(1 − e^{2u}) in du
        const high = -glass.at(f * Math.exp(u)).im;
        const low = -glass.at(f * Math.exp(-u)).im;
        const k = 1 / -Math.expm1(-2 * u);
        sum += (high * k - low * (k - 1)) * step;
      }
      const real = glass.infinite + (2 / Math.PI) * sum;
      expect(Math.abs(real - glass.at(f).re)).toBeLessThan(1e-3 * (glass.at(0).re - glass.infinite));
    }
  });

  it("tends to ε∞ above and to a finite value below its limits, and is flat without loss (limits)", () => {
    expect(glass.at(1e16).re).toBeCloseTo(glass.infinite, 4);
    expect(glass.at(0).im).toBe(0);
    const air = wideBandDebye({ er: 1, tanD: 0, at_Hz: 1e9 });
    expect(air.at(1e3).re).toBe(1);
    expect(Math.abs(air.at(1e10).im)).toBe(0);
  });

  it("refuses what it cannot describe, naming the field", () => {
    expect(() => wideBandDebye({ er: 0.9, tanD: 0, at_Hz: 1e9 })).toThrow(
      expect.objectContaining({ field: "er" }),
    );
    expect(() => wideBandDebye({ er: 4, tanD: Number.NaN, at_Hz: 1e9 })).toThrow(
      expect.objectContaining({ field: "tanD" }),
    );
    expect(() => wideBandDebye({ er: 4, tanD: 0.02, at_Hz: 1e13 })).toThrow(
      expect.objectContaining({ field: "at_Hz" }),
    );
    expect(() => wideBandDebye({ er: 1.2, tanD: 0.5, at_Hz: 1e9 })).toThrow(
      expect.objectContaining({ field: "tanD" }),
    );
  });
});

describe("skin effect", () => {
  it("of copper is 2.09 µm and 8.25 mΩ at 1 GHz (common practice, no source)", () => {
    expect(skinDepth(COPPER_CONDUCTIVITY, 1e9)).toBeCloseTo(2.09e-6, 8);
    expect(surfaceResistance(COPPER_CONDUCTIVITY, 1e9)).toBeCloseTo(8.25e-3, 5);
  });

  it("of a sheet is 1/(σt) at low and (1 + j) Rs at high frequency (limits)", () => {
    const t = 35e-6;
    const low = surfaceImpedance(COPPER_CONDUCTIVITY, 1e3, { thickness: t });
    expect(low.re * COPPER_CONDUCTIVITY * t).toBeCloseTo(1, 6);
    const high = surfaceImpedance(COPPER_CONDUCTIVITY, 1e10, { thickness: t });
    const rs = surfaceResistance(COPPER_CONDUCTIVITY, 1e10);
    expect(high.re).toBeCloseTo(rs, 9);
    expect(high.im).toBeCloseTo(rs, 9);
    const thick = surfaceImpedance(COPPER_CONDUCTIVITY, 1e10);
    expect(thick).toEqual({ re: rs, im: rs });
  });

  it("of a sheet never has less resistance than half a skin depth more metal would give: R t σ ≥ 1", () => {
    for (const f of [1e4, 1e6, 1e7, 1e8, 1e9]) {
      const { re, im } = surfaceImpedance(COPPER_CONDUCTIVITY, f, { thickness: 18e-6 });
      expect(re * COPPER_CONDUCTIVITY * 18e-6).toBeGreaterThan(1);
      expect(im).toBeGreaterThan(0);
    }
  });
});

describe("roughness", () => {
  it("by Hammerstad goes from 1 to 2 (limits)", () => {
    expect(hammerstadRoughness(0, 1e-6)).toBe(1);
    expect(hammerstadRoughness(1e-3, 1e-6)).toBeCloseTo(2, 5);
  });

  it("by cannonballs saturates at 1 + 7π/3 = 8.33, whatever Rz (the model's definition)", () => {
    expect(cannonballRoughness(1, 1e-12)).toBeCloseTo(1 + (7 * Math.PI) / 3, 6);
    expect(cannonballRoughness(0, 1e-6)).toBe(1);
  });

  it("by cannonballs is Huray's sum with r = 0.06 Rz within 1 % (rounded factor in common use)", () => {
    const rz = 3e-6;
    const r = 0.06 * rz;
    for (const f of [1e9, 1e10, 4e10]) {
      const depth = skinDepth(COPPER_CONDUCTIVITY, f);
      const huray = hurayRoughness([{ radius: r, count: 14 }], 36 * r * r, depth);
      expect(
        Math.abs(roughnessFactor({ model: "cannonball", tenPoint: rz }, depth) / huray - 1),
      ).toBeLessThan(0.01);
    }
  });

  it("grows with roughness and with frequency in every model", () => {
    const models = [
      (s: number) => ({ model: "hammerstad", rms: s }) as const,
      (s: number) => ({ model: "cannonball", tenPoint: s }) as const,
    ];
    for (const model of models) {
      expect(roughnessFactor(model(2e-6), 1e-6)).toBeGreaterThan(roughnessFactor(model(1e-6), 1e-6));
      expect(roughnessFactor(model(1e-6), 1e-6)).toBeGreaterThan(roughnessFactor(model(1e-6), 2e-6));
    }
    expect(() => hammerstadRoughness(-1, 1e-6)).toThrow(expect.objectContaining({ field: "rms" }));
  });
});
