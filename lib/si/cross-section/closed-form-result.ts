import { LIGHT_SPEED } from "../physical-constants";
import type { CoupledLineResult, FormulaNote, SingleLineResult } from "../formulas";
import type { Structure } from "./classify";
import type { Mode } from "./types";

/** One published formula's answer for a cross-section. */
export interface ClosedFormResult {
  /** The formula; names are those of the reference data's `structure`. */
  id: string;
  /** Where one id has several forms in circulation. */
  variant: string | null;
  title: string;
  /** [Ω]; single for one trace, the others for a pair */
  impedance: { single?: number; odd?: number; even?: number; differential?: number; common?: number };
  /** [1]; single line, or odd and even; absent where the formula gives none */
  effectivePermittivity: { single?: number; odd?: number; even?: number };
  /** false: beyond the stated range, or the copper is thicker than the formula knows */
  inRange: boolean;
  /** the stated range in words */
  range: string;
  source: string;
  /** what of the section the formula does not see ("solder mask", "sloped sides as their mean width") */
  ignores: string[];
}

/** A formula bound to a structure; evaluating it may throw DomainError. */
export type Candidate = () => ClosedFormResult | ClosedFormResult[];

export function singleResult(
  note: FormulaNote,
  structure: Structure,
  result: SingleLineResult,
  options: { variant?: string; knowsThickness?: boolean; ignores?: string[] } = {},
): ClosedFormResult {
  const { impedance, effectivePermittivity } = result;
  return {
    ...frame(note, structure, result.inRange, options),
    impedance: { single: impedance },
    effectivePermittivity: effectivePermittivity === undefined ? {} : { single: effectivePermittivity },
  };
}

export function coupledResult(
  note: FormulaNote,
  structure: Structure,
  result: CoupledLineResult,
  options: { variant?: string; knowsThickness?: boolean; ignores?: string[] } = {},
): ClosedFormResult {
  return {
    ...frame(note, structure, result.inRange, options),
    impedance: { odd: result.odd, even: result.even, differential: 2 * result.odd, common: result.even / 2 },
    effectivePermittivity: { odd: result.effectivePermittivityOdd, even: result.effectivePermittivityEven },
  };
}

/** A formula that gives the differential impedance alone. */
export function differentialResult(
  note: FormulaNote,
  structure: Structure,
  differential: number,
  inRange: boolean,
): ClosedFormResult {
  return {
    ...frame(note, structure, inRange, {}),
    impedance: { odd: differential / 2, differential },
    effectivePermittivity: {},
  };
}

/** Impedance with the delay that its permittivity gives, √εeff / c [s/m]. */
export function modeOf(impedance: number, effectivePermittivity: number): Mode {
  return { impedance, effectivePermittivity, delay: Math.sqrt(effectivePermittivity) / LIGHT_SPEED };
}

function frame(
  note: FormulaNote,
  structure: Structure,
  inRange: boolean,
  options: { variant?: string; knowsThickness?: boolean; ignores?: string[] },
): Omit<ClosedFormResult, "impedance" | "effectivePermittivity"> {
  const blindToThickness = options.knowsThickness === false && structure.thickness > 0;
  const ignores = [...(options.ignores ?? [])];
  if (blindToThickness) ignores.push("copper thickness");
  if (structure.masked) ignores.push("solder mask");
  if (structure.simplified.slopedSides) ignores.push("sloped sides (mean width taken)");
  if (structure.simplified.mergedLayers) ignores.push("layers of different Dk (merged in series)");
  return {
    id: note.id,
    variant: options.variant ?? null,
    title: note.title,
    inRange: inRange && !blindToThickness,
    range: note.range,
    source: note.source,
    ignores,
  };
}
