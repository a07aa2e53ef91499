import { describe, expect, it } from "vitest";
import type { Mark, PathMark } from "@/lib/drawings/marks";
import { svgString } from "@/lib/drawings/svg-string";
import { maskOutline } from "@/lib/drawings/trace-mask-outline";
import { traceSection } from "@/lib/drawings/trace-section.geometry";
import type { TraceSectionShape } from "@/lib/drawings/trace-shape";
import type { CrossSection } from "@/lib/si/cross-section/types";
import { texts } from "./texts";

const um = 1e-6;
const pair: CrossSection = {
  layers: [
    { thickness: 150 * um, er: 4.3 },
    { thickness: 210 * um, er: 4.05 },
  ],
  upperPlane: true,
  traces: [-110, 110].map((x) => ({
    x: x * um,
    y: 150 * um,
    thickness: 18 * um,
    widthBottom: 100 * um,
    widthTop: 90 * um,
  })),
};
const outer: TraceSectionShape = {
  layers: [{ thickness: 110 * um, er: 4.05 }],
  upperPlane: false,
  traces: [{ x: 0, y: 110 * um, thickness: 45 * um, widthBottom: 190 * um, widthTop: 165 * um }],
  mask: { overLaminate: 20 * um, overTrace: 15 * um, side: 15 * um, er: 3.5 },
};

function traces(marks: readonly Mark[]): number[][] {
  return marks
    .filter((m): m is PathMark => m.kind === "path" && m.hit === "trace")
    .map((m) => (m.d.match(/-?[\d.]+/g) ?? []).map(Number));
}

describe("traceSection", () => {
  it("draws foot and crown width to one scale, to a hundredth of a pixel", () => {
    const drawing = traceSection(pair, { width: 720, unit: "mm" });
    const [left, right] = traces(drawing.marks);
    if (!left || !right) throw new Error("two traces expected");
    expect((left[2] ?? 0) - (left[0] ?? 0)).toBeCloseTo(100 * um * drawing.scale, 1);
    expect((left[4] ?? 0) - (left[6] ?? 0)).toBeCloseTo(90 * um * drawing.scale, 1);
    expect((right[0] ?? 0) - (left[2] ?? 0)).toBeCloseTo(120 * um * drawing.scale, 1);
    expect((left[1] ?? 0) - (left[5] ?? 0)).toBeCloseTo(18 * um * drawing.scale, 1);
  });

  it("names every dimension in words with its value", () => {
    const words = texts(traceSection(pair, { width: 720, unit: "mm" }));
    expect(words).toEqual(
      expect.arrayContaining([
        "foot width 0.100\u2009mm",
        "crown width 0.090\u2009mm",
        "gap 0.120\u2009mm",
        "height below 0.150\u2009mm",
        "height above 0.192\u2009mm",
      ]),
    );
  });

  it("says the same in its text alternative, in the reader's unit", () => {
    const { description } = traceSection(outer, { width: 720, unit: "mil" });
    expect(description).toContain("under solder mask");
    expect(description).toContain("foot width 7.48\u2009mil");
    expect(description).toContain("Dk 4.05");
  });

  it("says that an incomplete cross-section cannot be drawn", () => {
    const bad = { ...outer, traces: [{ x: NaN, y: 0, thickness: 0, widthBottom: 1, widthTop: 1 }] };
    const drawing = traceSection(bad, { width: 720, unit: "mm" });
    expect(drawing.empty).toBe("The cross-section is not complete.");
    expect(svgString(drawing)).not.toMatch(/NaN|Infinity/);
  });
});

describe("maskOutline", () => {
  it("stands 15 µm over the copper and 20 µm over the laminate beside it", () => {
    const ys = new Set(maskOutline(outer, -1e-3, 1e-3).map(([, y]) => Math.round(y / um)));
    expect(ys).toEqual(new Set([110, 130, 170]));
  });

  it("merges humps that meet into one flat top", () => {
    const near = {
      ...outer,
      traces: [-100, 100].map((x) => ({
        x: x * um,
        y: 110 * um,
        thickness: 45 * um,
        widthBottom: 190 * um,
        widthTop: 185 * um,
      })),
    };
    const inner = maskOutline(near, -1e-3, 1e-3).filter(([x]) => Math.abs(x) < 90 * um);
    expect(inner.every(([, y]) => y > 169 * um)).toBe(true);
  });
});
