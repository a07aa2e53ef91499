import { parseQuantity, toSi, type Dimension } from "@/lib/si/units";
import type { StoredNet, StoredPart } from "@/lib/schemas/net";
import { byName } from "./pin-names";

/** One end of a two-terminal part: the net and the pin's node on it. */
export interface PartEnd {
  net: StoredNet;
  node: string;
}

export interface TwoTerminal {
  reference: string;
  kind: "R" | "C" | "L";
  /** [Ω], [F] or [H]; null with `missing` */
  value: number | null;
  missing: { input: string; detail: string } | null;
  ends: [PartEnd] | [PartEnd, PartEnd];
}

const kinds: Partial<Record<StoredPart["kind"], "R" | "C" | "L">> = {
  resistor: "R",
  capacitor: "C",
  inductor: "L",
  ferrite: "L",
};
const dimensionOf: Record<"R" | "C" | "L", { dimension: Dimension; unit: string }> = {
  R: { dimension: "resistance", unit: "Ω" },
  C: { dimension: "capacitance", unit: "F" },
  L: { dimension: "inductance", unit: "H" },
};

export interface TwoTerminals {
  parts: TwoTerminal[];
  /** references whose pins are no pins of a component that drives or receives */
  references: Set<string>;
  /** resistor and capacitor arrays: nobody said which pins belong together */
  arrays: Set<string>;
}

/** Every two-terminal part that touches an imported net, by the parts list or else by its reference (R12, C3, L4, FB1). */
export function findTwoTerminals(nets: StoredNet[], parts: ReadonlyMap<string, StoredPart>): TwoTerminals {
  const ends = new Map<string, PartEnd[]>();
  for (const net of nets)
    for (const pin of net.topology.pins) {
      if (!kindOf(pin.reference, parts)) continue;
      const list = ends.get(pin.reference) ?? [];
      if (!list.some((end) => end.node === pin.node)) list.push({ net, node: pin.node });
      ends.set(pin.reference, list);
    }
  const found: TwoTerminals = { parts: [], references: new Set(), arrays: new Set() };
  for (const [reference, list] of [...ends].sort(([a], [b]) => byName(a, b))) {
    found.references.add(reference);
    const part = parts.get(reference);
    const [first, second, third] = list.sort((a, b) => byName(a.node, b.node));
    if (!first) continue;
    if (third || (part && part.pins.length > 2)) {
      found.arrays.add(reference);
      continue;
    }
    const kind = kindOf(reference, parts) ?? "R";
    found.parts.push({
      reference,
      kind,
      ...readValue(reference, kind, part),
      ends: second ? [first, second] : [first],
    });
  }
  return found;
}

function kindOf(reference: string, parts: ReadonlyMap<string, StoredPart>): "R" | "C" | "L" | null {
  const part = parts.get(reference);
  if (part) return kinds[part.kind] ?? null;
  const prefix = /^(R|C|L|FB)\d+[A-Z]?$/i.exec(reference)?.[1]?.toUpperCase();
  return prefix === "R" ? "R" : prefix === "C" ? "C" : prefix ? "L" : null;
}

function readValue(
  reference: string,
  kind: "R" | "C" | "L",
  part: StoredPart | undefined,
): Pick<TwoTerminal, "value" | "missing"> {
  const input = `value of ${reference}`;
  if (!part)
    return {
      value: null,
      missing: { input, detail: `${reference} is on the route but not in the parts list.` },
    };
  // A ferrite's impedance at one frequency is no inductance: "600R@100MHz" stays unread.
  const { dimension, unit } = dimensionOf[kind];
  const text = part.value.split(/[,;/@ ](?=\s*[±\d])/)[0]?.trim() ?? "";
  try {
    const value = toSi(parseQuantity(text, dimension, unit), dimension);
    const bare = kind !== "R" && /^[\d.,]+$/.test(text);
    if (value >= 0 && !bare && (kind === "R" || value > 0)) return { value, missing: null };
  } catch {
    // said below, with the part's name
  }
  const said = part.value
    ? `"${part.value}" of ${reference} is not a value in ${unit}.`
    : `${reference} has no value.`;
  return { value: null, missing: { input, detail: said } };
}
