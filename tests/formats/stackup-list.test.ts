import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { readStackupList } from "@/lib/formats/stackup-list/read";
import { writeStackupList } from "@/lib/formats/stackup-list/write";
import { layerKinds, stackupDoc, type StackupLayerDoc } from "@/lib/schemas/stackup";

const quantity = fc.record({
  value: fc.integer({ min: 1, max: 999 }).map(String),
  unit: fc.constantFrom("µm", "mm", "mil"),
});
const number = fc.integer({ min: 1, max: 9 }).map((n) => `${n}.25`);
const maybe = <T>(value: fc.Arbitrary<T>) => fc.option(value, { nil: null });
const layer = fc
  .record({
    kind: fc.constantFrom(...layerKinds),
    material: fc.constantFrom("", "FR-4, high Tg", "=1+1", "-A"),
    thickness: quantity,
    tolerancePercent: maybe(number),
    dk: maybe(number),
    df: maybe(fc.constant("0.02")),
    dkFrequency: maybe(fc.constant({ value: "1", unit: "GHz" })),
    coveragePercent: maybe(number),
    etch: maybe(quantity),
    foil: quantity,
    plating: maybe(quantity),
    pressed: fc.boolean(),
    planeNet: fc.constantFrom("", "GND", "+3V3"),
    sourceNote: fc.option(fc.constantFrom("data sheet, p. 2", "=from memory"), { nil: undefined }),
  })
  .map(({ foil, pressed, kind, thickness, plating, planeNet, ...rest }): StackupLayerDoc => {
    const copper = kind === "foil" || kind === "signal" || kind === "plane";
    const press = pressed && kind === "prepreg";
    return {
      ...rest,
      kind,
      name: "",
      thickness: copper || press ? null : thickness,
      thicknessMode: press ? "pressed" : "typed",
      plies: press
        ? [
            { style: "1080", resinPercent: "62", thickness, count: 2 },
            { style: "", resinPercent: null, thickness, count: 1 },
          ]
        : [],
      baseFoil: copper ? foil : null,
      plating: copper ? plating : null,
      roughness: null,
      maskOverTrace: null,
      planeNet: kind === "plane" ? planeNet : "",
      origin: "assumed",
    };
  });

describe("stackup as CSV", () => {
  it("reads back what it wrote, layer by layer", () => {
    fc.assert(
      fc.property(fc.array(layer, { minLength: 1, maxLength: 8 }), (layers) => {
        const doc = stackupDoc.parse({
          name: "S",
          layers: layers.map((one, index) => ({ ...one, name: `L${index + 1}` })),
        });
        const back = readStackupList(writeStackupList(doc).replace(/\r\n/g, "\n"), "S", "mm");
        expect(back.problems).toEqual([]);
        expect(back.doc).toEqual(doc);
      }),
      { numRuns: 150 },
    );
  });

  it("reads another's headers and words", () => {
    const { doc, problems } = readStackupList(
      "Layer Name;Type;Thickness [um];Er;Loss Tangent\nTop;Copper;35;;\nD1;Dielectric;100;4,2;0,02\nGND;Ground plane;18;;\n",
      "S",
      "mm",
    );
    expect(problems).toEqual([]);
    expect(doc?.layers.map(({ kind }) => kind)).toEqual(["signal", "prepreg", "plane"]);
    expect(doc?.layers[0]?.baseFoil).toEqual({ value: "35", unit: "µm" });
    expect(doc?.layers[1]).toMatchObject({ thickness: { value: "100", unit: "µm" }, dk: "4.2", df: "0.02" });
  });

  it("says what is wrong by row and column and gives no half stackup", () => {
    const text = "kind,name,thickness,Dk\nsignal,Top,,\nwood,D1,0.1,4\ncore,D2,0.1x,0.5\nplane,top,,\n";
    const { doc, problems } = readStackupList(text, "S", "mm");
    expect(doc).toBeNull();
    expect(problems.map(({ row, column }) => [row, column])).toEqual([
      [3, "kind"],
      [4, "thickness"],
    ]);
    const second = readStackupList(
      "kind,name,thickness,Dk\nsignal,Top,,\ncore,D2,0.1,0.5\nplane,top,,\n",
      "S",
      "mm",
    );
    expect(second.problems.map(({ row, column }) => [row, column])).toEqual([
      [3, "Dk"],
      [4, "name"],
    ]);
    expect(readStackupList("a,b\n1,2\n", "S", "mm").problems[0]?.reason).toContain("kind and name");
  });
});
