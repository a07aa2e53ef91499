import { describe, expect, it } from "vitest";
import { copperFoils, dielectricFamilies, findGlassStyle, glassStyles } from "@/lib/si/materials";
import { toSi } from "@/lib/si/units";

describe("materials", () => {
  it("every Dk is at least 1, every Df below 1, every entry says where it comes from", () => {
    for (const entry of [...dielectricFamilies, ...glassStyles]) {
      expect(Number(entry.dk)).toBeGreaterThanOrEqual(1);
      expect(Number(entry.df)).toBeLessThan(0.1);
      expect(entry.source).toMatch(/from memory/);
    }
  });

  it("more resin means lower Dk (glass about 6, resin about 3.2)", () => {
    const byResin = [...glassStyles].sort((a, b) => Number(a.resinPercent) - Number(b.resinPercent));
    byResin.slice(1).forEach((entry, index) => {
      expect(Number(entry.dk)).toBeLessThanOrEqual(Number(byResin[index]?.dk));
    });
    expect(findGlassStyle(" 2116 ")?.style).toBe("2116");
    expect(findGlassStyle("9999")).toBeUndefined();
  });

  it("foils follow 305 g/m² and 34.3 µm an ounce (IPC-4562, from memory)", () => {
    const half = copperFoils.find((foil) => foil.name === "1/2 oz");
    expect(half && toSi(half.weight, "length")).toBe(17.15e-6);
    expect(half?.gramsPerSquareMetre).toBe(152.5);
  });
});
