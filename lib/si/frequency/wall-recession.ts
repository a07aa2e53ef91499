import { stackHeight, type CrossSection, type LineParameters } from "../cross-section";
import { UnsupportedError } from "../errors";
import { EPS0, MU0 } from "../physical-constants";
import { inverse } from "./two-by-two";

/** The field solver, or a stand-in for it. */
export type Solve = (section: CrossSection) => LineParameters;

/**
 * The section in air with every metal wall (traces, planes, coplanar copper) drawn back by `depth` along its normal;
 * negative depths grow the metal.
 * @param depth  [m], below half the copper thickness
 */
export function recededInAir(section: CrossSection, depth: number): CrossSection {
  let widening = 0;
  const traces = section.traces.map((trace, index) => {
    const slope = (trace.widthBottom - trace.widthTop) / 2 / trace.thickness;
    const normal = depth * Math.sqrt(1 + slope * slope);
    const atBottom = normal + slope * depth;
    const atTop = normal - slope * depth;
    if (index === 0) widening = 2 * atBottom;
    return {
      x: trace.x,
      // the lower plane's face, where y begins, has moved down
      y: trace.y + 2 * depth,
      thickness: trace.thickness - 2 * depth,
      widthBottom: trace.widthBottom - 2 * atBottom,
      widthTop: trace.widthTop - 2 * atTop,
    };
  });
  return {
    layers: [{ thickness: stackHeight(section) + 2 * depth, er: 1 }],
    upperPlane: section.upperPlane,
    traces,
    ...(section.coplanar && { coplanar: { gap: section.coplanar.gap + widening } }),
  };
}

/** Step of the differences ÷ copper thickness: far above the solver's own noise, its error taken off by extrapolation. */
const STEP = 0.04;

/**
 * Resistance of thick smooth metal at high frequency ÷ its surface resistance, by the incremental-inductance rule.
 *
 *     kR = (1/μ0) dL/dn,   R = Rs kR,   L = μ0 ε0 C0⁻¹ with every wall receded by n
 *
 * @returns kR [1/m], one matrix over the traces; traces, planes and coplanar copper together. The physical R lies 1 to
 *   2 % lower while δ is a few per cent of the thickness, because sharp corners carry less than the rule says
 * @throws UnsupportedError for copper without thickness, whose loss has no limit
 * @see H. A. Wheeler, "Formulas for the skin effect", Proc. IRE 30, 1942, p. 412
 */
export function resistanceFactor(section: CrossSection, solve: Solve): number[][] {
  const thinnest = Math.min(...section.traces.map((trace) => trace.thickness));
  if (thinnest === 0) {
    throw new UnsupportedError(
      "Copper without thickness has no conductor loss that could be computed. Give it its thickness.",
      "traces[0].thickness",
    );
  }
  const narrowest = Math.min(...section.traces.flatMap((trace) => [trace.widthBottom, trace.widthTop]));
  const step = STEP * Math.min(thinnest, narrowest / 2);
  const inductance = (depth: number) => inverse(solve(recededInAir(section, depth)).airCapacitance);
  const slope = (h: number) => {
    const out = inductance(h);
    const back = inductance(-h);
    return out.map((row, i) => row.map((value, j) => (EPS0 * (value - back[i]![j]!)) / (2 * h)));
  };
  const coarse = slope(2 * step);
  const fine = slope(step);
  return fine.map((row, i) => row.map((value, j) => (4 * value - coarse[i]![j]!) / 3));
}

/** kR for one current pattern of unit square sum, or its inductance, from a matrix over the traces. */
export function quadratic(matrix: number[][], vector: readonly number[]): number {
  let sum = 0;
  vector.forEach((a, i) => vector.forEach((b, j) => (sum += a * b * matrix[i]![j]!)));
  return sum;
}

/** External inductance [H/m] of the section, every wall perfect. */
export function externalInductance(params: LineParameters): number[][] {
  return inverse(params.airCapacitance).map((row) => row.map((value) => MU0 * EPS0 * value));
}
