import { DomainError } from "../errors";
import { Decimal, decimalToText } from "./decimal";
import { findUnit, findUnitByName } from "./find-unit";
import type { Dimension, Quantity } from "./quantity";
import type { UnitDefinition } from "./unit-table";

/** Digits that a double carries without doubt; more would show its rounding (0.1 + 0.2). */
const DOUBLE_DIGITS = 15;

/**
 * The quantity in SI units, exact to 60 digits.
 * @throws DomainError where the value is no finite decimal number or the unit is not of that dimension
 */
export function toSiExact(quantity: Quantity, dimension: Dimension): Decimal {
  return decimalOf(quantity).times(unitOf(quantity.unit, dimension).factor);
}

/**
 * The quantity in SI units: the double nearest to the exact decimal value.
 * @throws DomainError where the value is no finite decimal number or the unit is not of that dimension
 */
export function toSi(quantity: Quantity, dimension: Dimension): number {
  return toSiExact(quantity, dimension).toNumber();
}

/**
 * A computed SI number as a quantity in `unit`.
 * @param value        in SI units, finite
 * @param unit         a unit's usual name ("mil", "mm", "Ω"); its dimension follows from it
 * @param significant  digits kept, 1 to 17; 15 unless told, at which toSi and fromSi are inverse to each other
 * @throws DomainError for NaN, infinities and unknown units
 */
export function fromSi(value: number, unit: string, significant: number = DOUBLE_DIGITS): Quantity {
  if (!Number.isFinite(value)) throw new DomainError(`A value in ${unit} must be a finite number.`, "value");
  const known = namedUnit(unit);
  const inUnit = new Decimal(value).div(known.factor).toSignificantDigits(significant);
  return { value: decimalToText(inUnit), unit: known.unit };
}

/**
 * The same quantity in another unit of its dimension; exact where the decimal terminates within 34 digits.
 * @throws DomainError for unknown units or units of different kinds
 */
export function convert(quantity: Quantity, unit: string): Quantity {
  const to = namedUnit(unit);
  const from = unitOf(quantity.unit, to.dimension);
  const value = decimalOf(quantity);
  if (from.unit === to.unit) return { value: decimalToText(value), unit: to.unit };
  return { value: decimalToText(value.times(from.factor).div(to.factor)), unit: to.unit };
}

/**
 * Exact sum of quantities of one kind, in `unit`: 35 + 100 + 35 µm is 0.17 mm, not 0.16999….
 * @throws DomainError for unknown units or units of different kinds
 */
export function addExact(quantities: readonly Quantity[], unit: string): Quantity {
  const to = namedUnit(unit);
  const sum = quantities.reduce((total, item) => total.plus(toSiExact(item, to.dimension)), new Decimal(0));
  return { value: decimalToText(sum.div(to.factor)), unit: to.unit };
}

export interface WeightedQuantity {
  quantity: Quantity;
  /** exact factors, such as a count of plies or 1 − coverage; decimal text or whole numbers */
  factors?: readonly (string | number)[];
  /** per cent of it that is left out: (1 − percent/100), exact */
  lessPercent?: string;
  subtract?: boolean;
}

/**
 * Exact weighted sum, in `unit`: Σ ± quantity × factors × (1 − lessPercent/100).
 * @throws DomainError for unknown units, units of different kinds and factors that are no decimal numbers
 */
export function addWeightedExact(terms: readonly WeightedQuantity[], unit: string): Quantity {
  const to = namedUnit(unit);
  let sum = new Decimal(0);
  for (const term of terms) {
    let value = toSiExact(term.quantity, to.dimension);
    for (const factor of term.factors ?? [])
      value = value.times(decimalOf({ value: String(factor), unit: "1" }));
    if (term.lessPercent !== undefined) {
      value = value.times(new Decimal(1).minus(decimalOf({ value: term.lessPercent, unit: "%" }).div(100)));
    }
    sum = term.subtract ? sum.minus(value) : sum.plus(value);
  }
  return { value: decimalToText(sum.div(to.factor)), unit: to.unit };
}

function decimalOf(quantity: Quantity): Decimal {
  let value: Decimal | null = null;
  try {
    value = new Decimal(quantity.value.trim());
  } catch {
    value = null; // decimal.js throws an untyped error: replaced by the sentence below
  }
  // decimal.js also reads 0x1f; a person's number is decimal.
  if (!value?.isFinite() || !/^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i.test(quantity.value.trim())) {
    throw new DomainError(
      `'${quantity.value}' is not a number. Write a decimal number such as 0.127.`,
      "value",
    );
  }
  return value;
}

function unitOf(unit: string, dimension: Dimension): UnitDefinition {
  const known = findUnit(unit, dimension);
  if (!known) throw new DomainError(`'${unit}' is not a unit of ${spoken(dimension)}.`, "unit");
  return known;
}

function namedUnit(unit: string): UnitDefinition {
  const known = findUnitByName(unit);
  if (!known) throw new DomainError(`'${unit}' is not a known unit.`, "unit");
  return known;
}

function spoken(dimension: Dimension): string {
  return dimension.replace(/[A-Z]/g, (letter) => ` ${letter.toLowerCase()}`);
}
