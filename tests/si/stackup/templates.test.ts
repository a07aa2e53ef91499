import { describe, expect, it } from "vitest";
import { stackupDoc } from "@/lib/schemas/stackup";
import {
  isCopper,
  isSignal,
  stackupFromTyped,
  stackupTemplates,
  stackupWarnings,
  totalThickness,
  widthOnLayer,
} from "@/lib/si/stackup";

describe("stackup templates", () => {
  it("are of 2, 4, 6, 8, 10, 12 and 18 copper layers", () => {
    expect(stackupTemplates.map((template) => template.copperLayers)).toEqual([2, 4, 6, 8, 10, 12, 18]);
  });

  it("name their layers by place and net, as layouts do", () => {
    const names = (id: string) =>
      stackupTemplates
        .find((template) => template.id === id)
        ?.layers.filter(isCopper)
        .map(({ name, planeNet }) => (planeNet ? `${name} (${planeNet})` : name));
    expect(names("2-layers")).toEqual(["L1 Top", "L2 GND (GND)"]);
    expect(names("6-layers")).toEqual([
      "L1 Top",
      "L2 GND (GND)",
      "L3 Inner",
      "L4 Inner",
      "L5 GND (GND)",
      "L6 Bottom",
    ]);
    expect(names("4-layers")?.[2]).toBe("L3 PWR (PWR)");
  });

  for (const template of stackupTemplates) {
    const stackup = stackupFromTyped(template.layers);

    it(`${template.title}: has as many copper layers as it says, and fits the stored document`, () => {
      expect(template.layers.filter(isCopper)).toHaveLength(template.copperLayers);
      expect(stackupDoc.safeParse({ name: template.title, layers: template.layers }).error).toBeUndefined();
    });

    it(`${template.title}: nothing is wrong, and it is symmetric`, () => {
      expect(stackupWarnings(stackup).filter((warning) => warning.severity !== "info")).toEqual([]);
    });

    it(`${template.title}: is as thick as its title says, within 0.05 mm`, () => {
      const { withoutMask } = totalThickness(template.layers, "mm");
      const wanted = Number(/, ([\d.]+) mm$/.exec(template.title)?.[1]);
      expect(Math.abs(Number(withoutMask.value) - wanted)).toBeLessThan(0.05);
    });

    it(`${template.title}: 50 Ω on each signal layer takes 0.07 to 0.6 mm (two layers: to 3 mm), 100 Ω pairs too`, () => {
      const widest = template.copperLayers === 2 ? 3e-3 : 0.6e-3;
      stackup.layers.forEach((layer, index) => {
        if (!isSignal(layer)) return;
        const search = { stackup, index, min: 40e-6, max: 5e-3 } as const;
        const single = widthOnLayer({ ...search, target: { kind: "single", ohms: 50 }, vary: "width" });
        expect(single.value).toBeGreaterThan(70e-6);
        expect(single.value).toBeLessThan(widest);
        const pair = widthOnLayer({
          ...search,
          target: { kind: "differential", ohms: 100 },
          vary: "width",
          gap: 0.2e-3,
        });
        expect(pair.value).toBeGreaterThan(60e-6);
        expect(pair.value).toBeLessThan(single.value);
      });
    });
  }
});
