import { describe, expect, it } from "vitest";
import { normalProbability, normalQuantile } from "@/lib/si/spread/normal-quantile";
import { randomNumbers, xoshiro } from "@/lib/si/spread/random";
import { drawSamples, relativeSigma } from "@/lib/si/spread/samples";
import { spreadStatistics } from "@/lib/si/spread/statistics";
import type { Factor } from "@/lib/si/spread/tolerances";

const factor = (distribution: Factor["distribution"], sigmas = 3): Factor => ({
  target: { kind: "width" },
  name: "width",
  nominal: 1,
  range: 0.1,
  distribution,
  sigmas,
});

describe("random numbers", () => {
  it("from state 1, 2, 3, 4 begin 11520, 0, 5927040, 70819200 (computed by hand from the definition)", () => {
    const next = xoshiro([1, 2, 3, 4]);
    expect([next(), next(), next(), next()].map((value) => value * 2 ** 32)).toEqual([
      11520, 0, 5927040, 70819200,
    ]);
  });

  it("fill [0, 1) evenly: mean, variance and each tenth within 4 standard errors, for several seeds", () => {
    for (const seed of [0, 1, 2, 12345, -7]) {
      const next = randomNumbers(seed);
      const tenths = new Array<number>(10).fill(0);
      let sum = 0;
      for (let i = 0; i < 1e4; i++) {
        const value = next();
        sum += value;
        tenths[Math.floor(value * 10)]!++;
      }
      expect(Math.abs(sum / 1e4 - 0.5)).toBeLessThan(4 / Math.sqrt(12e4));
      for (const count of tenths) expect(Math.abs(count - 1000)).toBeLessThan(4 * 30);
    }
  });
});

describe("normal distribution", () => {
  it("quantiles 0.975, 0.841344746…, 1e-10 are 1.959963985, 1, −6.361340902 (tables)", () => {
    expect(normalQuantile(0.975)).toBeCloseTo(1.959963984540054, 12);
    expect(normalQuantile(0.8413447460685429)).toBeCloseTo(1, 12);
    expect(normalQuantile(1e-10)).toBeCloseTo(-6.361340902404056, 10);
    expect(normalQuantile(0.5)).toBe(0);
  });

  it("probability inverts it: Φ(3) = 0.998650102 (tables)", () => {
    expect(normalProbability(3)).toBeCloseTo(0.9986501019683699, 13);
    expect(normalProbability(-1)).toBeCloseTo(1 - 0.8413447460685429, 13);
    expect(normalProbability(0)).toBe(0.5);
  });
});

describe("samples", () => {
  for (const sampling of ["latin", "random"] as const) {
    for (const item of [factor("normal"), factor("normal", 2), factor("uniform")]) {
      it(`${sampling}, ${item.distribution} cut at ${item.sigmas}: inside ± 1, mean 0, sigma as computed within 3 %`, () => {
        const values = drawSamples([item], 4000, 9, sampling);
        const { mean, sigma } = spreadStatistics(values, 0);
        expect(Math.max(...values.map(Math.abs))).toBeLessThanOrEqual(1);
        expect(Math.abs(mean)).toBeLessThan(sampling === "latin" ? 1e-3 : 0.02);
        expect(Math.abs(sigma / relativeSigma(item) - 1)).toBeLessThan(0.03);
      });
    }
  }

  it("a normal factor cut at 3 sigma has 0.98658 of its sigma (computed)", () => {
    expect(3 * relativeSigma(factor("normal"))).toBeCloseTo(0.98658, 4);
    expect(relativeSigma(factor("uniform"))).toBeCloseTo(1 / Math.sqrt(3), 15);
  });

  it("latin: every equally likely part of every factor is hit once, and factors are not correlated", () => {
    const two = drawSamples([factor("uniform"), factor("uniform")], 500, 4, "latin");
    for (const f of [0, 1]) {
      const parts = new Set(
        Array.from({ length: 500 }, (_, i) => Math.floor(((two[2 * i + f]! + 1) / 2) * 500)),
      );
      expect(parts.size).toBe(500);
    }
    let product = 0;
    for (let i = 0; i < 500; i++) product += two[2 * i]! * two[2 * i + 1]!;
    expect(Math.abs((3 * product) / 500)).toBeLessThan(4 / Math.sqrt(500));
  });
});
