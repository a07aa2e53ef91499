import { describe, expect, it } from "vitest";
import { layerHeights } from "@/lib/drawings/layer-scale";
import type { SectionLayer } from "@/lib/drawings/stackup-layer";
import { stackupSection } from "@/lib/drawings/stackup-section.geometry";
import { svgString } from "@/lib/drawings/svg-string";
import { texts } from "./texts";

const um = 1e-6;
const layers: SectionLayer[] = [
  { id: "m1", kind: "mask", name: "Top mask", thickness_m: 20 * um, maskOverTrace_m: 15 * um, dk: 3.5 },
  { id: "l1", kind: "signal", name: "L1", thickness_m: 45 * um },
  { id: "p1", kind: "prepreg", name: "Prepreg", thickness_m: 110 * um, dk: 4.05 },
  { id: "l2", kind: "plane", name: "L2", thickness_m: 17.5 * um, planeNet: "GND" },
  { id: "c1", kind: "core", name: "Core", thickness_m: 1200 * um, dk: 4.3 },
  { id: "l3", kind: "signal", name: "L3", thickness_m: 45 * um },
];

describe("layerHeights", () => {
  it("is to scale when no layer is below the least height, to 1e-9", () => {
    const { heights, scale } = layerHeights([1, 2, 4], 700, 0);
    expect(heights).toEqual([100, 200, 400]);
    expect(scale).toBeCloseTo(100, 9);
  });

  it("raises thin layers only, keeps the others in proportion and fills the room", () => {
    const { heights, exaggerated } = layerHeights([0.001, 1, 3], 410, 10);
    expect(exaggerated).toEqual([true, false, false]);
    expect(heights[0]).toBe(10);
    expect((heights[2] ?? 0) / (heights[1] ?? 1)).toBeCloseTo(3, 9);
    expect(heights.reduce((a, b) => a + b)).toBeCloseTo(410, 9);
  });

  it("treats a stack without any thickness as all least", () => {
    expect(layerHeights([0, 0], 100, 4).heights).toEqual([4, 4]);
  });
});

describe("stackupSection", () => {
  it("draws layers in proportion to their thickness, to 1e-9", () => {
    const { placed, scale } = stackupSection(layers, { width: 800, unit: "mm", leastHeight: 0 });
    for (const p of placed) {
      const shown = p.layer.kind === "mask" ? p.layer.maskOverTrace_m : p.layer.thickness_m;
      expect(p.height / ((shown ?? 0) * scale)).toBeCloseTo(1, 9);
    }
    expect(
      placed.every(
        (p, i) => i === 0 || Math.abs(p.y - ((placed[i - 1]?.y ?? 0) + (placed[i - 1]?.height ?? 0))) < 1e-9,
      ),
    ).toBe(true);
  });

  it("states total over copper and over mask, and which layers are not to scale", () => {
    const drawing = stackupSection(layers, { width: 800, unit: "mm", leastHeight: 6 });
    expect(drawing.description).toContain("Total 1.4175\u2009mm over copper, 1.4325\u2009mm over mask");
    expect(drawing.description).toMatch(/Drawn thicker than to scale: .*L2/);
    expect(texts(drawing)).toContain("Total");
  });

  it("says no data for a missing thickness and completes no total", () => {
    const open = layers.map((l) => (l.id === "p1" ? { ...l, thickness_m: null } : l));
    const drawing = stackupSection(open, { width: 800, unit: "mil" });
    expect(texts(drawing)).toEqual(expect.arrayContaining(["no data", "not complete"]));
    expect(drawing.description).toContain("The total is not known");
  });

  it("keeps the rows of 37 layers apart", () => {
    const many = Array.from({ length: 37 }, (_, i): SectionLayer => ({
      id: `${i}`,
      kind: i % 2 ? "core" : "plane",
      name: `Row ${i}`,
      thickness_m: (i % 2 ? 90 : 17) * um,
    }));
    const drawing = stackupSection(many, { width: 800, unit: "mm" });
    const rows = drawing.marks.flatMap((m) =>
      m.kind === "text" && m.spans[0]?.text.startsWith("Row") ? [m.y] : [],
    );
    expect(rows).toHaveLength(37);
    rows.forEach((y, i) => i > 0 && expect(y - (rows[i - 1] ?? 0)).toBeGreaterThan(17.9));
  });

  it("says that there is nothing to draw, without a number that is none", () => {
    const drawing = stackupSection([], { width: 800, unit: "mm" });
    expect(drawing.empty).toBe("No layer has a thickness yet.");
    expect(svgString(drawing)).not.toMatch(/NaN|Infinity|undefined/);
  });
});
