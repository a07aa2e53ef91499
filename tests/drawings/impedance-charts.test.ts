import { describe, expect, it } from "vitest";
import { csvText } from "@/lib/drawings/csv-rows";
import { curveRows, impedanceWidth } from "@/lib/drawings/impedance-width.geometry";
import { lossFrequency, lossRows, lossText } from "@/lib/drawings/loss-frequency.geometry";
import type { Mark, RectMark } from "@/lib/drawings/marks";
import { histogramRows, spreadHistogram } from "@/lib/drawings/spread-histogram.geometry";
import { svgString } from "@/lib/drawings/svg-string";
import { toleranceBars, toleranceRows } from "@/lib/drawings/tolerance-bars.geometry";
import { texts } from "./texts";

const bins = [
  { from: 44, to: 46, count: 10 },
  { from: 46, to: 50, count: 60 },
  { from: 50, to: 54, count: 30 },
];
const target = { ohms: 50, tolerance: 0.1 };

const rects = (marks: readonly Mark[]) => marks.filter((m): m is RectMark => m.kind === "rect");

describe("spread of production", () => {
  it("hatches what lies outside the tolerance and cuts a bar at the limit, to 1 px", () => {
    const drawing = spreadHistogram(bins, { width: 600, target, low: 44.5, high: 53.5 });
    const hatched = rects(drawing.marks).filter((m) => m.fill === "hatch-fail");
    expect(hatched).toHaveLength(1);
    const [bar] = hatched;
    const sound = rects(drawing.marks).filter((m) => m.fill === "copper");
    // 44 to 45 Ω is outside, 45 to 46 Ω within: two halves of one bar
    expect(sound).toHaveLength(3);
    expect(Math.abs((bar?.width ?? 0) - (sound[0]?.width ?? 0))).toBeLessThan(1);
    expect(drawing.description).toContain("About 5.0\u2009% lies outside.");
  });

  it("says when nothing was sampled, and never writes a number that is none", () => {
    expect(spreadHistogram([], { width: 300, target, low: 0, high: 0 }).empty).toBe("Nothing was sampled.");
    const drawing = spreadHistogram(bins, { width: 300, target, low: 44.5, high: 53.5 });
    expect(svgString(drawing)).not.toMatch(/NaN|Infinity/);
    expect(histogramRows(bins)[1]).toEqual([44, 46, 10]);
  });
});

describe("which tolerance matters most", () => {
  const shares = [
    { name: "width", share: 0.25, ohms: -2 },
    { name: "thickness of Prepreg 1-2", share: 0.7, ohms: 3.3 },
    { name: "side slope", share: 0.001, ohms: 0.1 },
  ];

  it("draws the largest first, leaves out what is below half a per cent and says so", () => {
    const drawing = toleranceBars(shares, { width: 480 });
    expect(texts(drawing)).toEqual([
      "thickness of Prepreg 1-2",
      "70\u2009%, ±3.3\u2009Ω",
      "width",
      "25\u2009%, ±2.0\u2009Ω",
    ]);
    expect(drawing.description).toContain("1 more below half a per cent.");
    expect(toleranceRows(shares)).toHaveLength(4);
  });

  it("cuts a name to its room and keeps the whole in its tip", () => {
    const long = { name: "thickness of the third prepreg from the top", share: 1, ohms: 1 };
    const drawing = toleranceBars([long], { width: 320 });
    expect(texts(drawing)[0]).toMatch(/^thickness of the.*…$/);
    expect(JSON.stringify(drawing.marks)).toContain(`"tip":"${long.name}"`);
  });
});

describe("loss against frequency", () => {
  const points = [1e8, 1e9, 1e10].map((frequency) => ({
    frequency,
    conductor: 1e-4 * Math.sqrt(frequency),
    dielectric: 2e-9 * frequency,
  }));

  it("spaces decades evenly, to 0.01 px, and names its three curves", () => {
    const drawing = lossFrequency(points, { width: 700, unit: "mm" });
    const at = (label: string) =>
      drawing.marks.find((m) => m.kind === "text" && m.spans.map((s) => s.text).join("") === label);
    const [a, b, c] = ["100\u2009MHz", "1\u2009GHz", "10\u2009GHz"].map((label) => {
      const mark = at(label);
      return mark?.kind === "text" ? mark.x : NaN;
    });
    expect((b ?? 0) - (a ?? 0)).toBeCloseTo((c ?? 0) - (b ?? 0), 2);
    expect(texts(drawing)).toEqual(expect.arrayContaining(["total", "conductor", "dielectric", "dB/m"]));
  });

  it("gives decibels by metre or by inch, 1 dB/m being 0.0254 dB/in", () => {
    expect(lossText(10, "mm")).toBe("10\u2009dB/m");
    expect(lossText(10, "mil")).toBe("0.254\u2009dB/in");
    expect(lossRows(points, "mil")[0]?.[3]).toBe("total (dB/in)");
    expect(lossRows(points, "mm")[2]?.[3]).toBeCloseTo(1e-4 * Math.sqrt(1e9) + 2, 4);
  });

  it("says when no loss is known", () => {
    expect(lossFrequency([], { width: 300, unit: "mm" }).empty).toBe("No loss is known.");
  });
});

describe("impedance against width", () => {
  const points = [0.1, 0.2, 0.3, 0.4].map((mm) => ({
    width: mm * 1e-3,
    impedance: 70 - 100 * mm,
    low: 1,
    high: 90,
  }));

  it("marks grid steps where they have room and what is too narrow to be etched", () => {
    const plain = impedanceWidth(points, { width: 600, unit: "mm" });
    const full = impedanceWidth(points, { width: 600, unit: "mm", grid: 5e-6, least: 0.125e-3 });
    // 0.1 to 0.4 mm in steps of 5 µm: 61 steps
    expect(
      full.marks.filter((m) => m.kind === "line").length -
        plain.marks.filter((m) => m.kind === "line").length,
    ).toBe(62);
    expect(texts(full)).toContain("least etched");
    expect(full.description).toContain("Widths below 0.125\u2009mm are not etched.");
    expect(svgString(full)).not.toMatch(/NaN|Infinity/);
  });

  it("exports width, impedance and its spread", () => {
    expect(csvText(curveRows(points, "mm")).split(/\r?\n/).slice(0, 2)).toEqual([
      "width (mm),impedance (Ω),0.5th percentile (Ω),99.5th percentile (Ω)",
      "0.1,60,1,90",
    ]);
  });
});
