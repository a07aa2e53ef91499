import { DomainError, UnreachableTargetError } from "../errors";
import { formatSi } from "../units";
import { bracketEnds, monotonicRoot } from "./monotonic-root";

export interface DimensionRequest {
  /** impedance [Ω] by the dimension [m]; may throw DomainError outside what its formula describes */
  impedanceAt: (dimension: number) => number;
  /** target [Ω] */
  ohms: number;
  /** "width", "gap": for the sentence of an error */
  spoken: string;
  min: number;
  max: number;
  grid?: number;
  /** relative impedance error at which the search ends; 1e-10 */
  tolerance?: number;
}

/** Far below what any fabricator holds. */
const TOLERANCE = 1e-10;

/**
 * The dimension at which a line meets its target, alone or on the nearest step of a grid.
 *
 * @returns dimension [m], the impedance there [Ω] and the number of evaluations
 * @throws DomainError for an illegal range, grid or target; UnreachableTargetError with the reachable range
 */
export function dimensionForTarget(request: DimensionRequest): {
  value: number;
  impedance: number;
  solves: number;
} {
  const { ohms, min, max, grid, impedanceAt, tolerance = TOLERANCE } = request;
  if (!(ohms > 0 && Number.isFinite(ohms))) {
    throw new DomainError(`The target impedance must be above zero; it is ${ohms}.`, "target.ohms");
  }
  if (!(min > 0 && max > min && Number.isFinite(max))) {
    throw new DomainError(`The ${request.spoken} must be sought between two lengths above zero.`, "min");
  }
  if (grid !== undefined && !(grid > 0 && Number.isFinite(grid))) {
    throw new DomainError("The grid must be above zero.", "grid");
  }
  const deviation = (x: number) => impedanceAt(x) / ohms - 1;
  const ends = bracketEnds(deviation, min, max);
  const { low, high } = ends;
  if (
    low.value > tolerance === high.value > tolerance &&
    Math.min(Math.abs(low.value), Math.abs(high.value)) > tolerance
  ) {
    throw unreachable(
      request,
      [low.value, high.value].map((value) => ohms * (1 + value)),
    );
  }
  const root = monotonicRoot(deviation, ends, tolerance);
  const solves = ends.evaluations + root.evaluations;
  if (grid === undefined) return { value: root.x, impedance: ohms * (1 + root.residual), solves };
  const value = nearestStep(root.x, grid, low.x, high.x);
  return { value, impedance: impedanceAt(value), solves: solves + 1 };
}

function nearestStep(x: number, grid: number, min: number, max: number): number {
  const first = Math.ceil(min / grid - 1e-9);
  const last = Math.floor(max / grid + 1e-9);
  if (last < first) throw new DomainError("No step of the grid lies within the allowed range.", "grid");
  const step = Math.min(last, Math.max(first, Math.round(x / grid)));
  return Number((step * grid).toPrecision(12)); // 3 × 0.1 µm is 0.3 µm, not 0.30000000000000004
}

function unreachable(request: DimensionRequest, ends: number[]): UnreachableTargetError {
  const reachable = { min: Math.min(...ends), max: Math.max(...ends) };
  const ohms = (value: number) => formatSi(value, "resistance", { digits: 3 });
  const length = (value: number) => formatSi(value, "length", { digits: 3, unit: "mm" });
  return new UnreachableTargetError(
    `${ohms(request.ohms)} cannot be met with a ${request.spoken} of ${length(request.min)} to ${length(request.max)}: ` +
      `that gives ${ohms(reachable.min)} to ${ohms(reachable.max)}.`,
    reachable,
  );
}
