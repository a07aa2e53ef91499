import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { validateCrossSection } from "@/lib/si/cross-section";
import { DomainError } from "@/lib/si/errors";
import {
  buildCrossSection,
  lineOnLayer,
  widthOnLayer,
  type StackLayer,
  type Stackup,
} from "@/lib/si/stackup";
import { core, layer, mask, plane, prepreg, signal, sixLayers } from "../../support/stackups";

const um = 1e-6;
const near = (got: number | undefined, wanted: number) =>
  expect(Math.abs((got ?? Number.NaN) - wanted)).toBeLessThan(1e-12);

describe("buildCrossSection", () => {
  it("outer top: on its prepreg over the nearest plane, crown up, under mask", () => {
    const built = buildCrossSection(sixLayers(), 1, { width: 200 * um });
    expect(built.references).toEqual({ below: 3 });
    expect(built).toMatchObject({ side: "mask", turned: false, foot: "bottom" });
    expect(built.section.upperPlane).toBe(false);
    expect(built.section.layers).toHaveLength(1);
    near(built.section.layers[0]?.thickness, 100 * um);
    expect(built.section.layers[0]).toMatchObject({ er: 3.8, tanD: 0.02 });
    expect(built.section.mask).toMatchObject({
      overLaminate: 25 * um,
      overTrace: 15 * um,
      side: 15 * um,
      er: 3.5,
    });
    const [trace] = built.section.traces;
    near(trace?.y, 100 * um);
    near(trace?.widthBottom, 200 * um);
    near(trace?.widthTop, 190 * um);
  });

  it("outer bottom is the outer top in a mirror", () => {
    const top = buildCrossSection(sixLayers(), 1, { width: 200 * um, gap: 150 * um });
    const bottom = buildCrossSection(sixLayers(), 11, { width: 200 * um, gap: 150 * um });
    expect(bottom.section).toEqual(top.section);
    expect(bottom).toMatchObject({ references: { above: 9 }, turned: true });
  });

  it("inner: lies on its core, sinks into the prepreg, which also fills beside it; another signal layer is dielectric", () => {
    const built = buildCrossSection(sixLayers(), 5, { width: 120 * um });
    // L3 lies under core D2 and sticks out downward, so the section is turned: L2 is its lower plane
    expect(built).toMatchObject({
      references: { above: 3, below: 9 },
      side: "prepreg",
      turned: true,
      foot: "bottom",
    });
    const { layers, traces, upperPlane } = built.section;
    expect(upperPlane).toBe(true);
    // D2, then D3 with the copper's own height, then L4 (35 µm) as the prepreg it sinks into, then D4
    expect(layers.map((slab) => slab.er)).toEqual([4.2, 3.8, 3.8, 4.2]);
    [200, 335, 35, 200].forEach((height, index) => near(layers[index]?.thickness, height * um));
    near(traces[0]?.y, 200 * um);
    const mirror = buildCrossSection(sixLayers(), 7, { width: 120 * um });
    expect(mirror.section).toEqual(built.section);
    expect(mirror).toMatchObject({ turned: false, references: { above: 3, below: 9 } });
  });

  it("a pair stands symmetrically with its gap between the feet; a coplanar slot is told at the foot", () => {
    const { section } = buildCrossSection(sixLayers(), 1, {
      width: 200 * um,
      gap: 150 * um,
      coplanarGap: 180 * um,
    });
    const [left, right] = section.traces;
    near((right?.x ?? 0) - (left?.x ?? 0) - 200 * um, 150 * um);
    near((right?.x ?? 0) + (left?.x ?? 0), 0);
    expect(section.coplanar).toEqual({ gap: 180 * um });
  });

  it("a plane on the crown's side only: the wide foot is then the top face", () => {
    const stackup: Stackup = {
      layers: [
        mask("TM"),
        plane("L1"),
        prepreg("D1", 100),
        signal("L2"),
        core("D2", 200),
        signal("L3"),
        mask("BM"),
      ],
    };
    const built = buildCrossSection(stackup, 3, { width: 120 * um, gap: 100 * um });
    expect(built).toMatchObject({ foot: "top", turned: true, references: { above: 1 }, side: "prepreg" });
    near(built.section.traces[0]?.widthTop, 120 * um);
    near(built.section.traces[0]?.widthBottom, 110 * um);
    near(built.section.layers[0]?.thickness, 135 * um);
    near(built.section.traces[0]?.y, 100 * um);
    expect(() => validateCrossSection(built.section)).not.toThrow();
  });

  it("mask as thick as the copper becomes a flat cover, and says so", () => {
    const stackup: Stackup = { layers: [mask("TM", 40), signal("L1"), prepreg("D1", 100), plane("L2")] };
    const built = buildCrossSection(stackup, 1, { width: 200 * um });
    expect(built.section.mask).toBeUndefined();
    expect(built.section.layers).toHaveLength(2);
    near(built.section.layers[1]?.thickness, 50 * um);
    expect(built.assumptions.join()).toContain("flat cover");
  });

  it("without mask the trace sticks out into air; without etch its sides are taken as vertical, and that is said", () => {
    const stackup: Stackup = { layers: [signal("L1", { etch: null }), prepreg("D1", 100), plane("L2")] };
    const built = buildCrossSection(stackup, 0, { width: 200 * um });
    expect(built.side).toBe("air");
    expect(built.assumptions).toEqual(["L1: etch not given, sides taken as vertical"]);
    expect(built.section.traces[0]?.widthTop).toBe(200 * um);
  });

  it.each<[string, (layers: StackLayer[]) => void, string]>([
    ["no Dk", (all) => void (all[2] = layer("prepreg", "D1", { dk: null })), "layers[2].dk"],
    ["Dk below 1", (all) => void (all[2] = layer("prepreg", "D1", { dk: 0 })), "layers[2].dk"],
    [
      "no thickness",
      (all) => void (all[2] = layer("prepreg", "D1", { thickness: null })),
      "layers[2].thickness",
    ],
    [
      "thickness zero",
      (all) => void (all[2] = layer("prepreg", "D1", { thickness: 0 })),
      "layers[2].thickness",
    ],
    ["no foil", (all) => void (all[1] = signal("L1", { baseFoil: null })), "layers[1].baseFoil"],
    ["etch as wide as the trace", (all) => void (all[1] = signal("L1", { etch: 2e-4 })), "layers[1].etch"],
    ["no plane", (all) => [3, 9].forEach((at) => (all[at] = signal(`S${at}`))), "layers"],
    ["a plane asked for traces", (all) => void (all[1] = plane("L1")), "layers[1].kind"],
  ])("refuses %s, naming the field, in a sentence", (_, spoil, field) => {
    const stackup = sixLayers();
    spoil(stackup.layers);
    const caught = attempt(() => buildCrossSection(stackup, 1, { width: 200 * um }));
    expect(caught).toBeInstanceOf(DomainError);
    expect(caught).toMatchObject({ field });
    expect((caught as DomainError).message).toMatch(/^[A-Z].*\.$/);
  });

  it("any stackup gives a legal cross-section with the foot's width and gap, or a typed error", () => {
    const thickness = fc.integer({ min: 20, max: 800 });
    const dielectric = fc.tuple(
      fc.constantFrom("core", "prepreg"),
      thickness,
      fc.double({ min: 1, max: 10, noNaN: true }),
    );
    const build = fc.array(fc.tuple(fc.constantFrom("signal", "plane", "foil"), dielectric), {
      minLength: 1,
      maxLength: 8,
    });
    fc.assert(
      fc.property(
        build,
        fc.boolean(),
        fc.integer({ min: 0, max: 40 }),
        fc.nat(),
        (rows, masked, etch, pick) => {
          const layers = rows.flatMap(([kind, [material, height, dk]], index) => [
            layer(kind as "signal", `L${index + 1}`, { etch: etch * um }),
            layer(material as "core", `D${index + 1}`, { thickness: height * um, dk }),
          ]);
          layers.push(signal("last"));
          if (masked) layers.unshift(mask("TM"));
          const index = pick % layers.length;
          const got = attempt(() => buildCrossSection({ layers }, index, { width: 100 * um, gap: 90 * um }));
          if (got instanceof Error) {
            expect(got).toBeInstanceOf(DomainError);
            return;
          }
          validateCrossSection(got.section);
          const [left, right] = got.section.traces;
          const face = got.foot === "bottom" ? "widthBottom" : "widthTop";
          near(left?.[face], 100 * um);
          near((right?.x ?? 0) - (left?.x ?? 0) - (left?.[face] ?? 0), 90 * um);
        },
      ),
    );
  });
});

describe("lines on a layer", () => {
  it("width for 50 Ω on a layer gives 50 Ω there, to 1e-6; on a grid, the impedance of that step", () => {
    const ask = {
      stackup: sixLayers(),
      index: 5,
      target: { kind: "single", ohms: 50 },
      vary: "width",
      min: 5e-5,
      max: 1e-3,
    } as const;
    const found = widthOnLayer(ask);
    const back = lineOnLayer(sixLayers(), 5, { width: found.value });
    expect(Math.abs((back.line.single?.impedance ?? 0) / 50 - 1)).toBeLessThan(1.1e-6);
    const stepped = widthOnLayer({ ...ask, grid: 5e-6 });
    expect(stepped.line.single?.impedance).toBe(stepped.impedance);
  });

  it("gap for a differential target, with the width held", () => {
    const found = widthOnLayer({
      stackup: sixLayers(),
      index: 1,
      target: { kind: "differential", ohms: 95 },
      vary: "gap",
      width: 150e-6,
      min: 8e-5,
      max: 1e-3,
    });
    expect(found.impedance / 95).toBeCloseTo(1, 5);
    expect(found.line.pair?.differential).toBe(found.impedance);
  });

  it("a coplanar pair has no closed form, but a field solution", () => {
    const { line } = lineOnLayer(sixLayers(), 1, { width: 2e-4, gap: 2e-4, coplanarGap: 2e-4 });
    expect(line.closedForm).toBeNull();
    expect(line.pair?.differential).toBeGreaterThan(50);
    expect(line.pair?.differential).toBeLessThan(150);
  });
});

function attempt<T>(run: () => T): T | Error {
  try {
    return run();
  } catch (error) {
    return error instanceof Error ? error : new Error(String(error));
  }
}
