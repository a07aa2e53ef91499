import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { bestClosedForm } from "@/lib/si/cross-section";
import { DomainError, UnreachableTargetError } from "@/lib/si/errors";
import { impedanceOf, widthForImpedance, withSpacing, withWidth, type WidthRequest } from "@/lib/si/line";
import { innerSection, outerSection } from "../../support/sections";

const outer = outerSection({ w: 0.2, wTop: 0.18, h: 0.1, t: 0.035, er: 4.2 });
const outerPair = outerSection({ w: 0.15, wTop: 0.13, s: 0.2, h: 0.1, t: 0.035, er: 4.2 });
const inner = innerSection({ w: 0.1, wTop: 0.09, t: 0.018, h1: 0.12, h2: 0.2, er: 4.2, erUpper: 3.9 });
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
  section: outer,
  target: { kind: "single", ohms: 50 },
  vary: "width",
  min: 0.05e-3,
  max: 1e-3,
  method: "closed-form",
  ...over,
});

describe("widthForImpedance", () => {
  it.each([
    ["outer", outer, "single"],
    ["inner", inner, "single"],
    ["outer pair", outerPair, "differential"],
    ["outer pair", outerPair, "common"],
    ["inner pair", innerPair, "differential"],
  ] as const)("%s: width → %3$s impedance → width closes to 1e-6", (_, section, kind) => {
    fc.assert(
      fc.property(fc.double({ min: 0.08e-3, max: 0.6e-3, noNaN: true }), (width) => {
        const ohms = impedanceOf(bestClosedForm(withWidth(section, width)), kind);
        const found = widthForImpedance(ask({ section, target: { kind, ohms } }));
        expect(Math.abs(found.value / width - 1)).toBeLessThan(1e-6);
        expect(Math.abs(found.impedance / ohms - 1)).toBeLessThan(1e-9);
      }),
    );
  });

  it.each([
    ["outer", outerPair],
    ["inner", innerPair],
  ])("%s pair: gap → differential impedance → gap closes to 1e-6", (_, section) => {
    fc.assert(
      fc.property(fc.double({ min: 0.1e-3, max: 0.3e-3, noNaN: true }), (gap) => {
        const ohms = impedanceOf(bestClosedForm(withSpacing(section, gap)), "differential");
        const found = widthForImpedance(
          ask({
            section,
            target: { kind: "differential", ohms },
            vary: "spacing",
            min: 0.08e-3,
            max: 0.5e-3,
          }),
        );
        expect(Math.abs(found.value / gap - 1)).toBeLessThan(1e-6);
      }),
    );
  });

  it("on a grid takes the nearest step and tells the impedance there", () => {
    const free = widthForImpedance(ask({}));
    const stepped = widthForImpedance(ask({ grid: 5e-6 }));
    expect(Math.abs(stepped.value - free.value)).toBeLessThanOrEqual(2.5e-6);
    expect(stepped.value).toBe(Number(stepped.value.toPrecision(12)));
    expect(stepped.impedance).toBe(bestClosedForm(withWidth(outer, stepped.value)).single?.impedance);
  });

  it("keeps the side slope, the gap and the pair's centre while the width varies", () => {
    const wide = withWidth(
      { ...outerPair, traces: outerPair.traces.map((t) => ({ ...t, x: t.x + 1e-3 })) },
      0.3e-3,
    );
    const [left, right] = wide.traces;
    if (!left || !right) throw new Error("a pair has two traces");
    expect(left.widthBottom - left.widthTop).toBeCloseTo(20e-6, 12);
    expect(right.x - left.x - 0.3e-3).toBeCloseTo(0.2e-3, 12);
    expect((left.x + right.x) / 2).toBeCloseTo(1e-3, 12);
  });

  it("out of reach: a typed error with the range that is reachable, in ohms", () => {
    let caught: unknown = null;
    try {
      widthForImpedance(ask({ target: { kind: "single", ohms: 200 } }));
    } catch (error) {
      caught = error;
    }
    expect(caught).toBeInstanceOf(UnreachableTargetError);
    const { reachable, message } = caught as UnreachableTargetError;
    expect(reachable.min).toBeCloseTo(impedanceOf(bestClosedForm(withWidth(outer, 1e-3)), "single"), 6);
    expect(reachable.max).toBeCloseTo(impedanceOf(bestClosedForm(withWidth(outer, 0.05e-3)), "single"), 6);
    expect(message).toMatch(
      /^200 Ω cannot be met with a width of 0\.0500 mm to 1\.00 mm: that gives \d.* Ω to .* Ω\.$/,
    );
  });

  it("draws a bound inward where the formula has no value there, and still finds what lies inside", () => {
    const found = widthForImpedance(
      ask({
        section: outerPair,
        target: { kind: "differential", ohms: 90 },
        vary: "spacing",
        min: 1e-6,
        max: 0.6e-3,
      }),
    );
    expect(found.impedance).toBeCloseTo(90, 6);
  });

  it("meets a target that lies exactly on a bound", () => {
    const ohms = impedanceOf(bestClosedForm(withWidth(outer, 0.3e-3)), "single");
    expect(widthForImpedance(ask({ target: { kind: "single", ohms }, max: 0.3e-3 })).value).toBeCloseTo(
      0.3e-3,
      12,
    );
  });

  it("needs few evaluations", () => {
    expect(widthForImpedance(ask({})).solves).toBeLessThan(16);
    expect(
      widthForImpedance(ask({ section: outerPair, target: { kind: "differential", ohms: 90 } })).solves,
    ).toBeLessThan(20);
  });

  it("refuses what makes no sense with a typed error", () => {
    expect(() => widthForImpedance(ask({ vary: "spacing" }))).toThrow(DomainError);
    expect(() => widthForImpedance(ask({ target: { kind: "differential", ohms: 90 } }))).toThrow(DomainError);
    expect(() => widthForImpedance(ask({ section: outerPair }))).toThrow(DomainError);
    expect(() => widthForImpedance(ask({ target: { kind: "single", ohms: -50 } }))).toThrow(DomainError);
    expect(() => widthForImpedance(ask({ min: 0 }))).toThrow(DomainError);
    expect(() => widthForImpedance(ask({ min: 2e-3 }))).toThrow(DomainError);
    expect(() => widthForImpedance(ask({ grid: 0 }))).toThrow(DomainError);
    expect(() => widthForImpedance(ask({ grid: 5e-3 }))).toThrow(DomainError);
  });
});

it("impedance falls with width and rises with height, for every structure with a closed form", () => {
  fc.assert(
    fc.property(
      fc.double({ min: 0.06, max: 0.6, noNaN: true }),
      fc.double({ min: 0.06, max: 0.4, noNaN: true }),
      (w, h) => {
        const z = (width: number, height: number) => [
          impedanceOf(bestClosedForm(outerSection({ w: width, h: height, t: 0.02, er: 4.2 })), "single"),
          impedanceOf(
            bestClosedForm(innerSection({ w: width, h1: height, h2: 1.5 * height, t: 0.018, er: 4.2 })),
            "single",
          ),
          impedanceOf(
            bestClosedForm(outerSection({ w: width, s: 0.2, h: height, t: 0.02, er: 4.2 })),
            "differential",
          ),
          impedanceOf(
            bestClosedForm(innerSection({ w: width, s: 0.2, h1: height, h2: height, t: 0.018, er: 4.2 })),
            "differential",
          ),
        ];
        const base = z(w, h);
        z(w * 1.02, h).forEach((value, index) => expect(value).toBeLessThan(base[index] ?? 0));
        z(w, h * 1.02).forEach((value, index) => expect(value).toBeGreaterThan(base[index] ?? Infinity));
      },
    ),
  );
});
