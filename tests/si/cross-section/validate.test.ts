import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { closedForms, validateCrossSection, type CrossSection } from "@/lib/si/cross-section";
import { DomainError } from "@/lib/si/errors";
import { innerSection, outerSection } from "../../support/sections";

const good = outerSection({ w: 0.2, s: 0.2, h: 0.1, t: 0.035, er: 4.2, mask: 0.02, slot: 0.2 });
const [left, right] = good.traces;
if (!left || !right) throw new Error("a pair has two traces");

const faults: [string, CrossSection, string][] = [
  ["no dielectric, so no plane", { ...good, layers: [] }, "layers"],
  ["a layer without thickness", { ...good, layers: [{ thickness: 0, er: 4 }] }, "layers[0].thickness"],
  ["a negative layer", { ...good, layers: [{ thickness: -1e-4, er: 4 }] }, "layers[0].thickness"],
  [
    "a layer that is no number",
    { ...good, layers: [{ thickness: Number.NaN, er: 4 }] },
    "layers[0].thickness",
  ],
  ["Dk below 1", { ...good, layers: [{ thickness: 1e-4, er: 0.9 }] }, "layers[0].er"],
  ["negative Df", { ...good, layers: [{ thickness: 1e-4, er: 4, tanD: -1 }] }, "layers[0].tanD"],
  ["no trace", { ...good, traces: [] }, "traces"],
  ["three traces", { ...good, traces: [left, right, right] }, "traces"],
  ["no width", { ...good, traces: [{ ...left, widthBottom: 0 }] }, "traces[0].widthBottom"],
  ["no crown", { ...good, traces: [{ ...left, widthTop: -1e-6 }] }, "traces[0].widthTop"],
  ["negative copper", { ...good, traces: [{ ...left, thickness: -1e-6 }] }, "traces[0].thickness"],
  ["a trace on the plane", { ...good, traces: [{ ...left, y: 0 }] }, "traces[0].y"],
  ["a trace in the air", { ...good, traces: [{ ...left, y: 2e-4 }] }, "traces[0].y"],
  ["overlapping traces", { ...good, traces: [left, { ...right, x: left.x + 1e-4 }] }, "traces"],
  ["touching traces", { ...good, traces: [left, { ...right, x: left.x + 2e-4 }] }, "traces"],
  ["no coplanar slot", { ...good, coplanar: { gap: 0 } }, "coplanar.gap"],
  [
    "mask as thick as copper",
    { ...good, mask: { overLaminate: 35e-6, overTrace: 1e-5, side: 1e-5, er: 3 } },
    "mask.overLaminate",
  ],
  [
    "no mask on the side",
    { ...good, mask: { overLaminate: 1e-5, overTrace: 1e-5, side: 0, er: 3 } },
    "mask.side",
  ],
  [
    "mask with Dk below 1",
    { ...good, mask: { overLaminate: 1e-5, overTrace: 1e-5, side: 1e-5, er: 0 } },
    "mask.er",
  ],
  [
    "mask between planes",
    {
      ...innerSection({ w: 0.1, t: 0.018, h1: 0.1, h2: 0.1, er: 4 }),
      mask: { overLaminate: 1e-6, overTrace: 1e-6, side: 1e-6, er: 3 },
    },
    "mask",
  ],
];

describe("validateCrossSection", () => {
  it("takes a good one", () => expect(() => validateCrossSection(good)).not.toThrow());

  it.each(faults)("refuses %s, naming the field", (_, section, field) => {
    let caught: unknown = null;
    try {
      validateCrossSection(section);
    } catch (error) {
      caught = error;
    }
    expect(caught).toBeInstanceOf(DomainError);
    expect(caught).toMatchObject({ field });
    expect((caught as Error).message).toMatch(/^[A-Z].*\.$/);
  });

  it("closedForms gives numbers or a typed error for any geometry, never NaN", () => {
    const length = fc.double();
    const any = fc.record({
      layers: fc.array(fc.record({ thickness: length, er: fc.double() }), { maxLength: 3 }),
      upperPlane: fc.boolean(),
      traces: fc.array(
        fc.record({ x: length, y: length, thickness: length, widthBottom: length, widthTop: length }),
        { maxLength: 3 },
      ),
    });
    const sane = fc
      .tuple(
        fc.double({ min: 0.01, max: 10, noNaN: true }),
        fc.double({ min: 0.001, max: 5, noNaN: true }),
        fc.boolean(),
      )
      .map(([w, s, isInner]) =>
        isInner
          ? innerSection({ w, s, t: 0.035, h1: 0.1, h2: 0.2, er: 4.2, erUpper: 3.8 })
          : outerSection({ w, s, h: 0.1, t: 0.035, er: 4.2 }),
      );
    fc.assert(
      fc.property(fc.oneof(any, sane), (section) => {
        for (const number of numbersOf(section)) expect(Number.isFinite(number) && number > 0).toBe(true);
      }),
      { numRuns: 300 },
    );
  });
});

function numbersOf(section: CrossSection): number[] {
  try {
    return closedForms(section).flatMap((form) => [
      ...Object.values(form.impedance),
      ...Object.values(form.effectivePermittivity),
    ]);
  } catch (error) {
    if (error instanceof DomainError) return [];
    throw error;
  }
}
