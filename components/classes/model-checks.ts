import { type Dimension, toSi } from "@/lib/si/units";
import type { EditModel, ModelFieldKey, PartValues } from "./edit-model";
import { typedQuantity } from "./field-words";

export interface ModelCheck {
  /** "error": the model contradicts itself and is not saved; "warning": it may be so, but look again */
  kind: "error" | "warning";
  text: string;
}

/** What does not fit together in a model, of the numbers that are given. */
export function checkModel({ driver, receiver }: EditModel): ModelCheck[] {
  const found = [...(driver ? checkDriver(driver) : []), ...(receiver ? checkReceiver(receiver) : [])];
  if (driver && receiver && differ(driver, receiver, "vdd", "voltage"))
    found.push({
      kind: "warning",
      text: "The driver and the receiver of this model have different supplies.",
    });
  return found;
}

function checkDriver(values: PartValues): ModelCheck[] {
  const found: ModelCheck[] = [];
  const r = reader(values, "resistance");
  const t = reader(values, "time");
  const v = reader(values, "voltage");
  if (below(v("vdd"), 0, true)) found.push({ kind: "error", text: "The driver’s supply must be above 0 V." });
  for (const [more, less] of [
    ["slow", "typical"],
    ["typical", "fast"],
  ] as const) {
    const resistances = pair(values, `resistance.${more}`, `resistance.${less}`, "resistance");
    if (resistances && resistances.a < resistances.b)
      found.push({
        kind: "error",
        text: `Resistance ${more} (${resistances.aText}) is below ${less} (${resistances.bText}). Slow is the weak driver: its resistance is the highest.`,
      });
    const times = pair(values, `riseTime.${more}`, `riseTime.${less}`, "time");
    if (times && times.a < times.b)
      found.push({
        kind: "error",
        text: `Rise time ${more} (${times.aText}) is shorter than ${less} (${times.bText}). Slow is the long edge.`,
      });
  }
  const fast = r("resistance.fast");
  if (fast !== null && fast < 1)
    found.push({
      kind: "warning",
      text: "A driver of less than 1 Ω is hardly to be had: look at its data sheet again.",
    });
  const slow = r("resistance.slow");
  if (slow !== null && slow > 500)
    found.push({
      kind: "warning",
      text: "A driver of more than 500 Ω is unusual: look at its data sheet again.",
    });
  const edge = t("riseTime.typical");
  if (edge !== null && (edge < 20e-12 || edge > 100e-9))
    found.push({
      kind: "warning",
      text: "A typical rise time outside 20 ps to 100 ns is unusual: look at its unit.",
    });
  return found;
}

function checkReceiver(values: PartValues): ModelCheck[] {
  const found: ModelCheck[] = [];
  const v = reader(values, "voltage");
  if (below(v("vdd"), 0, true))
    found.push({ kind: "error", text: "The receiver’s supply must be above 0 V." });
  for (const [less, more, lessWord, moreWord] of [
    ["capacitance.min", "capacitance.typical", "least", "typical"],
    ["capacitance.typical", "capacitance.max", "typical", "most"],
  ] as const) {
    const both = pair(values, less, more, "capacitance");
    if (both && both.a > both.b)
      found.push({
        kind: "error",
        text: `Capacitance ${lessWord} (${both.aText}) is above ${moreWord} (${both.bText}). Change one of them.`,
      });
  }
  for (const [low, high, words] of [
    ["vil", "vih", ["VIL", "VIH"]],
    ["vilAc", "vihAc", ["VIL (ac)", "VIH (ac)"]],
  ] as const) {
    const both = pair(values, low, high, "voltage");
    if (both && both.a >= both.b)
      found.push({
        kind: "error",
        text: `${words[0]} (${both.aText}) must be below ${words[1]} (${both.bText}).`,
      });
  }
  const [vil, vih, vmeas, vdd] = [v("vil"), v("vih"), v("vmeas"), v("vdd")];
  if (vil === null || vih === null)
    found.push({
      kind: "warning",
      text: "Without VIL and VIH, ringback and level margin of this receiver are no data.",
    });
  if (vih !== null && vdd !== null && vih > vdd)
    found.push({ kind: "warning", text: "VIH is above the supply: no driver of this supply reaches it." });
  if (vil !== null && vil < 0) found.push({ kind: "warning", text: "VIL is below ground." });
  if (vmeas !== null && vil !== null && vih !== null && (vmeas < vil || vmeas > vih))
    found.push({ kind: "warning", text: "Vmeas lies outside VIL to VIH." });
  const [vilAc, vihAc] = [v("vilAc"), v("vihAc")];
  if ((vilAc !== null && vil !== null && vilAc > vil) || (vihAc !== null && vih !== null && vihAc < vih))
    found.push({ kind: "warning", text: "The ac thresholds are usually wider apart than the dc ones." });
  for (const key of ["maxAbove", "maxBelow"] as const) {
    const beyond = v(key);
    if (beyond !== null && beyond < 0)
      found.push({
        kind: "error",
        text: "An absolute maximum is written as how far beyond the rail the pin may go: 0.4 V, not −0.4 V.",
      });
  }
  return found;
}

function reader(values: PartValues, dimension: Dimension) {
  return (key: ModelFieldKey): number | null => {
    const value = values[key];
    return value ? toSi(value, dimension) : null;
  };
}

function pair(values: PartValues, a: ModelFieldKey, b: ModelFieldKey, dimension: Dimension) {
  const [left, right] = [values[a], values[b]];
  if (!left || !right) return null;
  return {
    a: toSi(left, dimension),
    b: toSi(right, dimension),
    aText: typedQuantity(left, dimension),
    bText: typedQuantity(right, dimension),
  };
}

function below(value: number | null, bound: number, orEqual: boolean): boolean {
  return value !== null && (value < bound || (orEqual && value === bound));
}

function differ(a: PartValues, b: PartValues, key: ModelFieldKey, dimension: Dimension): boolean {
  const [left, right] = [a[key], b[key]];
  return left !== undefined && right !== undefined && toSi(left, dimension) !== toSi(right, dimension);
}
