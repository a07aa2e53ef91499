import { DomainError } from "@/lib/si/errors";
import type { Stackup, StackLayer } from "@/lib/si/stackup/model";
import { isCopper } from "@/lib/si/stackup/model";
import { protrusionOf } from "@/lib/si/stackup/protrusion";
import { builtThickness } from "@/lib/si/stackup/thickness";

/** What is tried of the layers around a trace; null: as the stackup has it. */
export interface TrialChange {
  /** from the trace's foot to the plane below it [m] */
  below: number | null;
  /** from the trace's crown to the plane above it [m] */
  above: number | null;
  dkBelow: number | null;
  dkAbove: number | null;
  /** solder mask over the trace [m] */
  mask: number | null;
}

/** The dielectric on one side of a trace, up to its plane. */
export interface TrialSide {
  /** [m] */
  height: number;
  /** what of it is copper of layers passed on the way [m] */
  fixed: number;
  /** in series: Σh / Σ(h/Dk) */
  dk: number;
  /** dielectric layers, as indices into the stackup */
  layers: number[];
}

/** What can be tried around a trace; "below" is the side of the drawing's lower plane. */
export interface TrialSides {
  below: TrialSide | null;
  above: TrialSide | null;
  /** thickness over the trace [m] and its layer */
  mask: { overTrace: number; layer: number } | null;
}

/**
 * The dielectrics around a trace as its cross-section has them: below is where its foot lies, or the only plane.
 * @throws DomainError where a thickness or Dk is missing
 */
export function trialSides(stackup: Stackup, index: number): TrialSides {
  const up = sideOf(stackup, index, -1);
  const down = sideOf(stackup, index, 1);
  const both = up.plane && down.plane;
  const upward = both ? protrusionOf(stackup.layers, index) : up.plane ? "down" : "up";
  const [below, above] = upward === "up" ? [down, up] : [up, down];
  return {
    below: below.plane ? below.side : null,
    above: above.plane ? above.side : null,
    mask: above.plane || above.side.layers.length > 0 ? null : above.mask,
  };
}

/** The stackup as it is tried. Layers that are pressed keep what is tried of them as typed. */
export function trialStackup(stackup: Stackup, index: number, change: TrialChange): Stackup {
  if (Object.values(change).every((value) => value === null)) return stackup;
  const sides = trialSides(stackup, index);
  const layers = [...stackup.layers];
  changeSide(stackup, layers, sides.below, change.below, change.dkBelow);
  changeSide(stackup, layers, sides.above, change.above, change.dkAbove);
  if (sides.mask && change.mask !== null) {
    const { layer, overTrace } = sides.mask;
    const was = layers[layer];
    const share = overTrace > 0 ? change.mask / overTrace : 1;
    if (was)
      layers[layer] = {
        ...was,
        thickness: builtThickness(stackup, layer) * share,
        maskOverTrace: change.mask,
      };
  }
  return { ...stackup, layers };
}

function sideOf(stackup: Stackup, from: number, step: 1 | -1) {
  const side: TrialSide = { height: 0, fixed: 0, dk: 1, layers: [] };
  let series = 0;
  let mask: TrialSides["mask"] = null;
  let plane = false;
  for (let at = from + step; at >= 0 && at < stackup.layers.length; at += step) {
    const layer = stackup.layers[at] as StackLayer; // within the bounds of the loop
    if (layer.kind === "plane") {
      plane = true;
      break;
    }
    const thickness = builtThickness(stackup, at);
    if (layer.kind === "mask") mask = { overTrace: layer.maskOverTrace ?? thickness, layer: at };
    else if (isCopper(layer)) side.fixed += thickness;
    else {
      if (layer.dk === null) throw new DomainError(`${layer.name} has no Dk.`, `layers[${at}].dk`);
      side.layers.push(at);
      series += thickness / layer.dk;
    }
    if (layer.kind !== "mask") side.height += thickness;
  }
  if (series > 0) side.dk = (side.height - side.fixed) / series;
  return { side, plane, mask };
}

function changeSide(
  stackup: Stackup,
  layers: StackLayer[],
  side: TrialSide | null,
  height: number | null,
  dk: number | null,
): void {
  if (!side) return;
  if (height !== null && !(height > side.fixed))
    throw new DomainError("The height tried is less than the copper of the layers between.", "height");
  const thicker = height === null ? 1 : (height - side.fixed) / (side.height - side.fixed);
  const denser = dk === null ? 1 : dk / side.dk;
  for (const at of side.layers) {
    const was = layers[at];
    if (!was) continue;
    layers[at] = {
      ...was,
      ...(height === null
        ? {}
        : { thicknessMode: "typed" as const, thickness: builtThickness(stackup, at) * thicker }),
      ...(dk === null || was.dk === null ? {} : { dk: was.dk * denser }),
    };
  }
}
