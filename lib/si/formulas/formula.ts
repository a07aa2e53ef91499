import { DomainError } from "../errors";

/** What the screen says about a published formula. */
export interface FormulaNote {
  /** Names the formula in results and reference data. */
  id: string;
  /** Author and year, as spoken. */
  title: string;
  /** The range its author states (or the trade's habit), in words. */
  range: string;
  source: string;
}

export interface SingleLineResult {
  /** Z0 [Ω] */
  impedance: number;
  /** [1]; absent where the formula gives none */
  effectivePermittivity?: number;
  /** false: the inputs lie outside the stated range; the number is then an extrapolation */
  inRange: boolean;
}

export interface CoupledLineResult {
  /** odd-mode impedance of one line [Ω]; the differential impedance is twice this */
  odd: number;
  /** even-mode impedance of one line [Ω]; the common-mode impedance is half this */
  even: number;
  effectivePermittivityOdd: number;
  effectivePermittivityEven: number;
  inRange: boolean;
}

/** No length on a board, in whatever unit, lies outside these; beyond them doubles under- and overflow. */
const SMALLEST = 1e-30;
const LARGEST = 1e30;
const LARGEST_PERMITTIVITY = 1e6;

/** Throws a DomainError naming the field unless value is a sane number > 0. */
export function requirePositive(value: number, field: string, spoken: string): void {
  if (!(value >= SMALLEST && value <= LARGEST)) {
    throw new DomainError(`The ${spoken} must be above zero; it is ${String(value)}.`, field);
  }
}

/** Throws a DomainError naming the field unless value is zero or a sane number > 0. */
export function requireNotNegative(value: number, field: string, spoken: string): void {
  if (value === 0) return;
  if (!(value >= SMALLEST && value <= LARGEST)) {
    throw new DomainError(`The ${spoken} must be zero or more; it is ${String(value)}.`, field);
  }
}

/** Throws a DomainError unless er is a sane number ≥ 1. */
export function requirePermittivity(er: number, field = "er"): void {
  if (!(er >= 1 && er <= LARGEST_PERMITTIVITY)) {
    throw new DomainError(`The relative permittivity must be at least 1 (air); it is ${String(er)}.`, field);
  }
}

/** A formula's answer that is no positive number means its inputs are beyond what it can describe. */
export function requireSensible(impedance: number, title: string): number {
  if (!(impedance > 0 && Number.isFinite(impedance))) {
    throw new DomainError(
      `${title} gives no impedance for this geometry: it is too far outside its range.`,
      "section",
    );
  }
  return impedance;
}
