import type { CrossSection, Trace } from "../cross-section";
import { DomainError } from "../errors";

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
