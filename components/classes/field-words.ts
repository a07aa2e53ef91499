import type { ZodType } from "zod";
import {
  canonicalUnit,
  convert,
  Decimal,
  type Dimension,
  formatQuantity,
  parseQuantity,
  type Quantity,
} from "@/lib/si/units";

/**
 * The quantity that a typed text means, checked by the shared schema; null where it is left empty.
 * @param unit  of a bare number
 * @throws Error with one sentence that says what is wrong and what to write
 */
export function readQuantity(
  text: string,
  dimension: Dimension,
  unit: string,
  schema?: ZodType<Quantity | null>,
): Quantity | null {
  const value = text.trim() === "" ? null : parseQuantity(text, dimension, unit);
  if (value === null || !schema) return value;
  return checked(schema, value);
}

/** A number of per cent, with or without its sign; "" where it is left empty. */
export function readPercent(text: string, schema?: ZodType<string>): string {
  return readNumber(text.trim().replace(/\s*%$/, ""), "10 %", schema);
}

/** A decimal number as text; "" where it is left empty. */
export function readNumber(text: string, example: string, schema?: ZodType<string>): string {
  const typed = text.trim();
  if (typed === "") return "";
  const number = typed.replace(",", ".").replace("−", "-");
  if (!/^[+-]?(\d+(\.\d*)?|\.\d+)(e[+-]?\d{1,2})?$/i.test(number))
    throw new Error(`'${typed.slice(0, 40)}' is not a number. Write one such as ${example}.`);
  return schema ? checked(schema, number) : number;
}

/** @throws Error with the schema's own sentence */
export function checked<T>(schema: ZodType<T>, value: unknown): T {
  const parsed = schema.safeParse(value);
  if (!parsed.success)
    throw new Error(parsed.error.issues[0]?.message ?? "This is not a value for this field.");
  return parsed.data;
}

/** A value as it was typed, its unit in the usual spelling. */
export function typedQuantity(value: Quantity | null, dimension: Dimension): string {
  if (value === null) return "";
  return formatQuantity({ value: value.value, unit: usual(value.unit, dimension) });
}

/** A value as it is read: a length in the reader's unit to five digits, all else as it was typed. */
export function shownQuantity(value: Quantity | null, dimension: Dimension, lengthUnit: string): string {
  if (value === null) return "";
  if (dimension !== "length" || value.unit === lengthUnit) return typedQuantity(value, dimension);
  const converted = convert(value, lengthUnit);
  const number = new Decimal(converted.value).toSignificantDigits(5).toString();
  return formatQuantity({ value: number, unit: converted.unit });
}

function usual(unit: string, dimension: Dimension): string {
  try {
    return canonicalUnit(unit, dimension);
  } catch {
    return unit; // shown as it stands; the schema refuses it elsewhere
  }
}
