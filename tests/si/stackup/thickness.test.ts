import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { DomainError } from "@/lib/si/errors";
import {
  builtThickness,
  builtThicknessExact,
  copperSinkingInto,
  finishedCopper,
  pressedThickness,
  protrusionOf,
  stackupFromTyped,
  stackupTemplates,
  totalThickness,
  type Stackup,
} from "@/lib/si/stackup";
import { convert, toSi } from "@/lib/si/units";
import { core, layer, plane, prepreg, signal, sixLayers } from "../../support/stackups";

const um = 1e-6;
const opening = (plies: number, upper: number, lower: number): Stackup => ({
  layers: [
    core("C1", 200),
    plane("L2", { baseFoil: 35 * um, coverage: upper }),
    layer("prepreg", "D", {
      thickness: null,
      thicknessMode: "pressed",
      plies: [{ style: "2116", thickness: plies * um, count: 2 }],
    }),
    signal("L3", { baseFoil: 18 * um, coverage: lower }),
    core("C2", 200),
  ],
});

describe("pressed thickness = Σ plies − Σ sinking copper × (1 − coverage)", () => {
  it("2 × 120 µm between 35 µm at 80 % and 18 µm at 40 % presses to 222.2 µm (computed)", () => {
    expect(pressedThickness(opening(120, 0.8, 0.4), 2)).toBeCloseTo(222.2 * um, 12);
    expect(builtThickness(opening(120, 0.8, 0.4), 2)).toBeCloseTo(222.2 * um, 12);
  });

  it("full planes take nothing from it", () =>
    expect(pressedThickness(opening(120, 1, 1), 2)).toBeCloseTo(240 * um, 12));

  it("rises with coverage, and never exceeds the plies", () => {
    const share = fc.double({ min: 0, max: 0.98, noNaN: true });
    fc.assert(
      fc.property(share, share, (a, b) => {
        const pressed = pressedThickness(opening(120, a, b), 2);
        expect(pressed).toBeLessThanOrEqual(240 * um * (1 + 1e-12));
        expect(pressedThickness(opening(120, a + 0.01, b), 2)).toBeGreaterThan(pressed);
      }),
    );
  });

  it("refuses plies that cannot fill the copper, and a missing coverage, by name", () => {
    expect(() => pressedThickness(opening(10, 0, 0), 2)).toThrow("cannot fill the copper");
    const blank = opening(120, 0.8, 0.4);
    blank.layers[3] = signal("L3", { coverage: null });
    expect(() => pressedThickness(blank, 2)).toThrow("L3 has no copper coverage");
    expect(() => pressedThickness(sixLayers(), 2)).toThrow(DomainError);
  });
});

describe("which way copper sticks out", () => {
  it("outer copper outward, inner copper from its core into the prepreg", () => {
    const { layers } = sixLayers();
    expect([1, 3, 5, 7, 9, 11].map((at) => protrusionOf(layers, at))).toEqual([
      "up",
      "up",
      "down",
      "up",
      "down",
      "down",
    ]);
    expect(copperSinkingInto(layers, 2)).toEqual([3]);
    expect(copperSinkingInto(layers, 4)).toEqual([]);
    expect(copperSinkingInto(layers, 6)).toEqual([5, 7]);
  });

  it("between two prepregs it sticks outward, away from the middle", () => {
    const layers = [prepreg("A", 50), signal("S"), prepreg("B", 50), plane("P"), core("C", 200)];
    expect(protrusionOf(layers, 1)).toBe("up");
    expect(protrusionOf([...layers].reverse(), 3)).toBe("down");
  });
});

describe("finished copper and totals", () => {
  it("base foil and plating", () => {
    const stackup: Stackup = { layers: [signal("L1", { baseFoil: 17.15 * um, plating: 25 * um })] };
    expect(finishedCopper(stackup, 0)).toBeCloseTo(42.15 * um, 15);
    expect(finishedCopper({ layers: [signal("L1", { baseFoil: null, thickness: 40 * um })] }, 0)).toBe(
      40 * um,
    );
  });

  it("adds exactly what was typed, in any units: ten cores of 0.1 mm and 4 mil are 1.1016 mm", () => {
    const typed = stackupTemplates[0]?.layers.find((item) => item.kind === "core");
    if (!typed) throw new Error("the first template has a core");
    const cores = Array.from({ length: 10 }, () => ({ ...typed, thickness: { value: "0.1", unit: "mm" } }));
    const last = { ...typed, thickness: { value: "4", unit: "mil" } };
    expect(totalThickness([...cores, last], "mm").total.value).toBe("1.1016");
  });

  it("the exact total equals the sum of the built layers, to 1e-12, for every template", () => {
    for (const template of stackupTemplates) {
      const stackup = stackupFromTyped(template.layers);
      const sum = stackup.layers.reduce((total, _, index) => total + builtThickness(stackup, index), 0);
      const { total, missing } = totalThickness(template.layers, "mm");
      expect(missing).toEqual([]);
      expect(Math.abs(toSi(total, "length") / sum - 1)).toBeLessThan(1e-12);
      template.layers.forEach((_, index) => {
        const exact = builtThicknessExact(template.layers, index, "µm");
        expect(exact && toSi(exact, "length")).toBeCloseTo(builtThickness(stackup, index), 15);
      });
    }
  });

  it("names the layers that lack an input; they count as nothing", () => {
    const layers =
      stackupTemplates[1]?.layers.map((item) =>
        item.kind === "core" ? { ...item, thickness: null } : item,
      ) ?? [];
    const { total, missing } = totalThickness(layers, "mm");
    expect(missing).toEqual(["Core 2-3"]);
    expect(Number(convert(total, "mm").value)).toBeGreaterThan(0.4);
  });
});
