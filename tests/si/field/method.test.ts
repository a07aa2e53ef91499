import { describe, expect, it } from "vitest";
import type { CrossSection, LineParameters } from "@/lib/si/cross-section";
import { neighbourSolver, solveCrossSection } from "@/lib/si/field";
import { FINENESS, type Fineness } from "@/lib/si/field/accuracy";
import { outlineOf } from "@/lib/si/field/outline";
import { INTERFACE } from "@/lib/si/field/segment";
import { solveWith } from "@/lib/si/field/solve-cross-section";
import { ellipticRatio } from "@/lib/si/formulas/elliptic";
import { withWidth } from "@/lib/si/line";
import { ETA0 } from "@/lib/si/physical-constants";
import exact from "../../reference/impedance/exact.json";
import fem from "../../reference/impedance/fem.json";
import { outerSection } from "../../support/sections";
import { sectionOf, type ReferenceCase } from "./reference-sections";

const cases = [...fem.cases, ...exact.cases] as unknown as ReferenceCase[];
const sections = cases.flatMap((item) => {
  const section = sectionOf(item);
  return section ? [{ id: item.id, item, section }] : [];
});
const masked = outerSection({ w: 0.2, wTop: 0.18, h: 0.1, t: 0.035, er: 4.2, mask: 0.02 });

function values(line: LineParameters): number[] {
  const modes = line.single ? [line.single] : line.pair!.modes;
  return [
    ...line.capacitance.flat(),
    ...line.inductance.flat(),
    ...modes.flatMap((m) => [m.impedance, m.effectivePermittivity]),
  ];
}

function scaled(section: CrossSection, f: number): CrossSection {
  const { mask, coplanar } = section;
  return {
    ...section,
    layers: section.layers.map((l) => ({ ...l, thickness: l.thickness * f })),
    traces: section.traces.map((t) => ({
      x: t.x * f,
      y: t.y * f,
      thickness: t.thickness * f,
      widthBottom: t.widthBottom * f,
      widthTop: t.widthTop * f,
    })),
    ...(coplanar ? { coplanar: { gap: coplanar.gap * f } } : {}),
    ...(mask
      ? {
          mask: {
            ...mask,
            overLaminate: mask.overLaminate * f,
            overTrace: mask.overTrace * f,
            side: mask.side * f,
          },
        }
      : {}),
  };
}

describe("scaling", () => {
  it.each([1e-3, 1e3])("all lengths × %d leave every value the same to 1e-9", (factor) => {
    for (const { id, section } of sections.filter((_, i) => i % 4 === 0)) {
      const before = values(solveCrossSection(section));
      values(solveCrossSection(scaled(section, factor))).forEach((value, i) => {
        const size = Math.max(Math.abs(before[i]!), 1e-3 * Math.abs(before[0]!));
        expect(Math.abs(value - before[i]!) / size, id).toBeLessThan(1e-9);
      });
    }
  });
});

describe("convergence", () => {
  const wanted = new Map(cases.map((item) => [item.id, item.results]));
  /** largest error of Z over a few structures, on the reference mesh with n nodes a panel */
  const errorWith = (nodes: number): number => {
    const fineness: Fineness = { ...FINENESS.reference, copperNodes: nodes, interfaceNodes: nodes };
    let worst = 0;
    for (const { id, section } of sections) {
      if (!/fem-(microstrip-00|microstrip-mask-0|stripline-2diel-0|cpwg-0)/.test(id)) continue;
      const { single } = solveWith(section, fineness).parameters;
      const z = wanted.get(id)?.Z0_ohm;
      if (single && typeof z === "number") worst = Math.max(worst, Math.abs(single.impedance / z - 1));
    }
    return worst;
  };

  it("with 2, 3 and 4 nodes a panel the error falls by more than 3 each time, down to 1e-5", () => {
    const [two, three, four] = [errorWith(2), errorWith(3), errorWith(4)] as const;
    expect(two / three).toBeGreaterThan(3);
    expect(three / four).toBeGreaterThan(3);
    expect(four).toBeLessThan(1e-5);
  });

  it("with a third of the panel length at corners and edges the order is above 2 (two nodes a panel)", () => {
    const error = (shrink: number) => {
      const f = FINENESS.reference;
      const fineness: Fineness = {
        ...f,
        copperNodes: 2,
        interfaceNodes: 2,
        copperShare: 0.9 * shrink,
        interfaceShare: 0.9 * shrink,
        growth: 1.8 * shrink,
        outerGrowth: 1.8 * shrink,
        facing: shrink,
      };
      const section = sections.find(({ id }) => id === "fem-microstrip-mask-00")!.section;
      return Math.abs(solveWith(section, fineness).parameters.single!.impedance / 46.68911082 - 1);
    };
    expect(Math.log(error(1) / error(1 / 3)) / Math.log(3)).toBeGreaterThan(2);
  });
});

describe("wide strips between planes", () => {
  /** S. B. Cohn, 1954: Z = η0/4 K(k′)/K(k), k = tanh(πw/2b), exact without thickness. */
  const exactImpedance = (ratio: number) =>
    (ETA0 / 4) * ellipticRatio(1 / Math.cosh((Math.PI * ratio) / 2), Math.tanh((Math.PI * ratio) / 2));

  it.each([0.3, 1, 3, 6, 11.5, 20, 40])("w/b = %d: exact impedance to 5e-5, reference to 1e-6", (ratio) => {
    const half = { thickness: 0.5e-3, er: 1 };
    const width = ratio * 1e-3;
    const trace = { x: 0, y: 0.5e-3, thickness: 0, widthBottom: width, widthTop: width };
    const section = { layers: [half, half], upperPlane: true, traces: [trace] };
    const error = (accuracy: "standard" | "reference") =>
      Math.abs(solveCrossSection(section, { accuracy }).single!.impedance / exactImpedance(ratio) - 1);
    expect(error("standard")).toBeLessThan(5e-5);
    expect(error("reference")).toBeLessThan(1e-6);
  });
});

describe("neighbouring sections", () => {
  it("on a held mesh, derivatives by steps of 1e-4 and 1e-2 of the width agree to 1 %", () => {
    const solve = neighbourSolver();
    const z = (w: number) => solve(withWidth(masked, w)).single!.impedance;
    const at = (w: number, step: number) => (z(w * (1 + step)) - z(w * (1 - step))) / (2 * step * w);
    for (const w of [0.15e-3, 0.2e-3, 0.23e-3]) {
      expect(Math.abs(at(w, 1e-4) / at(w, 1e-2) - 1)).toBeLessThan(0.01);
    }
  });

  it("starts anew where the section has another shape", () => {
    const solve = neighbourSolver();
    solve(masked);
    const { mask: _, ...bare } = masked;
    expect(solve(bare).single!.impedance).toBe(solveCrossSection(bare).single!.impedance);
  });
});

describe("outline", () => {
  const close = (gap: number) =>
    outerSection({ w: 0.2, wTop: 0.17, s: gap, h: 0.1, t: 0.035, er: 4.2, mask: 0.02 });
  const roofs = (section: CrossSection) =>
    outlineOf(section).segments.filter((s) => s.owner === INTERFACE && s.left === 1 && s.y1 === s.y2);

  it("fills the valley of a mask with a flat top where humps meet, and leaves it open otherwise", () => {
    expect(roofs(close(0.1))).toHaveLength(5);
    const merged = roofs(close(0.02));
    expect(merged).toHaveLength(3);
    expect(merged[1]!.y1).toBeCloseTo(0.155e-3, 12);
  });

  it("drops interfaces between equal dielectrics", () => {
    const layers = [
      { thickness: 0.05e-3, er: 4.2 },
      { thickness: 0.05e-3, er: 4.2 },
    ];
    const split = solveCrossSection({ ...masked, layers });
    const whole = solveCrossSection(masked);
    expect(split.unknowns).toBe(whole.unknowns);
    expect(split.single!.impedance / whole.single!.impedance).toBeCloseTo(1, 12);
  });

  it("a mask filling the valley raises the odd-mode permittivity over one that leaves it open", () => {
    const open = solveCrossSection(close(0.05)); // 67 µm between the copper at the mask's floor
    const filled = solveCrossSection({ ...close(0.05), mask: { ...close(0.05).mask!, side: 0.036e-3 } });
    expect(filled.pair!.odd!.effectivePermittivity).toBeGreaterThan(open.pair!.odd!.effectivePermittivity);
  });

  it("trace faces a billionth off an interface solve as if they lay on it", () => {
    const base = sections.find(({ id }) => id === "fem-stripline-2diel-00")!.section;
    const off = { ...base, traces: base.traces.map((t) => ({ ...t, y: t.y * (1 + 1e-9) })) };
    const z = (s: CrossSection) => solveCrossSection(s).single!.impedance;
    expect(z(off) / z(base)).toBeCloseTo(1, 7);
  });

  it("names what it cannot solve with a typed error", () => {
    expect(() => solveCrossSection({ ...masked, layers: [] })).toThrow(/no impedance/);
  });
});
