/** A stackup in SI units, ordered top to bottom as the board is seen from its top side. */
export interface Stackup {
  layers: StackLayer[];
}

export type StackLayerKind = "mask" | "foil" | "signal" | "plane" | "core" | "prepreg";

export interface Ply {
  /** glass style by its IPC-4412 number */
  style: string;
  /** as it fills the opening without copper [m] */
  thickness: number;
  count: number;
}

export interface StackLayer {
  kind: StackLayerKind;
  name: string;
  /** Dielectric: its thickness; mask: over the laminate; copper: finished, where foil and plating are not told [m]. */
  thickness: number | null;
  /** pressed: from plies and the copper they fill; prepreg only */
  thicknessMode: "typed" | "pressed";
  /** ± fraction of the thickness */
  tolerance: number | null;
  plies: Ply[];
  /** relative permittivity and loss tangent at `dkFrequency` [Hz] */
  dk: number | null;
  df: number | null;
  dkFrequency: number | null;
  /** [m] */
  baseFoil: number | null;
  /** all cycles together [m] */
  plating: number | null;
  /** share of the area that is copper, 0 to 1 */
  coverage: number | null;
  /** foot width minus crown width of an etched trace, both sides together [m] */
  etch: number | null;
  /** [m] rms */
  roughness: number | null;
  /** mask only [m] */
  maskOverTrace: number | null;
}

/** Foil and signal layers carry traces; planes are references. */
export function isCopper(layer: { kind: StackLayerKind }): boolean {
  return layer.kind === "foil" || layer.kind === "signal" || layer.kind === "plane";
}

export function isSignal(layer: { kind: StackLayerKind }): boolean {
  return layer.kind === "foil" || layer.kind === "signal";
}

export function isDielectric(layer: { kind: StackLayerKind }): boolean {
  return layer.kind === "core" || layer.kind === "prepreg";
}
