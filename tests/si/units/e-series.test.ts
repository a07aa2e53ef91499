import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { DomainError } from "@/lib/si/errors";
import { eSeriesBetween, nearestESeries } from "@/lib/si/units";

describe("standard values (IEC 60063)", () => {
  it.each([
    [33.2, "E24", 33],
    [50, "E24", 51],
    [50, "E96", 49.9],
    [97, "E24", 100],
    [0.97, "E24", 1],
    [4700, "E12", 4700],
    [120.5, "E96", 121],
    [9.76e6, "E96", 9.76e6],
  ] as const)("nearest to %s in %s is %s", (wanted, series, value) =>
    expect(nearestESeries(wanted, series).value).toBe(value),
  );

  it("has 24 and 96 values a decade", () => {
    expect(eSeriesBetween(10, 99.9, "E24")).toHaveLength(24);
    expect(eSeriesBetween(100, 999, "E96")).toHaveLength(96);
  });

  it("is within half a step: 7.5 % for E24, 1.5 % for E96, and lies between its neighbours", () => {
    fc.assert(
      fc.property(fc.double({ min: 1e-9, max: 1e9, noNaN: true }), (wanted) => {
        const coarse = nearestESeries(wanted, "E24");
        expect(Math.abs(coarse.deviation)).toBeLessThan(0.075);
        expect(coarse.below).toBeLessThanOrEqual(wanted);
        expect(coarse.above).toBeGreaterThanOrEqual(wanted);
        expect(Math.abs(nearestESeries(wanted, "E96").deviation)).toBeLessThan(0.015);
      }),
    );
  });

  it("refuses zero, negative and endless values", () => {
    for (const bad of [0, -1, Number.NaN, Infinity])
      expect(() => nearestESeries(bad, "E24")).toThrow(DomainError);
  });
});
