import { bestClosedForm, type CrossSection, type Trace } from "../cross-section";
import { DomainError, UnsupportedError } from "../errors";
import { dimensionForTarget } from "./dimension-for-target";

export interface ImpedanceTarget {
  kind: "single" | "differential" | "common";
  ohms: number;
}

export interface WidthRequest {
  section: CrossSection;
  target: ImpedanceTarget;
  vary: "width" | "spacing";
  /** bounds of the varied dimension [m] */
  min: number;
  max: number;
  /** step that the fabricator or layout program works in [m] */
  grid?: number;
  method: "closed-form" | "field";
  accuracy?: "live" | "standard" | "reference";
}

export interface WidthResult {
  /** bottom width, or gap between the bottom faces [m] */
  value: number;
  /** at that value [Ω] */
  impedance: number;
  method: "closed-form" | "field";
  /** how often a line was computed */
  solves: number;
}

/**
 * Width (of the bottom face) or spacing at which a line meets its target.
 * The side slope, the spacing between edges (when the width varies) and the coplanar slot stay; a pair stays centred.
 *
 * @returns value [m] with impedance [Ω]; without a grid the impedance is the target to 1e-10
 * @throws DomainError for illegal input, UnreachableTargetError with the reachable range, UnsupportedError where no
 *   closed form fits or a field solution is asked for
 */
export function widthForImpedance(request: WidthRequest): WidthResult {
  const { section, target, vary, min, max, grid, method } = request;
  if (method === "field")
    throw new UnsupportedError("Widths are found by closed forms only so far.", "method");
  if (vary === "spacing" && section.traces.length !== 2) {
    throw new DomainError("Only a pair has a spacing to vary.", "vary");
  }
  const reshape = vary === "width" ? withWidth : withSpacing;
  const found = dimensionForTarget({
    impedanceAt: (value) => impedanceOf(bestClosedForm(reshape(section, value)), target.kind),
    ohms: target.ohms,
    spoken: vary === "width" ? "width" : "gap",
    min,
    max,
    grid,
  });
  return { ...found, method };
}

/** What a closed form and a field solution have in common. */
interface Impedances {
  single?: { impedance: number };
  pair?: { differential: number; common: number };
}

/**
 * The impedance of that kind [Ω].
 * @throws DomainError where the line has none: a single impedance of a pair, a differential one of a single trace
 */
export function impedanceOf(line: Impedances, kind: ImpedanceTarget["kind"]): number {
  const value = kind === "single" ? line.single?.impedance : line.pair?.[kind];
  if (value === undefined) {
    throw new DomainError(
      `A ${line.pair ? "pair" : "single trace"} has no ${kind} impedance.`,
      "target.kind",
    );
  }
  return value;
}

/** The same cross-section with another bottom width of every trace; slopes, gap, slot and the pair's centre stay. */
export function withWidth(section: CrossSection, width: number): CrossSection {
  const resized = section.traces.map((trace) => ({
    ...trace,
    widthBottom: width,
    widthTop: trace.widthTop + width - trace.widthBottom,
  }));
  if (resized.some((trace) => !(trace.widthTop > 0))) {
    throw new DomainError("The trace is so narrow that etching leaves no top.", "min");
  }
  const [left, right] = section.traces;
  if (!left || !right) return { ...section, traces: resized };
  return { ...section, traces: centred(resized, (left.x + right.x) / 2, gapOf(left, right)) };
}

/** The same pair with another gap between its bottom faces; its centre stays. */
export function withSpacing(section: CrossSection, gap: number): CrossSection {
  const [left, right] = section.traces;
  if (!left || !right) throw new DomainError("Only a pair has a spacing to vary.", "vary");
  return { ...section, traces: centred(section.traces, (left.x + right.x) / 2, gap) };
}

function gapOf(left: Trace, right: Trace): number {
  return right.x - left.x - (left.widthBottom + right.widthBottom) / 2;
}

function centred(traces: Trace[], centre: number, gap: number): Trace[] {
  const [left, right] = traces;
  if (!left || !right) return traces;
  if (Math.abs(left.x - right.x) < Math.abs(left.y - right.y)) return traces; // broadside: one stays above the other
  const span = left.widthBottom + gap + right.widthBottom;
  return [
    { ...left, x: centre - span / 2 + left.widthBottom / 2 },
    { ...right, x: centre + span / 2 - right.widthBottom / 2 },
  ];
}
