import { isCopper, isDielectric, type StackLayerKind } from "./model";

type Kinded = { kind: StackLayerKind };

/**
 * The way a copper layer sticks out of what it lies on: "up" toward the top of the board or "down".
 *
 * Outermost copper sticks outward. Inner copper lies on its core and sinks into the prepreg on the other side. Between
 * two prepregs (foil of a sub-lamination), and between two cores, it sticks outward, away from the board's middle.
 */
export function protrusionOf(layers: readonly Kinded[], index: number): "up" | "down" {
  const above = nearestDielectric(layers, index, -1);
  const below = nearestDielectric(layers, index, 1);
  if (!above) return "up";
  if (!below) return "down";
  if (above.kind !== below.kind) return above.kind === "prepreg" ? "up" : "down";
  return index < (layers.length - 1) / 2 ? "up" : "down";
}

/** Copper layers that sink into this dielectric: those directly beside it that stick out toward it. */
export function copperSinkingInto(layers: readonly Kinded[], index: number): number[] {
  const found: number[] = [];
  const above = layers[index - 1];
  const below = layers[index + 1];
  if (
    above &&
    isCopper(above) &&
    protrusionOf(layers, index - 1) === "down" &&
    nearestDielectric(layers, index - 1, -1)
  ) {
    found.push(index - 1);
  }
  if (
    below &&
    isCopper(below) &&
    protrusionOf(layers, index + 1) === "up" &&
    nearestDielectric(layers, index + 1, 1)
  ) {
    found.push(index + 1);
  }
  return found;
}

/** The next dielectric in that direction before any other copper. */
export function nearestDielectric(
  layers: readonly Kinded[],
  index: number,
  step: 1 | -1,
): { index: number; kind: StackLayerKind } | null {
  for (let at = index + step; at >= 0 && at < layers.length; at += step) {
    const layer = layers[at];
    if (!layer || isCopper(layer)) return null;
    if (isDielectric(layer)) return { index: at, kind: layer.kind };
  }
  return null;
}
