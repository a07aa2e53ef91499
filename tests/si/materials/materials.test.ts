import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  copperFoils,
  dielectricFamilies,
  dkAtFrequency,
  findGlassStyle,
  foilTreatments,
  genericMaterials,
  glassKinds,
  glassStyles,
  mixedPermittivity,
  plyOfFamily,
  pressedPlyThickness,
  resinPermittivity,
  resinVolume,
} from "@/lib/si/materials";
import { toSi } from "@/lib/si/units";

const glass = glassKinds["e-glass"];

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

  it("profile classes keep their limits of Rz: L 10.2 µm, V 5.1 µm (IPC-4562, from memory); Rz is 3 to 5 times rms", () => {
    for (const { profile, roughness, peakToValley } of foilTreatments) {
      if (profile === "L") expect(peakToValley).toBeLessThanOrEqual(10.2e-6);
      if (profile === "V") expect(peakToValley).toBeLessThanOrEqual(5.1e-6);
      expect(peakToValley / roughness).toBeGreaterThan(3);
      expect(peakToValley / roughness).toBeLessThan(5);
    }
  });
});

describe("mixing resin and glass", () => {
  const neat = { er: 3.35, tanD: 0.026 };

  it("volume share of resin: 44 % by weight is 59.1 % (computed)", () => {
    expect(resinVolume(0.44, glass)).toBeCloseTo(0.5912, 4);
    expect(resinVolume(1, glass)).toBe(1);
  });

  it("agrees with the listed Dk of every glass style within 3 %, with one resin of 3.35", () => {
    for (const style of glassStyles) {
      const { er } = mixedPermittivity(neat, Number(style.resinPercent) / 100, glass);
      expect(Math.abs(er / Number(style.dk) - 1), style.style).toBeLessThan(0.03);
    }
  });

  it("agrees with the listed thickness of every glass style within 6 %", () => {
    for (const style of glassStyles) {
      const thickness = pressedPlyThickness(
        style.gramsPerSquareMetre / 1000,
        Number(style.resinPercent) / 100,
        glass,
      );
      expect(Math.abs(thickness / toSi(style.thickness, "length") - 1), style.style).toBeLessThan(0.06);
    }
  });

  it("lies between resin and glass, falls with resin content, and turns round to 1e-9", () => {
    const weight = fc.double({ min: 0.2, max: 0.95, noNaN: true });
    fc.assert(
      fc.property(weight, weight, (a, b) => {
        const [less, more] = [Math.min(a, b), Math.max(a, b)];
        const mixed = mixedPermittivity(neat, less, glass);
        expect(mixed.er).toBeGreaterThanOrEqual(neat.er);
        expect(mixed.er).toBeLessThanOrEqual(glass.er);
        expect(mixedPermittivity(neat, more, glass).er).toBeLessThanOrEqual(mixed.er);
        const back = resinPermittivity(mixed, less, glass);
        expect(Math.abs(back.er / neat.er - 1)).toBeLessThan(1e-9);
        expect(Math.abs(back.tanD / neat.tanD - 1)).toBeLessThan(1e-9);
      }),
    );
  });

  it("a ply gets thicker with resin and with heavier fabric", () => {
    expect(pressedPlyThickness(0.1, 0.6, glass)).toBeGreaterThan(pressedPlyThickness(0.1, 0.5, glass));
    expect(pressedPlyThickness(0.2, 0.5, glass)).toBeCloseTo(2 * pressedPlyThickness(0.1, 0.5, glass), 15);
  });

  it("refuses what is no resin content, no fabric and no woven family", () => {
    expect(() => resinVolume(0, glass)).toThrow(/Resin content/);
    expect(() => pressedPlyThickness(0.1, 1, glass)).toThrow(/below 100 %/);
    expect(() => pressedPlyThickness(0, 0.5, glass)).toThrow(/fabric/);
    expect(() => resinPermittivity({ er: 1.2, tanD: 0.02 }, 0.3, glass)).toThrow(/No resin/);
    const film = dielectricFamilies.find(({ id }) => id === "polyimide-film");
    const style = findGlassStyle("2116");
    if (!film || !style) throw new Error("The library lacks what this test reads.");
    expect(() => plyOfFamily(film, style, 50)).toThrow(/no woven glass/);
  });

  it("each woven family gives back its own Dk at its own resin content, to 1e-12", () => {
    const style = findGlassStyle("2116");
    for (const family of dielectricFamilies) {
      if (!family.base || !style) continue;
      const ply = plyOfFamily(family, style, Number(family.base.resinPercent));
      expect(Math.abs(ply.dk / Number(family.dk) - 1)).toBeLessThan(1e-12);
      expect(Math.abs(ply.df / Number(family.df) - 1)).toBeLessThan(1e-12);
    }
  });
});

describe("Dk at another frequency", () => {
  it("falls by (2/π) ln 10 · tan δ a decade: 4.3 with 0.02 at 1 GHz is 4.174 at 10 GHz (computed)", () => {
    expect(dkAtFrequency(4.3, 0.02, 1e9, 1e10)).toBeCloseTo(4.1739, 4);
    expect(dkAtFrequency(4.3, 0.02, 1e9, 1e9)).toBe(4.3);
    expect(dkAtFrequency(4.3, 0, 1e9, 1e10)).toBe(4.3);
  });

  it("there and back differs by the second order only: 0.5 % over two decades at 0.025", () => {
    const there = dkAtFrequency(4, 0.025, 1e9, 1e11);
    expect(Math.abs(dkAtFrequency(there, 0.025, 1e11, 1e9) / 4 - 1)).toBeLessThan(0.0055);
  });

  it("refuses three decades, and Dk below air", () => {
    expect(() => dkAtFrequency(4, 0.02, 1e8, 1e11)).toThrow(/two decades/);
    expect(() => dkAtFrequency(0.9, 0.02, 1e9, 1e10)).toThrow(/at least 1/);
    expect(() => dkAtFrequency(4, 0.2, 1e9, 1e10)).toThrow(/0\.1/);
    expect(() => dkAtFrequency(4, 0.02, 0, 1e10)).toThrow(/above zero/);
  });
});

describe("the generic library", () => {
  it("has all kinds, each name once, each with its source, each with what a layer of it needs", () => {
    expect(new Set(genericMaterials.map(({ kind }) => kind))).toEqual(
      new Set(["laminate", "prepreg", "foil", "mask"]),
    );
    expect(new Set(genericMaterials.map(({ name }) => name)).size).toBe(genericMaterials.length);
    for (const entry of genericMaterials) {
      expect(entry.source, entry.name).not.toBe("");
      if (entry.kind === "foil") expect(entry.thickness ?? entry.roughness, entry.name).not.toBeNull();
      else {
        expect(Number(entry.dk), entry.name).toBeGreaterThan(1);
        expect(Number(entry.df), entry.name).toBeGreaterThan(0);
        expect(entry.frequency, entry.name).not.toBeNull();
      }
      if (entry.kind === "prepreg") expect(entry.thickness, entry.name).not.toBeNull();
    }
  });

  it("plies of a family get a lower Dk as resin rises, and keep the order of loss of the families", () => {
    const ply = (name: string) => genericMaterials.find((entry) => entry.name === name);
    const [light, heavy] = [ply("Modified epoxy, low loss, 106"), ply("Modified epoxy, low loss, 2116")];
    expect(Number(light?.dk)).toBeLessThan(Number(heavy?.dk));
    expect(Number(ply("Polyphenylene ether, very low loss, 1080")?.df)).toBeLessThan(
      Number(ply("Modified epoxy, mid loss, 1080")?.df),
    );
  });
});
