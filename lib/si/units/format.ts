import { Decimal } from "./decimal";
import { DomainError } from "../errors";
import { findUnit } from "./find-unit";
import type { Dimension, Quantity } from "./quantity";

/** What stands where there is no number. */
export const NO_VALUE = "–";

export interface FormatOptions {
  /** Fixed unit; else one is chosen by size. */
  unit?: string;
  /** Significant digits, 4 unless told. */
  digits?: number;
  /** Digits after the point instead: columns then align. */
  decimals?: number;
  /** "always" writes + before positive numbers (margins). */
  sign?: "auto" | "always";
}

/** Units that may be chosen by size, rising. */
const ladders: Record<Dimension, readonly string[]> = {
  length: ["µm", "mm", "m"],
  time: ["fs", "ps", "ns", "µs", "ms", "s"],
  resistance: ["mΩ", "Ω", "kΩ", "MΩ"],
  capacitance: ["fF", "pF", "nF", "µF", "mF", "F"],
  inductance: ["pH", "nH", "µH", "mH", "H"],
  voltage: ["µV", "mV", "V", "kV"],
  current: ["nA", "µA", "mA", "A"],
  frequency: ["Hz", "kHz", "MHz", "GHz", "THz"],
  bitRate: ["b/s", "kb/s", "Mb/s", "Gb/s"],
  ratio: ["%"],
  power: ["mW", "W"],
  delayPerLength: ["ps/mm"],
  slewRate: ["V/ns"],
  voltageTime: ["V·ns"],
};

/** Where a ladder changes before 1 of the next unit is reached: 0.1 mm rather than 100 µm. */
const changeAt: Partial<Record<Dimension, Record<string, string>>> = { length: { mm: "0.1" } };

/** A typed quantity as text: "12.7 mm", "10 %", "4.3" (a plain ratio has no unit). */
export function formatQuantity(quantity: Quantity): string {
  const value = quantity.value.replace(/^-/, "−");
  return quantity.unit === "1" ? value : `${value} ${quantity.unit}`;
}

/**
 * An SI number as text with a unit of sensible size; "–" for null, undefined, NaN and infinities.
 * @throws DomainError where options.unit is not of that dimension
 */
export function formatSi(
  value: number | null | undefined,
  dimension: Dimension,
  options: FormatOptions = {},
): string {
  const { text, unit } = formatSiParts(value, dimension, options);
  return text === NO_VALUE || unit === "" ? text : `${text} ${unit}`;
}

/** As formatSi, number and unit apart, for tables that align on the point. */
export function formatSiParts(
  value: number | null | undefined,
  dimension: Dimension,
  options: FormatOptions = {},
): { text: string; unit: string } {
  const fixed = options.unit === undefined ? undefined : unitNamed(options.unit, dimension);
  if (value === null || value === undefined || !Number.isFinite(value)) {
    return { text: NO_VALUE, unit: fixed?.shown ?? "" };
  }
  const exact = new Decimal(value);
  if (fixed) return { text: digitsOf(exact.div(fixed.factor), options), unit: fixed.shown };

  const ladder = ladders[dimension].map((name) => unitNamed(name, dimension));
  for (let step = ladder.length - 1; step >= 0; step--) {
    const unit = ladder[step];
    if (!unit) continue;
    const rounded = round(exact.div(unit.factor), options);
    const least = changeAt[dimension]?.[unit.name] ?? "1";
    if (step === 0 || rounded.abs().gte(least)) return { text: digitsOf(rounded, options), unit: unit.shown };
    if (exact.isZero() && unit.factor.lte(baseFactor(dimension))) {
      return { text: digitsOf(exact, options), unit: unit.shown };
    }
  }
  return { text: NO_VALUE, unit: "" };
}

/** Zero is shown in the unit that the dimension is usually spoken in. */
function baseFactor(dimension: Dimension): Decimal {
  const usual: Partial<Record<Dimension, string>> = {
    length: "1e-3",
    time: "1e-9",
    capacitance: "1e-12",
    inductance: "1e-9",
    frequency: "1e6",
    bitRate: "1e6",
  };
  return new Decimal(usual[dimension] ?? "1");
}

function unitNamed(name: string, dimension: Dimension): { name: string; shown: string; factor: Decimal } {
  const unit = findUnit(name, dimension);
  if (!unit) throw new DomainError(`'${name}' is not a unit of ${dimension}.`, "unit");
  return { name: unit.unit, shown: unit.unit === "1" ? "" : unit.unit, factor: unit.factor };
}

function round(value: Decimal, options: FormatOptions): Decimal {
  return options.decimals === undefined
    ? value.toSignificantDigits(options.digits ?? 4, Decimal.ROUND_HALF_UP)
    : value.toDecimalPlaces(options.decimals, Decimal.ROUND_HALF_UP);
}

function digitsOf(value: Decimal, options: FormatOptions): string {
  const rounded = round(value, options);
  const places =
    options.decimals ?? (rounded.isZero() ? 0 : Math.max(0, (options.digits ?? 4) - 1 - rounded.e));
  const text = rounded.abs().toFixed(places);
  if (rounded.isZero()) return text;
  if (rounded.isNegative()) return `−${text}`;
  return options.sign === "always" ? `+${text}` : text;
}
