import { DomainError } from "@/lib/si/errors";
import { parsePrintedValue, toSi, type PartDimension } from "@/lib/si/units";
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
const dimensionOf: Record<"R" | "C" | "L", PartDimension> = {
  R: "resistance",
  C: "capacitance",
  L: "inductance",
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
  if (part.value === "")
    return {
      value: null,
      missing: { input, detail: `${reference} has no value. Give it in the parts list.` },
    };
  // A ferrite's impedance at one frequency is no inductance: "600R@100MHz" stays unread.
  const dimension = dimensionOf[kind];
  try {
    return { value: toSi(parsePrintedValue(part.value, dimension), dimension), missing: null };
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    return { value: null, missing: { input, detail: `${reference}: ${error.message}` } };
  }
}
