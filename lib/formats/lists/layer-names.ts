import type { StackupLayerDoc } from "@/lib/schemas/stackup";

export interface LayerChoice {
  lineageId: string;
  name: string;
}

export interface LayerProposal {
  /** As the list writes it. */
  name: string;
  rows: number;
  lineageId: string | null;
}

/** Copper layers of a stackup, top to bottom, as choices for the mapping. */
export function copperLayers(
  layers: readonly (Pick<StackupLayerDoc, "kind" | "name"> & { lineageId: string })[],
): LayerChoice[] {
  return layers
    .filter((layer) => layer.kind === "foil" || layer.kind === "signal" || layer.kind === "plane")
    .map(({ lineageId, name }) => ({ lineageId, name }));
}

/**
 * The stackup's layer that a list most likely means: the same name, then the same words, then the usual ways to count
 * (TOP, BOTTOM, L3, layer 3, IN2 = the second inner one), each without regard to case. Null where two fit or none.
 */
export function proposeLayer(name: string, copper: readonly LayerChoice[]): string | null {
  const wanted = fold(name);
  if (wanted === "") return null;
  const same = copper.filter((layer) => fold(layer.name) === wanted);
  if (same.length === 1) return same[0]?.lineageId ?? null;
  const tight = copper.filter((layer) => fold(layer.name).replaceAll(" ", "") === wanted.replaceAll(" ", ""));
  if (tight.length === 1) return tight[0]?.lineageId ?? null;

  const counted = countedIndex(wanted, copper.length);
  const words = copper.filter((layer) => fold(layer.name).split(" ").includes(wanted));
  if (words.length === 1) return words[0]?.lineageId ?? null;
  return counted === null ? null : (copper[counted]?.lineageId ?? null);
}

function countedIndex(wanted: string, count: number): number | null {
  if (/^(top|top layer|top copper|component side|f cu|primary|front)$/.test(wanted)) return 0;
  if (/^(bottom|bot|bottom layer|bottom copper|bot layer|solder side|b cu|secondary|back)$/.test(wanted))
    return count - 1;
  const plain =
    /^(?:l|lyr|layer|sig|signal|cu|m|ly)\s?0*(\d{1,2})$/.exec(wanted) ?? /^0*(\d{1,2})$/.exec(wanted);
  if (plain) return inside(Number(plain[1]) - 1, count);
  const inner = /^(?:in|inner|int|internal|mid|midlayer|inner layer)\s?0*(\d{1,2})(?: cu)?$/.exec(wanted);
  if (inner) return inside(Number(inner[1]), count - 1);
  return null;
}

function inside(index: number, end: number): number | null {
  return index >= 0 && index < end ? index : null;
}

function fold(text: string): string {
  return text
    .toLowerCase()
    .replace(/[^\p{L}\p{N}]+/gu, " ")
    .trim();
}
