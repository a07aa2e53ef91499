import { bestClosedForm, type BestClosedForm } from "../cross-section";
import { DomainError } from "../errors";
import { dimensionForTarget, impedanceOf, type ImpedanceTarget } from "../line";
import { buildCrossSection, type BuiltCrossSection, type TraceShape } from "./build-cross-section";
import type { Stackup } from "./model";

/**
 * Impedance and delay of a trace on a layer, by the closed form in use.
 * @throws DomainError for missing or illegal inputs, UnsupportedError where no closed form fits
 */
export function lineOnLayer(
  stackup: Stackup,
  index: number,
  shape: TraceShape,
): { line: BestClosedForm; built: BuiltCrossSection } {
  const built = buildCrossSection(stackup, index, shape);
  return { line: bestClosedForm(built.section), built };
}

export interface LayerWidthRequest {
  stackup: Stackup;
  /** a signal or foil layer */
  index: number;
  target: ImpedanceTarget;
  vary: "width" | "gap";
  /** foot width, where the gap varies; gap of a pair, where the width varies [m] */
  width?: number;
  gap?: number;
  coplanarGap?: number;
  /** bounds of what varies [m] */
  min: number;
  max: number;
  grid?: number;
}

/**
 * Foot width, or gap, at which a line on that layer meets its target; the closed form in use.
 * @returns value [m], impedance there [Ω], the line and its section
 * @throws DomainError, UnreachableTargetError with the reachable range, UnsupportedError
 */
export function widthOnLayer(request: LayerWidthRequest): {
  value: number;
  impedance: number;
  line: BestClosedForm;
  built: BuiltCrossSection;
} {
  const { stackup, index, target, vary, coplanarGap } = request;
  const pair = target.kind !== "single";
  const shapeAt = (value: number): TraceShape => {
    const width = vary === "width" ? value : request.width;
    const gap = vary === "gap" ? value : request.gap;
    if (width === undefined) throw new DomainError("The width is not told.", "width");
    if (pair && gap === undefined) throw new DomainError("A pair needs a gap.", "gap");
    return {
      width,
      ...(pair ? { gap } : {}),
      ...(coplanarGap === undefined ? {} : { coplanarGap }),
    };
  };
  if (vary === "gap" && !pair) throw new DomainError("Only a pair has a gap to vary.", "vary");
  const found = dimensionForTarget({
    impedanceAt: (value) => impedanceOf(lineOnLayer(stackup, index, shapeAt(value)).line, target.kind),
    ohms: target.ohms,
    spoken: vary,
    min: request.min,
    max: request.max,
    grid: request.grid,
  });
  return {
    value: found.value,
    impedance: found.impedance,
    ...lineOnLayer(stackup, index, shapeAt(found.value)),
  };
}
