import { lengthText, type LengthUnit } from "./number-text";
import type { SectionLayer } from "./stackup-layer";

export function isCopper(layer: SectionLayer): boolean {
  return layer.kind === "signal" || layer.kind === "plane" || layer.kind === "foil";
}

/** Thickness from copper to copper and, where there is a mask, over it [m]; complete when every layer has one. */
export function totalThickness(layers: readonly SectionLayer[]): {
  overCopper: number;
  overMask: number;
  complete: boolean;
} {
  let overCopper = 0;
  let masks = 0;
  for (const layer of layers) {
    if (layer.kind === "mask") masks += layer.maskOverTrace_m ?? layer.thickness_m ?? 0;
    else overCopper += layer.thickness_m ?? 0;
  }
  return { overCopper, overMask: overCopper + masks, complete: layers.every((l) => l.thickness_m !== null) };
}

/** The stackup in sentences, for those who do not see it. */
export function describeStackup(
  layers: readonly SectionLayer[],
  exaggerated: readonly boolean[],
  unit: LengthUnit,
): string {
  const total = totalThickness(layers);
  const copper = layers.filter(isCopper).length;
  const rows = layers.map((l) => {
    const dk = l.dk === null || l.dk === undefined ? "" : `, Dk ${l.dk}`;
    return `${l.name}: ${l.kind}${l.planeNet ? ` ${l.planeNet}` : ""}, ${lengthText(l.thickness_m, unit)}${dk}`;
  });
  const sum = total.complete
    ? `Total ${lengthText(total.overCopper, unit)} over copper, ${lengthText(total.overMask, unit)} over mask.`
    : "The total is not known: a layer has no thickness.";
  const scaleNote = exaggerated.some((is, i) => is && layers[i]?.thickness_m !== null)
    ? ` Drawn thicker than to scale: ${layers
        .filter((l, i) => exaggerated[i] && l.thickness_m !== null)
        .map((l) => l.name)
        .join(", ")}.`
    : " Drawn to scale.";
  return `${copper} copper layers, top to bottom. ${rows.join("; ")}. ${sum}${scaleNote}`;
}
