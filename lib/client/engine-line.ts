import { EngineError, UnreachableTargetError } from "@/lib/si/errors";
import type { LineParameters, Mode } from "@/lib/si/cross-section";
import { impedanceOf } from "@/lib/si/line";
import {
  buildCrossSection,
  type LayerLine,
  lineOnLayer,
  type Stackup,
  type TraceShape,
  widthOnLayer,
} from "@/lib/si/stackup";
import { remembered } from "./engine-memo";
import { SOUGHT } from "./engine-sought";

export type LineKind = "single" | "differential";
type Accuracy = "live" | "standard" | "reference";

export interface LineShape {
  /** foot [m] */
  width: number;
  /** of a pair [m] */
  gap: number | null;
}

/** What the published formula in use says beside the field solution. */
export interface FormulaValue {
  /** [Ω] */
  ohms: number;
  title: string;
  range: string;
  inRange: boolean;
}

/** What a width, and the gap of a pair, gives on a layer. */
export interface LineFacts {
  /** by the field solution, of a pair differential [Ω] */
  impedance: number;
  /** the single line's, or the pair's odd mode's */
  mode: Mode;
  even: Mode | null;
  /** of a pair [Ω] */
  common: number | null;
  /** backward crosstalk coefficient of a pair */
  crosstalk: number | null;
  /** relative */
  errorEstimate: number;
  /** null where none fits */
  formula: FormulaValue | null;
}

export type Outcome<T> =
  { ok: true; value: T } | { ok: false; reason: string; reachable: { min: number; max: number } | null };

export interface FoundDimension {
  /** [m] */
  dimension: number;
  /** on the grid [Ω] */
  impedance: number;
  formula: FormulaValue | null;
}

/** Impedance, modes and delay of a trace or pair by the field solver, or why there is none. */
export function lineFacts(
  stackup: Stackup,
  index: number,
  shape: LineShape,
  accuracy: Accuracy = "standard",
): Outcome<LineFacts> {
  return attempt(() => {
    const { section } = buildCrossSection(stackup, index, traceShape(shape));
    return remembered(["line", section, accuracy], () =>
      factsOf(lineOnLayer(stackup, index, traceShape(shape), accuracy).line, kindOf(shape)),
    );
  });
}

export interface Search {
  stackup: Stackup;
  index: number;
  kind: LineKind;
  ohms: number;
  /** [m] */
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

export const kindOf = (shape: LineShape): LineKind => (shape.gap === null ? "single" : "differential");

export const traceShape = ({ width, gap }: LineShape): TraceShape =>
  gap === null ? { width } : { width, gap };

/** A cross-section stands for a layer where the width itself is what is sought [m]. */
const ANY = 0.2e-3;

function found(
  { stackup, index, kind, ohms, grid }: Search,
  how: { vary: "width" | "gap"; width?: number; gap?: number },
): Outcome<FoundDimension> {
  return attempt(() => {
    const stand = { width: how.width ?? ANY, gap: kind === "single" ? null : (how.gap ?? ANY) };
    const { section } = buildCrossSection(stackup, index, traceShape(stand));
    return remembered(["found", section, how.vary, kind, ohms, grid], () => {
      const result = widthOnLayer({ stackup, index, target: { kind, ohms }, grid, ...SOUGHT, ...how });
      return {
        dimension: result.value,
        impedance: result.impedance,
        formula: formulaOf(result.line, kind),
      };
    });
  });
}

function factsOf(line: LayerLine, kind: LineKind): LineFacts {
  const { pair } = line.field;
  return {
    impedance: impedanceOf(line, kind),
    mode: line.single ?? line.pair?.odd ?? firstMode(line.field),
    even: line.pair?.even ?? null,
    common: pair?.common ?? null,
    crosstalk: pair?.backwardCrosstalk ?? null,
    errorEstimate: line.field.errorEstimate,
    formula: formulaOf(line, kind),
  };
}

function firstMode(field: LineParameters): Mode {
  const mode = field.single ?? field.pair?.modes[0];
  if (!mode) throw new Error("A solved line has no mode.");
  return mode;
}

function formulaOf({ closedForm }: LayerLine, kind: LineKind): FormulaValue | null {
  if (!closedForm) return null;
  const { form, single, pair } = closedForm;
  const ohms = kind === "single" ? single?.impedance : pair?.differential;
  if (ohms === undefined) return null;
  return { ohms, title: form.title, range: form.range, inRange: form.inRange };
}

export function attempt<T>(act: () => T): Outcome<T> {
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
