import { driverPart, modelDoc, receiverPart, type ModelDoc, type StoredModel } from "@/lib/schemas/model";
import type { ZodType } from "zod";
import type { Dimension, Quantity } from "@/lib/si/units";

export type ModelFieldKey =
  | "vdd"
  | "resistance.slow"
  | "resistance.typical"
  | "resistance.fast"
  | "riseTime.slow"
  | "riseTime.typical"
  | "riseTime.fast"
  | "capacitance"
  | "capacitance.min"
  | "capacitance.typical"
  | "capacitance.max"
  | "vil"
  | "vih"
  | "vilAc"
  | "vihAc"
  | "vmeas"
  | "maxAbove"
  | "maxBelow";

/** One number of a model: its name in sentences, what it must be, and whether a part must have it. */
export interface ModelField {
  key: ModelFieldKey;
  label: string;
  dimension: Dimension;
  unit: string;
  needed: boolean;
  schema: ZodType<Quantity | null>;
}

const field = (
  key: ModelFieldKey,
  label: string,
  dimension: Dimension,
  unit: string,
  schema: ZodType<Quantity | null>,
  needed = false,
): ModelField => ({ key, label, dimension, unit, needed, schema });

const drives = driverPart.shape;
const receives = receiverPart.shape;

export const driverFields: readonly ModelField[] = [
  field("vdd", "Supply", "voltage", "V", drives.vdd, true),
  field("resistance.slow", "Resistance, slow", "resistance", "Ω", drives.resistance.shape.slow, true),
  field(
    "resistance.typical",
    "Resistance, typical",
    "resistance",
    "Ω",
    drives.resistance.shape.typical,
    true,
  ),
  field("resistance.fast", "Resistance, fast", "resistance", "Ω", drives.resistance.shape.fast, true),
  field("riseTime.slow", "Rise time, slow", "time", "ns", drives.riseTime.shape.slow, true),
  field("riseTime.typical", "Rise time, typical", "time", "ns", drives.riseTime.shape.typical, true),
  field("riseTime.fast", "Rise time, fast", "time", "ns", drives.riseTime.shape.fast, true),
  field("capacitance", "Output capacitance", "capacitance", "pF", drives.capacitance),
];

export const receiverFields: readonly ModelField[] = [
  field("vdd", "Supply", "voltage", "V", receives.vdd, true),
  field("capacitance.min", "Capacitance, least", "capacitance", "pF", receives.capacitance.shape.min, true),
  field(
    "capacitance.typical",
    "Capacitance, typical",
    "capacitance",
    "pF",
    receives.capacitance.shape.typical,
    true,
  ),
  field("capacitance.max", "Capacitance, most", "capacitance", "pF", receives.capacitance.shape.max, true),
  field("vil", "VIL", "voltage", "V", receives.vil),
  field("vih", "VIH", "voltage", "V", receives.vih),
  field("vilAc", "VIL at the edge (ac)", "voltage", "V", receives.vilAc),
  field("vihAc", "VIH at the edge (ac)", "voltage", "V", receives.vihAc),
  field("vmeas", "Vmeas", "voltage", "V", receives.vmeas),
  field("maxAbove", "Absolute maximum above the supply", "voltage", "V", receives.maxAbove),
  field("maxBelow", "Absolute maximum below ground", "voltage", "V", receives.maxBelow),
];

/** The numbers of one part of a model by their key; what is not given yet is absent. */
export type PartValues = Partial<Record<ModelFieldKey, Quantity>>;

/** A model under edit: its parts may lack numbers until they are filled. */
export interface EditModel extends Omit<ModelDoc, "driver" | "receiver"> {
  driver: PartValues | null;
  receiver: PartValues | null;
}

export function editModelOf(model: StoredModel): EditModel {
  const { name, technology, origin, note, driver, receiver } = model;
  return {
    name,
    technology,
    origin,
    note,
    driver: driver && readPart(driver, driverFields),
    receiver: receiver && readPart(receiver, receiverFields),
  };
}

/** The model as it is stored, or the sentences that say what it lacks. */
export function modelDocOf(edit: EditModel): { doc: ModelDoc } | { lacks: string[] } {
  const lacks = [
    ...lacksOf("driver", edit.driver, driverFields),
    ...lacksOf("receiver", edit.receiver, receiverFields),
  ];
  if (edit.driver === null && edit.receiver === null)
    lacks.push("A model drives, receives, or both: fill one part.");
  if (lacks.length > 0) return { lacks };
  const parsed = modelDoc.safeParse({
    ...edit,
    driver: edit.driver && writePart(edit.driver, driverFields),
    receiver: edit.receiver && writePart(edit.receiver, receiverFields),
  });
  return parsed.success ? { doc: parsed.data } : { lacks: parsed.error.issues.map(({ message }) => message) };
}

function lacksOf(part: string, values: PartValues | null, fields: readonly ModelField[]): string[] {
  if (!values) return [];
  return fields
    .filter(({ key, needed }) => needed && !values[key])
    .map(({ label }) => `The ${part} needs its ${label.charAt(0).toLowerCase()}${label.slice(1)}.`);
}

function readPart(part: object, fields: readonly ModelField[]): PartValues {
  const values: PartValues = {};
  for (const { key } of fields) {
    const [outer = "", inner] = key.split(".");
    const found = (part as Record<string, unknown>)[outer];
    const value = inner === undefined ? found : (found as Record<string, unknown> | null)?.[inner];
    if (isQuantity(value)) values[key] = value;
  }
  return values;
}

function writePart(values: PartValues, fields: readonly ModelField[]): Record<string, unknown> {
  const part: Record<string, unknown> = {};
  for (const { key } of fields) {
    const [outer = "", inner] = key.split(".");
    const value = values[key] ?? null;
    if (inner === undefined) part[outer] = value;
    else part[outer] = { ...(part[outer] as object | undefined), [inner]: value };
  }
  return part;
}

function isQuantity(value: unknown): value is Quantity {
  return typeof value === "object" && value !== null && "value" in value && "unit" in value;
}
