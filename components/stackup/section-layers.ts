import type { SectionLayer } from "@/lib/drawings/stackup-layer";
import { builtThicknessExact, stackupFromTyped } from "@/lib/si/stackup";
import { toSi } from "@/lib/si/units";
import { type EditStackup, documentOf } from "./edit-layer";

/** The layers for the cross-section drawing; a thickness whose inputs are missing, or not above zero, is null. */
export function sectionLayers(stackup: EditStackup): SectionLayer[] {
  const { layers } = documentOf(stackup);
  const inSi = stackupFromTyped(layers).layers;
  return stackup.layers.map((layer, index) => {
    const built = builtThicknessExact(layers, index, "m");
    const thickness = built ? toSi(built, "length") : null;
    const si = inSi[index];
    return {
      id: layer.key,
      kind: layer.kind,
      name: layer.name,
      material: layer.material,
      thickness_m: thickness !== null && thickness > 0 ? thickness : null,
      maskOverTrace_m: si?.maskOverTrace ?? null,
      dk: si?.dk ?? null,
      df: si?.df ?? null,
      etch_m: si?.etch ?? null,
      planeNet: layer.planeNet,
    };
  });
}
