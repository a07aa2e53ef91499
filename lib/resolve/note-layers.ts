import { builtThicknessExact, formatQuantity, toSi } from "@/lib/si";
import type { StoredStackupLayer } from "@/lib/schemas/stackup";

/** Thickness of a layer as built [m]; null where an input of it is missing. */
export function layerThickness(layers: readonly StoredStackupLayer[], index: number): number | null {
  const exact = builtThicknessExact(layers, index, "m");
  return exact ? toSi(exact, "length") : null;
}

/** "18 um foil + 25 um plating" for copper, null for dielectrics. */
export function finishedCopperText(layer: StoredStackupLayer): string | null {
  if (!layer.baseFoil) return null;
  return `${formatQuantity(layer.baseFoil)} foil${layer.plating ? ` + ${formatQuantity(layer.plating)} plating` : ""}`;
}
