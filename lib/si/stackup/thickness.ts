import { DomainError } from "../errors";
import { addWeightedExact, formatSi, type Quantity, type WeightedQuantity } from "../units";
import { isCopper, type Stackup, type StackLayer } from "./model";
import { copperSinkingInto } from "./protrusion";
import type { TypedStackLayer } from "./typed-layers";

/**
 * Finished copper [m]: base foil plus plating; else the typed thickness.
 * @throws DomainError naming the field where neither is told
 */
export function finishedCopper(stackup: Stackup, index: number): number {
  const layer = layerAt(stackup, index);
  if (layer.baseFoil !== null) return layer.baseFoil + (layer.plating ?? 0);
  if (layer.thickness !== null && layer.thickness > 0) return layer.thickness;
  throw new DomainError(
    `${layer.name} has no copper thickness. Give its base foil.`,
    `layers[${index}].baseFoil`,
  );
}

/**
 * Thickness of a prepreg opening between copper faces after pressing [m].
 *
 *     Σ plies − Σ sinking copper × (1 − coverage)
 *
 * The resin of the plies fills what the copper that sinks into it leaves open.
 *
 * @throws DomainError where plies or a coverage are missing, or the plies cannot fill the copper
 */
export function pressedThickness(stackup: Stackup, index: number): number {
  const layer = layerAt(stackup, index);
  if (layer.plies.length === 0) {
    throw new DomainError(`${layer.name} has no plies to be pressed from.`, `layers[${index}].plies`);
  }
  const plies = layer.plies.reduce((sum, ply) => sum + ply.thickness * ply.count, 0);
  const filled = copperSinkingInto(stackup.layers, index).reduce(
    (sum, copper) => sum + finishedCopper(stackup, copper) * (1 - coverageOf(stackup, copper)),
    0,
  );
  if (plies - filled <= 0) {
    throw new DomainError(
      `${layer.name}: its plies (${formatSi(plies, "length")}) cannot fill the copper beside them (${formatSi(filled, "length")}). Add a ply.`,
      `layers[${index}].plies`,
    );
  }
  return plies - filled;
}

/** Thickness of any layer as built [m]: copper finished, prepreg as pressed, mask over the laminate. Throws DomainError. */
export function builtThickness(stackup: Stackup, index: number): number {
  const layer = layerAt(stackup, index);
  if (isCopper(layer)) return finishedCopper(stackup, index);
  if (layer.kind === "prepreg" && layer.thicknessMode === "pressed") return pressedThickness(stackup, index);
  if (layer.thickness === null)
    throw new DomainError(`${layer.name} has no thickness.`, `layers[${index}].thickness`);
  if (!(layer.thickness > 0)) {
    throw new DomainError(`The thickness of ${layer.name} must be above zero.`, `layers[${index}].thickness`);
  }
  return layer.thickness;
}

/**
 * Exact thickness of one layer as built, in `unit`, from what was typed.
 * @returns null where an input of it is missing
 */
export function builtThicknessExact(
  layers: readonly TypedStackLayer[],
  index: number,
  unit: string,
): Quantity | null {
  const terms = thicknessTerms(layers, index);
  return terms && addWeightedExact(terms, unit);
}

/**
 * Exact thickness of the whole stackup, in `unit`: every layer as built, masks over the laminate.
 * @returns total, the same without masks, and the names of the layers that lack an input and count as nothing
 */
export function totalThickness(
  layers: readonly TypedStackLayer[],
  unit: string,
): { total: Quantity; withoutMask: Quantity; missing: string[] } {
  const all: WeightedQuantity[] = [];
  const bare: WeightedQuantity[] = [];
  const missing: string[] = [];
  layers.forEach((layer, index) => {
    const terms = thicknessTerms(layers, index);
    if (!terms) missing.push(layer.name);
    all.push(...(terms ?? []));
    if (layer.kind !== "mask") bare.push(...(terms ?? []));
  });
  return { total: addWeightedExact(all, unit), withoutMask: addWeightedExact(bare, unit), missing };
}

function thicknessTerms(layers: readonly TypedStackLayer[], index: number): WeightedQuantity[] | null {
  const layer = layers[index];
  if (!layer) return null;
  if (isCopper(layer)) return copperTerms(layer);
  if (layer.kind !== "prepreg" || layer.thicknessMode !== "pressed") {
    return layer.thickness ? [{ quantity: layer.thickness }] : null;
  }
  if (layer.plies.length === 0) return null;
  const terms: WeightedQuantity[] = layer.plies.map((ply) => ({
    quantity: ply.thickness,
    factors: [ply.count],
  }));
  for (const copper of copperSinkingInto(layers, index)) {
    const facing = layers[copper];
    const thickness = facing && copperTerms(facing);
    if (!thickness || facing.coveragePercent === null) return null;
    const lessPercent = facing.coveragePercent;
    terms.push(...thickness.map((term) => ({ ...term, lessPercent, subtract: true })));
  }
  return terms;
}

function copperTerms(layer: TypedStackLayer): WeightedQuantity[] | null {
  if (layer.baseFoil)
    return [{ quantity: layer.baseFoil }, ...(layer.plating ? [{ quantity: layer.plating }] : [])];
  return layer.thickness ? [{ quantity: layer.thickness }] : null;
}

function coverageOf(stackup: Stackup, index: number): number {
  const layer = layerAt(stackup, index);
  if (layer.coverage === null || !(layer.coverage >= 0 && layer.coverage <= 1)) {
    throw new DomainError(
      `${layer.name} has no copper coverage, so the pressed thickness beside it is not known.`,
      `layers[${index}].coverage`,
    );
  }
  return layer.coverage;
}

export function layerAt(stackup: Stackup, index: number): StackLayer {
  const layer = stackup.layers[index];
  if (!layer) throw new DomainError(`The stackup has no layer ${index + 1}.`, "layers");
  return layer;
}
