import { describe, expect, it } from "vitest";
import { UnreachableTargetError } from "@/lib/si/errors";
import { solveCrossSection } from "@/lib/si/field";
import { impedanceOf, widthForImpedance, withSpacing, withWidth, type WidthRequest } from "@/lib/si/line";
import { coveredSection, innerSection, outerSection } from "../../support/sections";

const masked = outerSection({ w: 0.2, wTop: 0.18, h: 0.1, t: 0.035, er: 4.2, mask: 0.02 });
const coplanar = outerSection({ w: 0.2, wTop: 0.18, h: 0.2, t: 0.035, er: 4.2, slot: 0.15, mask: 0.02 });
const covered = coveredSection({ w: 0.2, h: 0.15, t: 0.018, er: 4.2, cover: 0.08, coverEr: 3.5 });
const inner = innerSection({ w: 0.1, wTop: 0.09, t: 0.018, h1: 0.12, h2: 0.2, er: 4.2, erUpper: 3.9 });
const maskedPair = outerSection({ w: 0.15, wTop: 0.13, s: 0.2, h: 0.1, t: 0.035, er: 4.2, mask: 0.02 });
const innerPair = innerSection({
  w: 0.1,
  wTop: 0.09,
  s: 0.2,
  t: 0.018,
  h1: 0.12,
  h2: 0.2,
  er: 4.2,
  erUpper: 3.9,
});

const ask = (over: Partial<WidthRequest>): WidthRequest => ({
  section: masked,
  target: { kind: "single", ohms: 50 },
  vary: "width",
  min: 0.05e-3,
  max: 1e-3,
  method: "field",
  accuracy: "reference",
  ...over,
});

describe("width and spacing by the field", () => {
  it.each([
    ["masked", masked, "single"],
    ["masked coplanar", coplanar, "single"],
    ["embedded", covered, "single"],
    ["inner", inner, "single"],
    ["masked pair", maskedPair, "differential"],
    ["masked pair", maskedPair, "common"],
    ["inner pair", innerPair, "differential"],
  ] as const)("%s: width → impedance → width closes to 1e-4", (_, section, kind) => {
    for (const width of [0.09e-3, 0.17e-3, 0.4e-3]) {
      const ohms = impedanceOf(solveCrossSection(withWidth(section, width), { accuracy: "reference" }), kind);
      const found = widthForImpedance(ask({ section, target: { kind, ohms } }));
      expect(Math.abs(found.value / width - 1)).toBeLessThan(1e-4);
      expect(found.solves).toBeLessThanOrEqual(6);
    }
  });

  it.each([
    ["masked", maskedPair],
    ["inner", innerPair],
  ])("%s pair: gap → differential impedance → gap closes to 1e-4", (_, section) => {
    for (const gap of [0.12e-3, 0.25e-3]) {
      const ohms = impedanceOf(
        solveCrossSection(withSpacing(section, gap), { accuracy: "reference" }),
        "differential",
      );
      const target = { kind: "differential" as const, ohms };
      const found = widthForImpedance(ask({ section, target, vary: "spacing", min: 0.08e-3, max: 0.5e-3 }));
      expect(Math.abs(found.value / gap - 1)).toBeLessThan(1e-4);
    }
  });

  it("takes the nearest step of a grid and tells the impedance there", () => {
    const free = widthForImpedance(ask({}));
    const stepped = widthForImpedance(ask({ grid: 5e-6 }));
    expect(Math.abs(stepped.value - free.value)).toBeLessThanOrEqual(2.5e-6 * 1.001);
    const there = solveCrossSection(withWidth(masked, stepped.value), { accuracy: "reference" });
    expect(stepped.impedance / impedanceOf(there, "single")).toBeCloseTo(1, 5);
  });

  it("out of reach: a typed error with the range that is reachable, in ohms", () => {
    let caught: unknown = null;
    try {
      widthForImpedance(ask({ target: { kind: "single", ohms: 150 }, accuracy: "standard" }));
    } catch (error) {
      caught = error;
    }
    expect(caught).toBeInstanceOf(UnreachableTargetError);
    const { reachable } = caught as UnreachableTargetError;
    const at = (width: number) => impedanceOf(solveCrossSection(withWidth(masked, width)), "single");
    expect(reachable.min).toBeCloseTo(at(1e-3), 6);
    expect(reachable.max).toBeCloseTo(at(0.05e-3), 6);
  });
});
