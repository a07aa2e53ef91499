import { describe, expect, it } from "vitest";
import type { EditLayer } from "@/components/stackup/edit-layer";
import {
  duplicateLayer,
  mirrorLayers,
  moveLayer,
  newLayer,
  withKind,
} from "@/components/stackup/layer-edits";
import { readLayerField, shownText } from "@/components/stackup/layer-field-text";
import { stackupFromTyped, stackupTemplates, stackupWarnings } from "@/lib/si/stackup";

const template = (copperLayers: number): EditLayer[] => {
  const found = stackupTemplates.find((entry) => entry.copperLayers === copperLayers);
  return (found?.layers ?? []).map((layer, index) => ({
    ...layer,
    key: `k${index}`,
    id: `id${index}`,
    lineageId: `l${index}`,
  }));
};
const names = (layers: readonly EditLayer[]) => layers.map(({ name }) => name);

describe("edits of a stackup's layers", () => {
  it("moves a layer by one place, and not beyond the edge", () => {
    const layers = template(4);
    const down = moveLayer(layers, "k0", 1);
    expect(names(down).slice(0, 2)).toEqual([layers[1]?.name, layers[0]?.name]);
    expect(names(moveLayer(layers, "k0", -1))).toEqual(names(layers));
    expect(names(moveLayer(down, "k0", -1))).toEqual(names(layers));
  });

  it("gives a copy another name and none of the first one's ids", () => {
    const layers = duplicateLayer(template(4), "k1", "new");
    expect(layers[2]).toMatchObject({ key: "new", kind: layers[1]?.kind });
    expect(layers[2]?.id).toBeUndefined();
    expect(layers[2]?.lineageId).toBeUndefined();
    expect(new Set(names(layers).map((name) => name.toLowerCase())).size).toBe(layers.length);
  });

  it("names a new layer as no other is named", () => {
    const layers = template(6);
    const one = newLayer("core", layers, "a");
    const two = newLayer("core", [...layers, one], "b");
    expect(names(layers)).not.toContain(one.name);
    expect(two.name).not.toBe(one.name);
  });

  it("mirrors the build onto the lower half and leaves its names, ids and nets", () => {
    const layers = template(6).map((layer) =>
      layer.name === "Prepreg 1-2" ? { ...layer, dk: "3.3" } : layer,
    );
    expect(stackupWarnings(stackupFromTyped(layers)).some(({ code }) => code === "asymmetric")).toBe(true);
    const mirrored = mirrorLayers(layers);
    expect(names(mirrored)).toEqual(names(layers));
    expect(mirrored.map(({ id }) => id)).toEqual(layers.map(({ id }) => id));
    expect(mirrored.at(-3)?.dk).toBe("3.3");
    expect(stackupWarnings(stackupFromTyped(mirrored)).some(({ code }) => code === "asymmetric")).toBe(false);
  });

  it("fills what another kind needs and keeps what the layer has", () => {
    const [mask] = template(2);
    if (!mask) throw new Error("The template has no mask.");
    const core = withKind(mask, "core");
    expect(core.thickness).toEqual(mask.thickness);
    const plane = withKind(core, "plane");
    expect(plane.baseFoil).not.toBeNull();
    expect(withKind(plane, "core").thickness).toEqual(mask.thickness);
  });
});

describe("texts of a layer's fields", () => {
  it("reads units as written and bare numbers in the project's unit", () => {
    expect(readLayerField("thickness", "0,1", "mm")).toEqual({ thickness: { value: "0.1", unit: "mm" } });
    expect(readLayerField("thickness", "4 mil", "mm")).toEqual({ thickness: { value: "4", unit: "mil" } });
    expect(readLayerField("baseFoil", "1/2 oz", "mm")).toEqual({ baseFoil: { value: "0.5", unit: "oz" } });
    expect(readLayerField("coveragePercent", "40 %", "mm")).toEqual({ coveragePercent: "40" });
    expect(readLayerField("plating", "", "mm")).toEqual({ plating: null });
  });

  it("refuses with a sentence what is no value", () => {
    expect(() => readLayerField("thickness", "12..7", "mm")).toThrow(
      "'12..7' is not a length. Write 12.7 mm or 500 mil.",
    );
    expect(() => readLayerField("dk", "0.5", "mm")).toThrow("Dk is at least 1 (air).");
    expect(() => readLayerField("dk", "1e3", "mm")).toThrow("Dk is at most 100.");
    expect(() => readLayerField("dk", "four", "mm")).toThrow(
      "'four' is not a number. Write one such as 4.2.",
    );
    expect(() => readLayerField("name", "  ", "mm")).toThrow("Give it a name.");
  });

  it("shows lengths in the reader's unit and foils by their weight", () => {
    const layer = { ...newLayer("signal", [], "a"), etch: { value: "0.0254", unit: "mm" } };
    expect(shownText(layer, "etch", "mil")).toBe("1 mil");
    expect(shownText(layer, "baseFoil", "mil")).toBe("0.5 oz");
  });
});
