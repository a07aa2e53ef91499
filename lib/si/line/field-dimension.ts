import { bestClosedForm, type CrossSection } from "../cross-section";
import { DomainError, EngineError } from "../errors";
import { solveCrossSection } from "../field";
import { dimensionForTarget, type DimensionRequest } from "./dimension-for-target";
import { impedanceOf, type ImpedanceTarget } from "./impedance-of";

export interface FieldDimensionRequest extends Omit<DimensionRequest, "impedanceAt" | "tolerance"> {
  sectionAt: (dimension: number) => CrossSection;
  kind: ImpedanceTarget["kind"];
  accuracy?: "live" | "standard" | "reference";
}

/** Relative impedance error at which the search ends, and with which it makes do after many rounds. */
const TOLERANCE = 1e-6;
const LOOSE = 1e-5;
/** meshes differ from width to width: a slope is measured only over more than this [ln x] */
const LEAST_STRETCH = 0.01;
const LONGEST_SEARCH = 8;
/** d ln Z / d ln x where no closed form tells it: of a width, and of a gap */
const SLOPE = { width: -0.45, gap: 0.15 };

/**
 * The dimension at which a field solution meets its target: from the closed form's answer by secants in
 * (ln x, ln Z), three or four solves. The impedance told is what a field solution gives at that dimension.
 *
 * @returns dimension [m], impedance there [Ω], number of field solves
 * @throws as dimensionForTarget
 */
export function fieldDimension(request: FieldDimensionRequest): {
  value: number;
  impedance: number;
  solves: number;
} {
  const { sectionAt, kind, accuracy, ohms, min, max, grid } = request;
  let solves = 0;
  const impedanceAt = (x: number) => {
    solves += 1;
    return impedanceOf(solveCrossSection(sectionAt(x), { accuracy }), kind);
  };
  const root = secant(request, impedanceAt);
  if (root !== null) {
    if (grid === undefined)
      return { value: root.value, impedance: root.impedance ?? impedanceAt(root.value), solves };
    const steps = Math.round(root.value / grid);
    const value = Number((steps * grid).toPrecision(12));
    if (value >= min * (1 - 1e-9) && value <= max * (1 + 1e-9)) {
      return { value, impedance: impedanceAt(value), solves };
    }
  }
  // outside the range, at its ends, or stubborn: bracket it, and tell what can be reached
  const found = dimensionForTarget({
    ...request,
    ohms,
    tolerance: TOLERANCE,
    impedanceAt,
  });
  return { ...found, solves };
}

/**
 * null where the target is not met strictly inside the range; impedance null where the root is foretold to within a
 * twentieth of the grid and not solved.
 */
function secant(
  request: FieldDimensionRequest,
  impedanceAt: (x: number) => number,
): { value: number; impedance: number | null } | null {
  const { ohms, min, max, grid = 0 } = request;
  if (!(min > 0 && max > min && ohms > 0 && Number.isFinite(max) && Number.isFinite(ohms))) return null;
  let { x, slope } = startingPoint(request);
  let lastX = 0;
  let lastZ = 0;
  for (let round = 0; round < LONGEST_SEARCH; round++) {
    let z: number;
    try {
      z = impedanceAt(x);
    } catch (error) {
      if (error instanceof DomainError && error.field !== "target.kind") return null;
      throw error;
    }
    const miss = Math.log(z / ohms);
    if (Math.abs(miss) <= (round < 5 ? TOLERANCE : LOOSE)) return { value: x, impedance: z };
    if (round > 0 && Math.abs(Math.log(x / lastX)) > LEAST_STRETCH) {
      const measured = Math.log(z / lastZ) / Math.log(x / lastX);
      if (measured * slope > 0) slope = measured;
    }
    lastX = x;
    lastZ = z;
    // no step further than a factor of three: slopes flatten out there
    x *= Math.exp(Math.max(-1.1, Math.min(1.1, -miss / slope)));
    // the last step's error is of the order of the square of its size
    if (round > 0 && x > min && x < max && Math.abs(miss) * Math.abs(x - lastX) < 0.05 * grid) {
      return { value: x, impedance: null };
    }
    if (x < min || x > max) {
      if (lastX === min || lastX === max) return null;
      x = x < min ? min : max;
    }
  }
  return null;
}

/** Where the closed form meets the target, and its slope d ln Z / d ln x there. */
function startingPoint(request: FieldDimensionRequest): { x: number; slope: number } {
  const { sectionAt, kind, min, max, spoken } = request;
  const closed = (x: number) => impedanceOf(bestClosedForm(sectionAt(x)), kind);
  const fallback = spoken === "gap" ? SLOPE.gap : SLOPE.width;
  try {
    const { value } = dimensionForTarget({
      ...request,
      grid: undefined,
      impedanceAt: closed,
      tolerance: 3e-3,
    });
    const slope = Math.log(closed(value * 1.05) / closed(value)) / Math.log(1.05);
    return { x: value, slope: slope * fallback > 0 ? slope : fallback };
  } catch (error) {
    if (error instanceof EngineError) return { x: Math.sqrt(min * max), slope: fallback };
    throw error;
  }
}
