import { stackupLayer, type StackupLayerDoc } from "@/lib/schemas/stackup";
import type { LengthUnit } from "@/lib/client/preferences";
import { convert, Decimal, formatQuantity, parseQuantity, type Quantity } from "@/lib/si/units";

export type LengthField = "thickness" | "baseFoil" | "plating" | "etch" | "roughness" | "maskOverTrace";
export type NumberField = "tolerancePercent" | "coveragePercent" | "dk" | "df";
export type WordField = "name" | "material" | "planeNet" | "sourceNote";
export type LayerField = LengthField | NumberField | WordField | "dkFrequency";

const LENGTHS: ReadonlySet<string> = new Set<LengthField>([
  "thickness",
  "baseFoil",
  "plating",
  "etch",
  "roughness",
  "maskOverTrace",
]);
const WORDS: ReadonlySet<string> = new Set<WordField>(["name", "material", "planeNet", "sourceNote"]);

export const fieldNames: Record<LayerField, string> = {
  name: "name",
  material: "material",
  thickness: "thickness",
  tolerancePercent: "tolerance",
  dk: "Dk",
  df: "Df",
  dkFrequency: "frequency of Dk and Df",
  baseFoil: "base foil",
  plating: "plating",
  coveragePercent: "copper coverage",
  etch: "etch",
  roughness: "roughness",
  maskOverTrace: "mask over trace",
  planeNet: "net",
  sourceNote: "source note",
};

/**
 * The value that a typed text gives a field, checked by the shared schema.
 * @param unit  of a bare length
 * @throws Error with one sentence that says what is wrong and what to write
 */
export function readLayerField(field: LayerField, text: string, unit: string): Partial<StackupLayerDoc> {
  const value = valueOf(field, text, unit);
  const parsed = stackupLayer.shape[field].safeParse(value);
  if (!parsed.success)
    throw new Error(parsed.error.issues[0]?.message ?? "This is not a value for this field.");
  return { [field]: parsed.data };
}

/**
 * What the field holds while one types in it: what it shows, and without the sign of per cent. A length stays in the
 * unit that is shown, so that a number typed over it means what it seems to.
 */
export function typedText(layer: StackupLayerDoc, field: LayerField, unit: string): string {
  const value = layer[field];
  return typeof value === "string" ? value : shownText(layer, field, unit);
}

/** The unit of a bare number: the one that the field shows, the reader's where it is empty. */
export function bareUnit(layer: StackupLayerDoc, field: LayerField, unit: string): string {
  const value = layer[field];
  return value && typeof value !== "string" && isWeight(value.unit) ? value.unit : unit;
}

/** Copper by its weight on an area is shown as it was typed. */
const isWeight = (unit: string) => unit === "oz" || unit === "g/m²";

/** What the field shows otherwise: lengths in the reader's unit, foils by their weight. */
export function shownText(layer: StackupLayerDoc, field: LayerField, unit: string): string {
  const value = layer[field];
  if (value === null || value === undefined) return "";
  if (typeof value !== "string") return LENGTHS.has(field) ? shownLength(value, unit) : formatQuantity(value);
  return value !== "" && field.endsWith("Percent") ? `${value} %` : value;
}

export function shownLength(value: Quantity, unit: string): string {
  if (value.unit === unit || isWeight(value.unit)) return formatQuantity(value);
  const converted = convert(value, unit);
  const number = new Decimal(converted.value).toSignificantDigits(5).toString();
  return formatQuantity({ value: number, unit: converted.unit });
}

/** A thickness in a column: as many digits as its neighbours, and more only where it has them. */
export function columnLength(value: Quantity, unit: LengthUnit): { text: string; unit: string } {
  const [least, most] = unit === "mm" ? [3, 5] : [2, 3];
  const number = new Decimal(convert(value, unit).value).toDecimalPlaces(most);
  return { text: number.toFixed(Math.max(least, number.decimalPlaces())), unit };
}

function valueOf(field: LayerField, text: string, unit: string): unknown {
  const typed = text.trim();
  // No note is none, not an empty one.
  if (field === "sourceNote" && typed === "") return undefined;
  if (WORDS.has(field)) return typed;
  if (typed === "") return null;
  if (LENGTHS.has(field)) return parseQuantity(typed, "length", unit);
  if (field === "dkFrequency") return parseQuantity(typed, "frequency", "GHz");
  const number = typed.replace(/\s*%$/, "").replace(",", ".");
  if (!/^[+-]?(\d+(\.\d*)?|\.\d+)(e[+-]?\d{1,2})?$/i.test(number))
    throw new Error(
      `'${typed.slice(0, 40)}' is not a number. Write one such as ${EXAMPLES[field as NumberField]}.`,
    );
  return number;
}

const EXAMPLES: Record<NumberField, string> = {
  tolerancePercent: "10 %",
  coveragePercent: "40 %",
  dk: "4.2",
  df: "0.018",
};
