import type { NetClassDoc, TerminationDoc } from "@/lib/schemas/net-class";
import type { SelectOption } from "@/components/ui/select";
import { shownQuantity, typedQuantity } from "./field-words";

export const KIND_OPTIONS: SelectOption[] = [
  { value: "single", label: "Single-ended" },
  { value: "differential", label: "Differential pair" },
];

export const SIGNAL_OPTIONS: SelectOption[] = [
  { value: "data", label: "Data" },
  { value: "clock", label: "Clock" },
  { value: "strobe", label: "Strobe" },
  { value: "slow", label: "Slow control" },
];

export const SCHEME_OPTIONS: SelectOption[] = [
  { value: "none", label: "None" },
  { value: "series", label: "Series, at the driver" },
  { value: "parallel", label: "Parallel, to one voltage" },
  { value: "thevenin", label: "Thevenin, to both rails" },
  { value: "rc", label: "RC, to ground" },
  { value: "differential", label: "Across the pair" },
];

export const FIELD_LABELS: Record<Exclude<keyof TerminationDoc, "scheme">, string> = {
  resistance: "Resistor",
  resistanceLow: "Resistor to the lower rail",
  capacitance: "Capacitor",
  voltage: "To voltage",
};

/** Names of a class's parts, as a conflict lists them. */
export function terminationWords(termination: TerminationDoc): string {
  const { scheme } = termination;
  const r = typedQuantity(termination.resistance, "resistance") || "value open";
  switch (scheme) {
    case "none":
      return "none";
    case "series":
      return `series ${r}`;
    case "parallel":
      return `parallel ${r}${termination.voltage ? ` to ${typedQuantity(termination.voltage, "voltage")}` : ""}`;
    case "thevenin":
      return `Thevenin ${r} / ${typedQuantity(termination.resistanceLow, "resistance") || "open"}`;
    case "rc":
      return `RC ${r}, ${typedQuantity(termination.capacitance, "capacitance") || "capacitor open"}`;
    case "differential":
      return `across ${r}`;
  }
}

export interface SignalLayer {
  lineageId: string;
  name: string;
}

/** "L1 Top 0.28, L3 Inner 0.15": widths, and gaps of a pair, as numbers in the reader's unit. */
export function layerWords(netClass: NetClassDoc, layers: readonly SignalLayer[], unit: string): string {
  const digits = (text: string) => text.replace(/\s\S+$/, "");
  const parts = ordered(netClass, layers).map(({ entry, name }) => {
    const width = entry.width ? digits(shownQuantity(entry.width, "length", unit)) : "?";
    const gap =
      netClass.kind === "differential"
        ? `/${entry.gap ? digits(shownQuantity(entry.gap, "length", unit)) : "?"}`
        : "";
    return `${name} ${width}${gap}`;
  });
  return parts.join(", ");
}

/** The class's layers in the order of the stackup; those that left it come last. */
function ordered(netClass: NetClassDoc, layers: readonly SignalLayer[]) {
  const place = new Map(layers.map(({ lineageId, name }, index) => [lineageId, { index, name }]));
  return netClass.layers
    .map((entry) => ({
      entry,
      ...(place.get(entry.layerLineageId) ?? { index: 1e3, name: "layer that is gone" }),
    }))
    .sort((a, b) => a.index - b.index);
}

/** What one should know of a class as it stands; nothing of it keeps the class from being saved. */
export function classWarnings(doc: NetClassDoc, layers: readonly SignalLayer[]): string[] {
  const known = new Set(layers.map(({ lineageId }) => lineageId));
  const name = new Map(layers.map((layer) => [layer.lineageId, layer.name]));
  const here = doc.layers.filter(({ layerLineageId }) => known.has(layerLineageId));
  const list = (entries: typeof here) =>
    entries.map(({ layerLineageId }) => name.get(layerLineageId)).join(", ");
  const warnings: string[] = [];
  if (doc.layers.length === 0)
    warnings.push(
      "No layer is allowed yet: this class has no line in the width table and in the fabricator’s note. Its nets are still checked, at the widths they are routed with.",
    );
  if (here.length < doc.layers.length)
    warnings.push(
      "A layer of this class is no longer in the stackup. Untick it below, or put the layer back.",
    );
  const wide = here.filter(({ width }) => width === null);
  if (wide.length > 0)
    warnings.push(`No width yet on ${list(wide)}. The Impedance page finds it for the target.`);
  if (doc.kind === "differential") {
    const gapless = here.filter(({ gap }) => gap === null);
    if (gapless.length > 0) warnings.push(`No gap yet on ${list(gapless)}: the pair’s impedance needs it.`);
    if (doc.termination.scheme === "series" || doc.termination.scheme === "thevenin")
      warnings.push("This scheme ends single lines; a pair is usually ended across its two lines.");
  }
  if (!doc.targetImpedance)
    warnings.push("No target impedance: widths cannot be found for it, and impedance centring has no data.");
  return warnings;
}

export function counted(count: number, noun: string, plural = `${noun}s`): string {
  return `${count.toLocaleString("en")} ${count === 1 ? noun : plural}`;
}
