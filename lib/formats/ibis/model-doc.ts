import { modelDoc, type ModelDoc } from "@/lib/schemas/model";
import type { Quantity } from "@/lib/si/units";
import { DomainError } from "@/lib/si/errors";
import { byProcess, dieCapacitance } from "./corners";
import { modelTypes, type IbisModel } from "./document";
import { ibisLimits } from "./limits";
import { linearDriver } from "./linear-driver";

/**
 * A model of the project from one of a file: the plain driver nearest to its tables and its receiver with every limit
 * the file states. Values are rounded to four digits.
 *
 * @throws DomainError where it neither drives nor receives, or something it needs is missing
 */
export function modelDocOf(model: IbisModel, technology = ""): ModelDoc {
  const { drives, receives } = modelTypes[model.type];
  const parsed = modelDoc.safeParse({
    name: model.name,
    technology,
    driver: drives ? driverOf(model) : null,
    receiver: receives ? receiverOf(model) : null,
    origin: "model",
    note: `IBIS, ${model.type}${model.submodels.length > 0 ? "; its submodels are not simulated" : ""}.`,
  });
  if (parsed.success) return parsed.data;
  const [issue] = parsed.error.issues;
  throw new DomainError(
    `Model ${model.name} does not make a model here: ${issue?.message ?? "a value is out of range."}`,
    issue?.path.join(".") ?? null,
  );
}

function driverOf(model: IbisModel) {
  const [slow, typical, fast] = (["slow", "typical", "fast"] as const).map((corner) =>
    linearDriver(model, corner),
  );
  if (!slow || !typical || !fast) return null;
  return {
    vdd: volts(typical.supply),
    resistance: {
      slow: ohms(slow.resistance),
      typical: ohms(typical.resistance),
      fast: ohms(fast.resistance),
    },
    riseTime: {
      slow: seconds(slow.riseTime),
      typical: seconds(typical.riseTime),
      fast: seconds(fast.riseTime),
    },
    capacitance: farads(dieCapacitance(model, "typical")),
  };
}

function receiverOf(model: IbisModel) {
  const supply =
    byProcess(model.voltageRange, "typical") ?? byProcess(model.references.powerClamp, "typical");
  if (supply === null)
    throw new DomainError(
      `Model ${model.name} has no voltage range, so its supply is not known. Add [Voltage Range] to the file.`,
      "voltageRange",
    );
  const limits = ibisLimits(model);
  const optional = (value: number | null) => (value === null ? null : volts(value));
  const capacitance = (corner: "slow" | "typical" | "fast") => farads(dieCapacitance(model, corner) ?? 0);
  return {
    vdd: volts(supply),
    capacitance: { min: capacitance("fast"), typical: capacitance("typical"), max: capacitance("slow") },
    vil: optional(limits.vil),
    vih: optional(limits.vih),
    vilAc: optional(limits.vilAc),
    vihAc: optional(limits.vihAc),
    vmeas: optional(limits.vmeas),
    // The file states absolute volts, the project what lies beyond the rails.
    maxAbove: optional(beyond(limits.staticHigh === null ? null : limits.staticHigh - supply)),
    maxBelow: optional(beyond(limits.staticLow === null ? null : -limits.staticLow)),
  };
}

/** A limit within the rails says nothing about what lies beyond them. */
function beyond(value: number | null): number | null {
  return value !== null && value >= 0 ? value : null;
}

const volts = (value: number): Quantity => ({ value: digits(value), unit: "V" });
const ohms = (value: number): Quantity => ({ value: digits(value), unit: "Ω" });
const seconds = (value: number): Quantity => ({ value: digits(value * 1e12), unit: "ps" });
function farads(value: number): Quantity;
function farads(value: number | null): Quantity | null;
function farads(value: number | null): Quantity | null {
  return value === null ? null : { value: digits(value * 1e12), unit: "pF" };
}

function digits(value: number): string {
  return String(Number(value.toPrecision(4)));
}
