import { describe, expect, it } from "vitest";
import type { CrossSection } from "@/lib/si/cross-section";
import { DomainError } from "@/lib/si/errors";
import { equipotentials, fieldSolution } from "@/lib/si/field";
import { innerSection, outerSection } from "../../support/sections";

const masked = outerSection({ w: 0.2, wTop: 0.18, h: 0.1, t: 0.035, er: 4.2, mask: 0.02 });
const pair = outerSection({ w: 0.15, wTop: 0.13, s: 0.2, h: 0.1, t: 0.035, er: 4.2, mask: 0.02 });
const inner = innerSection({ w: 0.1, wTop: 0.09, t: 0.018, h1: 0.12, h2: 0.2, er: 4.2, erUpper: 3.9 });
const shifted: CrossSection = { ...pair, traces: pair.traces.map((t) => ({ ...t, x: t.x + 3e-3 })) };
const unequal: CrossSection = {
  ...pair,
  traces: pair.traces.map((t, i) =>
    i === 0 ? t : { ...t, x: 0.25e-3, widthBottom: 0.3e-3, widthTop: 0.28e-3 },
  ),
};

describe("potential", () => {
  it("is 1 V inside the copper to 1e-3, 0 on the planes", () => {
    for (const section of [masked, inner]) {
      const { potentialAt } = fieldSolution(section);
      const [trace] = section.traces;
      if (!trace) throw new Error("a section has a trace");
      for (const share of [-0.8, -0.3, 0, 0.5, 0.9]) {
        const x = (share * trace.widthTop) / 2;
        expect(potentialAt(x, trace.y + trace.thickness / 2, "single")).toBeCloseTo(1, 3);
      }
      expect(potentialAt(0, 0, "single")).toBe(0);
      expect(potentialAt(0.05e-3, 1e-9, "single")).toBeLessThan(1e-3);
    }
    expect(fieldSolution(inner).potentialAt(0, (0.12 + 0.018 + 0.2) * 1e-3, "single")).toBeCloseTo(0, 12);
  });

  it("keeps D through an interface: ε₁E₁ = ε₂E₂ to 1 % beside the trace", () => {
    const { potentialAt } = fieldSolution(masked, { accuracy: "reference" });
    const d = 5e-8;
    const at = (dy: number) => potentialAt(0.21e-3, 0.1e-3 + dy, "single");
    const below = 4.2 * (at(-d) - at(-3 * d));
    const above = 3.5 * (at(3 * d) - at(d));
    expect(Math.abs(above / below - 1)).toBeLessThan(0.01);
  });

  it.each([
    ["equal", pair, 0],
    ["equal, moved 3 mm aside", shifted, 3e-3],
    ["unequal", unequal, 0],
  ])(
    "%s pair: each trace has its voltage, odd is antisymmetric where the pair mirrors",
    (name, section, dx) => {
      const { potentialAt } = fieldSolution(section);
      const y = 0.11e-3;
      const [left, right] = section.traces;
      if (!left || !right) throw new Error("a pair has two traces");
      expect(potentialAt(left.x, y, "odd")).toBeCloseTo(1, 3);
      expect(potentialAt(right.x, y, "odd")).toBeCloseTo(-1, 3);
      expect(potentialAt(left.x, y, "even")).toBeCloseTo(1, 3);
      expect(potentialAt(right.x, y, "even")).toBeCloseTo(1, 3);
      expect(potentialAt(left.x, y, [0.3, 0.7])).toBeCloseTo(0.3, 3);
      expect(potentialAt(right.x, y, [0.3, 0.7])).toBeCloseTo(0.7, 3);
      if (name === "unequal") return;
      expect(potentialAt(dx, y, "odd")).toBeCloseTo(0, 9);
      expect(potentialAt(dx - 0.06e-3, y, "even")).toBeCloseTo(potentialAt(dx + 0.06e-3, y, "even"), 9);
    },
  );

  it("refuses voltages that do not fit the traces", () => {
    expect(() => fieldSolution(masked).potentialAt(0, 1e-5, "odd")).toThrow(DomainError);
    expect(() => fieldSolution(pair).potentialAt(0, 1e-5, [1])).toThrow(DomainError);
  });
});

describe("equipotentials", () => {
  const window = { left: -0.4e-3, right: 0.4e-3, bottom: 0, top: 0.4e-3 };

  it("lie where the potential is their level, to 1 %, and go round the trace in one piece", () => {
    const solution = fieldSolution(masked);
    const lines = equipotentials(solution, [0.25, 0.5, 0.75], window, 120);
    expect(lines.map((line) => line.level)).toEqual([0.25, 0.5, 0.75]);
    for (const { level, points } of lines) {
      expect(points.length).toBeGreaterThan(20);
      for (const { x, y } of points) {
        expect(Math.abs(solution.potentialAt(x, y, "single") - level)).toBeLessThan(0.01);
      }
    }
  });

  it("close around both traces of a pair in its odd mode", () => {
    const lines = equipotentials(fieldSolution(pair), [-0.5, 0.5], window, 80, "odd");
    expect(lines).toHaveLength(2);
    for (const { points } of lines) expect(points.at(-1)).toEqual(points[0]);
  });

  it("refuses an empty window and a resolution out of range", () => {
    const solution = fieldSolution(masked);
    expect(() => equipotentials(solution, [0.5], { ...window, top: 0 }, 10)).toThrow(DomainError);
    expect(() => equipotentials(solution, [0.5], window, 1)).toThrow(DomainError);
  });
});
