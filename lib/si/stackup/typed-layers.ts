import { toSi, type Dimension, type Quantity } from "../units";
import type { Stackup, StackLayer, StackLayerKind } from "./model";

/** A layer as a person typed it; the shape of the stored document, without its ids. */
export interface TypedStackLayer {
  kind: StackLayerKind;
  name: string;
  material: string;
  thickness: Quantity | null;
  thicknessMode: "typed" | "pressed";
  tolerancePercent: string | null;
  plies: { style: string; resinPercent: string | null; thickness: Quantity; count: number }[];
  dk: string | null;
  df: string | null;
  dkFrequency: Quantity | null;
  baseFoil: Quantity | null;
  plating: Quantity | null;
  coveragePercent: string | null;
  etch: Quantity | null;
  roughness: Quantity | null;
  maskOverTrace: Quantity | null;
  planeNet: string;
  origin: "measured" | "model" | "data sheet" | "fabricator" | "assumed";
}

/**
 * The stackup in SI units.
 * @throws DomainError where a value is no number or a unit is not of its kind
 */
export function stackupFromTyped(layers: readonly TypedStackLayer[]): Stackup {
  return { layers: layers.map(layerFromTyped) };
}

function layerFromTyped(layer: TypedStackLayer): StackLayer {
  return {
    kind: layer.kind,
    name: layer.name,
    thickness: si(layer.thickness, "length"),
    thicknessMode: layer.thicknessMode,
    tolerance: percent(layer.tolerancePercent),
    plies: layer.plies.map((ply) => ({
      style: ply.style,
      thickness: toSi(ply.thickness, "length"),
      count: ply.count,
    })),
    dk: plain(layer.dk),
    df: plain(layer.df),
    dkFrequency: si(layer.dkFrequency, "frequency"),
    baseFoil: si(layer.baseFoil, "length"),
    plating: si(layer.plating, "length"),
    coverage: percent(layer.coveragePercent),
    etch: si(layer.etch, "length"),
    roughness: si(layer.roughness, "length"),
    maskOverTrace: si(layer.maskOverTrace, "length"),
  };
}

function si(quantity: Quantity | null, dimension: Dimension): number | null {
  return quantity ? toSi(quantity, dimension) : null;
}

function percent(text: string | null): number | null {
  return text === null ? null : toSi({ value: text, unit: "%" }, "ratio");
}

function plain(text: string | null): number | null {
  return text === null ? null : toSi({ value: text, unit: "1" }, "ratio");
}
