import { bestClosedForm, type BestClosedForm, type LineParameters, type Mode } from "../cross-section";
import { DomainError, EngineError } from "../errors";
import { solveCrossSection } from "../field";
import type { Accuracy } from "../field/accuracy";
import { fieldDimension, type ImpedanceTarget } from "../line";
import { buildCrossSection, type BuiltCrossSection, type TraceShape } from "./build-cross-section";
import type { Stackup } from "./model";

/** A trace or pair on a layer: the field solution, and the published formula beside it. */
export interface LayerLine {
  single?: Mode;
  pair?: { odd: Mode; even: Mode; differential: number; common: number };
  field: LineParameters;
  /** null where no published formula fits the cross-section */
  closedForm: BestClosedForm | null;
}

/** How the numbers of a LayerLine come about, for tables and notes. */
export const FIELD_METHOD = "2-D field solution";

/**
 * Impedance and delay of a trace or pair on a layer, by the field solver (`standard` unless told otherwise), with the
 * closed form that fits beside it.
 * @throws DomainError for missing or illegal inputs
 */
export function lineOnLayer(
  stackup: Stackup,
  index: number,
  shape: TraceShape,
  accuracy: Accuracy = "standard",
): { line: LayerLine; built: BuiltCrossSection } {
  const built = buildCrossSection(stackup, index, shape);
  const field = solveCrossSection(built.section, { accuracy });
  const { single, pair } = field;
  return {
    line: {
      ...(single ? { single } : {}),
      ...(pair?.odd && pair.even
        ? {
            pair: {
              odd: pair.odd,
              even: pair.even,
              differential: pair.differential,
              common: pair.common,
            },
          }
        : {}),
      field,
      closedForm: closedFormOf(built),
    },
    built,
  };
}

/** The formula that fits, or null where none does or where it has no value. */
function closedFormOf({ section }: BuiltCrossSection): BestClosedForm | null {
  try {
    return bestClosedForm(section);
  } catch (error) {
    if (error instanceof EngineError) return null;
    throw error;
  }
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
  accuracy?: Accuracy;
}

/**
 * Foot width, or gap, at which a line on that layer meets its target, by the field solver.
 * @returns value [m], impedance there [Ω], the line and its section
 * @throws DomainError, UnreachableTargetError with the reachable range
 */
export function widthOnLayer(request: LayerWidthRequest): {
  value: number;
  impedance: number;
  line: LayerLine;
  built: BuiltCrossSection;
} {
  const { stackup, index, target, vary, coplanarGap, accuracy = "standard" } = request;
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
  const found = fieldDimension({
    sectionAt: (value) => buildCrossSection(stackup, index, shapeAt(value)).section,
    kind: target.kind,
    accuracy,
    ohms: target.ohms,
    spoken: vary,
    min: request.min,
    max: request.max,
    grid: request.grid,
  });
  return {
    value: found.value,
    impedance: found.impedance,
    ...lineOnLayer(stackup, index, shapeAt(found.value), accuracy),
  };
}
