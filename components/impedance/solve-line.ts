import { EngineError, UnreachableTargetError } from "@/lib/si/errors";
import { impedanceOf } from "@/lib/si/line";
import { FIELD_METHOD, lineOnLayer, type Stackup, widthOnLayer } from "@/lib/si/stackup";

export type LineKind = "single" | "differential";

/** Widths and gaps that are looked through: from what can hardly be etched to what nobody routes [m]. */
export const SOUGHT = { min: 50e-6, max: 2.5e-3 } as const;

/** What a width, and the gap of a pair, gives on a layer. */
export interface LineFacts {
  /** [Ω] */
  impedance: number;
  /** one way [s/m] */
  delay: number;
  effectivePermittivity: number;
  title: string;
  inRange: boolean;
}

export type Outcome<T> =
  { ok: true; value: T } | { ok: false; reason: string; reachable: { min: number; max: number } | null };

export interface FoundDimension {
  /** [m] */
  dimension: number;
  /** on the grid [Ω] */
  impedance: number;
  inRange: boolean;
  title: string;
}

/** Impedance and delay of a trace or pair by the field solver, or why there is none. */
export function lineFacts(
  stackup: Stackup,
  index: number,
  shape: { width: number; gap: number | null },
): Outcome<LineFacts> {
  return attempt(() => {
    const { line } = lineOnLayer(
      stackup,
      index,
      shape.gap === null ? { width: shape.width } : { width: shape.width, gap: shape.gap },
    );
    const mode = line.single ?? line.pair?.odd;
    return {
      impedance: impedanceOf(line, shape.gap === null ? "single" : "differential"),
      delay: mode?.delay ?? 0,
      effectivePermittivity: mode?.effectivePermittivity ?? 0,
      title: FIELD_METHOD,
      inRange: true,
    };
  });
}

interface Search {
  stackup: Stackup;
  index: number;
  kind: LineKind;
  ohms: number;
  grid: number;
}

/** The width that meets the target; the gap of a pair stays. */
export function widthFor(search: Search, gap: number | null): Outcome<FoundDimension> {
  return found(search, { vary: "width", ...(gap === null ? {} : { gap }) });
}

/** The gap at which a pair of this width meets the target. */
export function gapFor(search: Search, width: number): Outcome<FoundDimension> {
  return found(search, { vary: "gap", width });
}

function found(
  { stackup, index, kind, ohms, grid }: Search,
  how: { vary: "width" | "gap"; width?: number; gap?: number },
): Outcome<FoundDimension> {
  return attempt(() => {
    const result = widthOnLayer({ stackup, index, target: { kind, ohms }, grid, ...SOUGHT, ...how });
    return { dimension: result.value, impedance: result.impedance, inRange: true, title: FIELD_METHOD };
  });
}

function attempt<T>(act: () => T): Outcome<T> {
  try {
    return { ok: true, value: act() };
  } catch (error) {
    if (!(error instanceof EngineError)) throw error;
    return {
      ok: false,
      reason: error.message,
      reachable: error instanceof UnreachableTargetError ? error.reachable : null,
    };
  }
}
