import { describe, expect, it } from "vitest";
import { fillIn, materialKindsOf } from "@/components/stackup/fill-in";
import { genericMaterials } from "@/lib/si/materials";

const named = (name: string) => {
  const found = genericMaterials.find((entry) => entry.name === name);
  if (!found) throw new Error(`The library has no ${name}.`);
  return found;
};
const um = (value: string) => ({ value, unit: "µm" });

describe("filling a layer in from a material", () => {
  it("gives a core Dk, Df, their frequency and the source, and leaves a thickness that is not told", () => {
    const material = named("Modified epoxy, low loss");
    const values = fillIn({ kind: "core", thicknessMode: "typed", plies: [] }, material, "assumed");
    expect(values).toEqual({
      material: "Modified epoxy, low loss",
      dk: "3.7",
      df: "0.006",
      dkFrequency: { value: "10", unit: "GHz" },
      origin: "assumed",
      sourceNote: material.source,
    });
  });

  it("gives a pressed prepreg as many plies of the style as it had, a typed one the ply's thickness", () => {
    const ply = (count: number) => ({ style: "7628", resinPercent: "44", thickness: um("195"), count });
    const material = named("Glass-epoxy, 2116");
    const pressed = fillIn(
      { kind: "prepreg", thicknessMode: "pressed", plies: [ply(1), ply(2)] },
      material,
      "assumed",
    );
    expect(pressed.plies).toEqual([{ style: "2116", resinPercent: "52", thickness: um("120"), count: 3 }]);
    expect(pressed.thickness).toBeUndefined();
    const typed = fillIn({ kind: "prepreg", thicknessMode: "typed", plies: [] }, material, "assumed");
    expect(typed.thickness).toEqual(um("120"));
    const family = fillIn(
      { kind: "prepreg", thicknessMode: "pressed", plies: [ply(2)] },
      { ...named("Glass-epoxy, standard"), thickness: um("200") },
      "assumed",
    );
    expect(family).not.toHaveProperty("plies");
    expect(family).not.toHaveProperty("thickness");
  });

  it("gives copper its foil or its roughness, and no dielectric", () => {
    const signal = { kind: "signal" as const, thicknessMode: "typed" as const, plies: [] };
    expect(fillIn(signal, named("Foil, 1/2 oz"), "assumed")).toMatchObject({
      baseFoil: { value: "0.5", unit: "oz" },
    });
    const rough = fillIn(signal, named("Very low profile, profile V"), "assumed");
    expect(rough).toMatchObject({ roughness: um("0.8") });
    expect(Object.keys(rough).sort()).toEqual(["roughness", "sourceNote"]);
  });

  it("offers each kind of layer what fits it", () => {
    expect(materialKindsOf({ kind: "prepreg" })).toEqual(["prepreg", "laminate"]);
    expect(materialKindsOf({ kind: "core" })).toEqual(["laminate"]);
    expect(materialKindsOf({ kind: "plane" })).toEqual(["foil"]);
    expect(materialKindsOf({ kind: "mask" })).toEqual(["mask"]);
  });
});
