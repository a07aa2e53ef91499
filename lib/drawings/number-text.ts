/** Between a number and its unit: a thin space, so that they stay together and apart. */
export const THIN_SPACE = "\u2009";
/** A true minus, as wide as a plus. */
const MINUS = "\u2212";

export type BaseUnit = "V" | "s" | "m" | "F" | "H" | "Hz" | "A";
export type LengthUnit = "mm" | "mil";

/** A unit to write in, and how many base units one of it is. */
export interface ScaledUnit {
  unit: string;
  factor: number;
}

const PREFIXES: readonly (readonly [string, number])[] = [
  ["T", 1e12],
  ["G", 1e9],
  ["M", 1e6],
  ["k", 1e3],
  ["", 1],
  ["m", 1e-3],
  ["\u00b5", 1e-6],
  ["n", 1e-9],
  ["p", 1e-12],
  ["f", 1e-15],
];

/** The prefix in which the largest value of an axis is at least 1 and below 1,000. Zero is written without one. */
export function scaledUnit(largest: number, base: BaseUnit): ScaledUnit {
  const size = Math.abs(largest) * (1 + 1e-9);
  if (!Number.isFinite(size) || size === 0) return { unit: base, factor: 1 };
  const fit = PREFIXES.find(([, factor]) => size >= factor) ?? PREFIXES[PREFIXES.length - 1];
  return fit ? { unit: `${fit[0]}${base}`, factor: fit[1] } : { unit: base, factor: 1 };
}

/** A number with fixed decimals and a true minus; never "-0". */
export function numberText(value: number, decimals: number, signed = false): string {
  if (!Number.isFinite(value)) return "\u2013";
  const body = Math.abs(value).toFixed(decimals);
  const zero = Number(body) === 0;
  if (zero) return body;
  return value < 0 ? `${MINUS}${body}` : signed ? `+${body}` : body;
}

export function withUnit(number: string, unit: string): string {
  return `${number}${THIN_SPACE}${unit}`;
}

/**
 * A value in its best prefix with about three significant digits: "1.24 ns", "\u2212320 mV". With `like`, the largest
 * of its kind, all of them have that one's prefix and as many decimals, so that a running value does not jump.
 */
export function quantityText(
  value: number,
  base: BaseUnit,
  options: { signed?: boolean; like?: number } = {},
): string {
  const scaled = scaledUnit(options.like ?? value, base);
  const n = value / scaled.factor;
  const decimals =
    options.like === undefined ? decimalsFor(n) : Math.abs(options.like / scaled.factor) < 99.95 ? 2 : 1;
  return withUnit(numberText(n, decimals, options.signed), scaled.unit);
}

/** Volts: millivolts below one volt. */
export function voltsText(volts: number, signed = false): string {
  return Math.abs(volts) < 0.9995
    ? withUnit(numberText(volts * 1000, 0, signed), "mV")
    : withUnit(numberText(volts, 2, signed), "V");
}

export function ohmsText(ohms: number | null | undefined): string {
  if (ohms === null || ohms === undefined || !Number.isFinite(ohms)) return "no data";
  const [n, unit] = ohms >= 1e4 ? [ohms / 1000, "k\u03a9"] : [ohms, "\u03a9"];
  return withUnit(String(Number(n.toFixed(n >= 99.95 ? 0 : 1))), unit);
}

/** A length in the reader's unit: 0.001 mm or 0.01 mil. */
export function lengthText(metres: number | null | undefined, unit: LengthUnit): string {
  if (metres === null || metres === undefined || !Number.isFinite(metres)) return "no data";
  return withUnit(lengthNumber(metres, unit), unit);
}

/** Millimetres to the micrometre, or to its tenth where it has one (half-ounce copper is 17.5 \u00b5m); mils to 0.01. */
export function lengthNumber(metres: number, unit: LengthUnit): string {
  if (unit === "mil") return numberText(metres / 25.4e-6, 2);
  const tenths = Math.round(metres * 1e7);
  return numberText(metres * 1e3, tenths % 10 === 0 ? 3 : 4);
}

function decimalsFor(n: number): number {
  const size = Math.abs(n);
  if (size === 0) return 0;
  return size >= 99.95 ? 0 : size >= 9.995 ? 1 : 2;
}
