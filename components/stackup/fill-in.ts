import type { Origin } from "@/lib/schemas/common";
import type { StackupLayerDoc } from "@/lib/schemas/stackup";
import type { LibraryMaterial, MaterialKind } from "@/lib/si/materials";
import { isCopper } from "@/lib/si/stackup";

type Layer = Pick<StackupLayerDoc, "kind" | "thicknessMode" | "plies">;

/** The kinds of material that a layer can be filled in from, the likelier first. */
export function materialKindsOf({ kind }: Pick<Layer, "kind">): readonly MaterialKind[] {
  if (kind === "mask") return ["mask"];
  if (kind === "prepreg") return ["prepreg", "laminate"];
  return kind === "core" ? ["laminate"] : ["foil"];
}

/**
 * The fields that a material gives a layer, with the note of where they come from. What the material does not say
 * stays as it is. A prepreg that is pressed from plies gets its plies, as many as it has.
 */
export function fillIn(layer: Layer, material: LibraryMaterial, origin: Origin): Partial<StackupLayerDoc> {
  const sourceNote = material.source;
  if (isCopper(layer))
    return {
      sourceNote,
      ...(material.thickness ? { baseFoil: material.thickness } : {}),
      ...(material.roughness ? { roughness: material.roughness } : {}),
    };
  return {
    material: material.name,
    dk: material.dk,
    df: material.df,
    dkFrequency: material.frequency,
    origin,
    sourceNote,
    ...thicknessOf(layer, material),
  };
}

function thicknessOf(layer: Layer, material: LibraryMaterial): Partial<StackupLayerDoc> {
  if (!material.thickness) return {};
  if (layer.kind !== "prepreg" || layer.thicknessMode === "typed") return { thickness: material.thickness };
  // A laminate's thickness says nothing of plies.
  if (material.kind !== "prepreg") return {};
  const count = layer.plies.reduce((sum, ply) => sum + ply.count, 0);
  return {
    plies: [
      {
        style: material.glassStyle,
        resinPercent: material.resinPercent,
        thickness: material.thickness,
        count: Math.min(12, Math.max(1, count)),
      },
    ],
  };
}
