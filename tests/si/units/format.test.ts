import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { dimensions, formatSi, formatSiParts } from "@/lib/si/units";

describe("formatSi", () => {
  it.each([
    [0.000127, "length", {}, "0.1270 mm"],
    [18e-6, "length", {}, "18.00 µm"],
    [18e-6, "length", { digits: 2 }, "18 µm"],
    [0.000127, "length", { unit: "mil", digits: 3 }, "5.00 mil"],
    [1.2e-10, "time", { digits: 3 }, "120 ps"],
    [9.9996e-10, "time", { digits: 4 }, "1.000 ns"],
    [49.256, "resistance", { decimals: 1 }, "49.3 Ω"],
    [4700, "resistance", { digits: 2 }, "4.7 kΩ"],
    [-0.25, "voltage", { decimals: 2, unit: "V" }, "−0.25 V"],
    [0.25, "voltage", { decimals: 2, unit: "V", sign: "always" }, "+0.25 V"],
    [-0.0001, "voltage", { decimals: 2, unit: "V" }, "0.00 V"],
    [0.1, "ratio", { digits: 3 }, "10.0 %"],
    [4.3, "ratio", { unit: "1", digits: 3 }, "4.30"],
    [0, "length", {}, "0 mm"],
    [1.25e8, "frequency", { digits: 3 }, "125 MHz"],
    [6.8e-9, "delayPerLength", { digits: 3 }, "6.80 ps/mm"],
  ] as const)("writes %s (%s) as %s → %s", (value, dimension, options, text) =>
    expect(formatSi(value, dimension, options)).toBe(text),
  );

  it("writes a dash where there is no number", () => {
    for (const value of [null, undefined, Number.NaN, Infinity, -Infinity])
      expect(formatSi(value, "length")).toBe("–");
  });

  it("gives number and unit apart, with a fixed number of decimals, for aligned columns", () => {
    expect(formatSiParts(0.0001, "length", { unit: "mm", decimals: 3 })).toEqual({
      text: "0.100",
      unit: "mm",
    });
    expect(formatSiParts(null, "length", { unit: "mm", decimals: 3 })).toEqual({ text: "–", unit: "mm" });
  });

  it("never shows NaN, Infinity or an exponent, for any double in any dimension", () => {
    fc.assert(
      fc.property(fc.double(), fc.constantFrom(...dimensions), (value, dimension) => {
        expect(formatSi(value, dimension)).not.toMatch(/NaN|Infinity|\de[+-]?\d|undefined/);
      }),
    );
  });
});
