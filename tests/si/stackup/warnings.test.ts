import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { stackupWarnings, type StackLayer, type Stackup } from "@/lib/si/stackup";
import { core, layer, mask, plane, prepreg, signal, sixLayers } from "../../support/stackups";

const codes = (stackup: Stackup) => stackupWarnings(stackup).map((warning) => warning.code);
const spoilt = (spoil: (layers: StackLayer[]) => void): Stackup => {
  const stackup = sixLayers();
  spoil(stackup.layers);
  return stackup;
};

describe("stackupWarnings", () => {
  it("a sound six-layer board: only that L3 and L4 face each other", () => {
    expect(stackupWarnings(sixLayers())).toEqual([
      {
        code: "facing signals",
        severity: "info",
        layer: 5,
        message: "L3 and L4 face each other without a plane between: route them crosswise.",
      },
    ]);
  });

  it("doubts a prepreg of 200 mm and a mask of 25 mm, and names the unit that was likely meant", () => {
    const thick = (pick: (layer: StackLayer) => boolean, thickness: number) =>
      stackupWarnings(
        spoilt((layers) => {
          const layer = layers.find(pick);
          if (layer) Object.assign(layer, { thickness, thicknessMode: "typed" });
        }),
      ).find(({ code }) => code === "implausible thickness")?.message;
    expect(thick((layer) => layer.kind === "prepreg", 0.2)).toMatch(/is 200 mm thick.* Was 200 µm meant\?/);
    expect(thick((layer) => layer.kind === "mask", 25e-3)).toMatch(/25\.0 mm thick.* Was 25 µm meant\?/);
    expect(thick((layer) => layer.kind === "core", 0.4e-3)).toBeUndefined();
  });

  it.each<[string, Stackup]>([
    ["no plane", { layers: [signal("L1"), core("C", 1500), signal("L2")] }],
    [
      "no plane beside",
      { layers: [signal("L1"), prepreg("D", 100), signal("L2"), core("C", 200), plane("L3")] },
    ],
    ["asymmetric", spoilt((all) => void (all[2] = prepreg("D1", 130)))],
    ["asymmetric", spoilt((all) => void (all[2] = prepreg("D1", 100, 3.4)))],
    [
      "odd copper count",
      { layers: [signal("L1"), prepreg("D", 100), plane("L2"), core("C", 100), signal("L3")] },
    ],
    ["copper balance", spoilt((all) => void (all[3] = plane("L2", { coverage: 0.95 })))],
    ["copper on copper", { layers: [signal("L1"), plane("L2"), core("C", 100), signal("L3")] }],
    [
      "cores unbonded",
      { layers: [signal("L1"), core("C1", 100), plane("L2"), core("C2", 100), signal("L3")] },
    ],
    ["missing input", spoilt((all) => void (all[2] = layer("prepreg", "D1", { dk: null })))],
    ["missing input", spoilt((all) => void (all[2] = layer("prepreg", "D1", { thickness: null })))],
    ["illegal input", spoilt((all) => void (all[2] = layer("prepreg", "D1", { dk: 0.5 })))],
    ["illegal input", spoilt((all) => void (all[2] = layer("prepreg", "D1", { thickness: -1 })))],
    ["mask inside", spoilt((all) => void (all[6] = mask("M")))],
    ["mask covers copper", spoilt((all) => void (all[0] = mask("TM", 60)))],
  ])("notices: %s", (code, stackup) => expect(codes(stackup)).toContain(code));

  it("says on which sides a signal layer lacks a plane", () => {
    const stackup = { layers: [signal("L1"), prepreg("D", 100), signal("L2"), core("C", 200), plane("L3")] };
    const [first] = stackupWarnings(stackup).filter((warning) => warning.code === "no plane beside");
    expect(first?.message).toBe(
      "L1 has no plane next to it (below it L2): its return current spreads and it couples.",
    );
  });

  it("never throws, and every message is a sentence, whatever the layers", () => {
    const number = fc.option(fc.double(), { nil: null });
    const any = fc.record({
      kind: fc.constantFrom("mask", "foil", "signal", "plane", "core", "prepreg"),
      name: fc.constantFrom("A", "B", "C"),
      thickness: number,
      dk: number,
      baseFoil: number,
      plating: number,
      coverage: number,
      thicknessMode: fc.constantFrom("typed", "pressed"),
    });
    fc.assert(
      fc.property(fc.array(any, { maxLength: 9 }), (rows) => {
        const layers = rows.map((row) => ({ ...layer("core", row.name), ...row }));
        for (const warning of stackupWarnings({ layers })) expect(warning.message).toMatch(/^[A-Z0-9].*\.$/);
      }),
    );
  });
});
