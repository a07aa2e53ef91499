import type { Stackup, StackLayer, StackLayerKind } from "@/lib/si/stackup";

/** SI stackups for the tests: "mask", or kind:name with thickness in µm and Dk. */

const um = 1e-6;

export function layer(kind: StackLayerKind, name: string, over: Partial<StackLayer> = {}): StackLayer {
  const copper = kind === "foil" || kind === "signal" || kind === "plane";
  return {
    kind,
    name,
    thickness: copper ? null : 100 * um,
    thicknessMode: "typed",
    tolerance: null,
    plies: [],
    dk: copper ? null : 4,
    df: copper ? null : 0.02,
    dkFrequency: null,
    baseFoil: copper ? 35 * um : null,
    plating: null,
    coverage: copper ? 0.5 : null,
    etch: copper ? 10 * um : null,
    roughness: null,
    maskOverTrace: kind === "mask" ? 15 * um : null,
    ...over,
  };
}

export const core = (name: string, micrometres: number, dk = 4.2) =>
  layer("core", name, { thickness: micrometres * um, dk });
export const prepreg = (name: string, micrometres: number, dk = 3.8) =>
  layer("prepreg", name, { thickness: micrometres * um, dk });
export const signal = (name: string, over: Partial<StackLayer> = {}) => layer("signal", name, over);
export const plane = (name: string, over: Partial<StackLayer> = {}) => layer("plane", name, over);
export const mask = (name: string, micrometres = 25) =>
  layer("mask", name, { thickness: micrometres * um, dk: 3.5 });

/** mask, S, prepreg, P, core, S, prepreg, S, core, P, prepreg, S, mask */
export function sixLayers(): Stackup {
  return {
    layers: [
      mask("TM"),
      signal("L1"),
      prepreg("D1", 100),
      plane("L2"),
      core("D2", 200),
      signal("L3"),
      prepreg("D3", 300),
      signal("L4"),
      core("D4", 200),
      plane("L5"),
      prepreg("D5", 100),
      signal("L6"),
      mask("BM"),
    ],
  };
}
