import type { PartDoc } from "@/lib/schemas/net";
import { DomainError } from "@/lib/si/errors";
import { parsePrintedValue, type PartDimension } from "@/lib/si/units";
import type { ListFormat } from "./list-field";

type PartKind = PartDoc["kind"];

const MAX_PINS = 3000;
const DIMENSIONS: Partial<Record<PartKind, PartDimension>> = {
  resistor: "resistance",
  capacitor: "capacitance",
  inductor: "inductance",
};

/** One row a part. */
export const partsList: ListFormat<PartDoc> = {
  kind: "parts list",
  fields: [
    {
      id: "reference",
      label: "Reference",
      required: true,
      kind: "text",
      headers: [
        "reference",
        "ref",
        "refdes",
        "ref des",
        "designator",
        "reference designator",
        "part",
        "component",
      ],
    },
    {
      id: "partNumber",
      label: "Part number",
      required: false,
      kind: "text",
      headers: [
        "part number",
        "partnumber",
        "part no",
        "pn",
        "p n",
        "mpn",
        "device",
        "manufacturer part number",
        "part name",
        "type",
      ],
    },
    {
      id: "value",
      label: "Value",
      required: false,
      kind: "text",
      headers: ["value", "val", "comment", "rating"],
    },
    {
      id: "pins",
      label: "Pins",
      required: false,
      kind: "pins",
      headers: ["pins", "pin count", "pincount", "number of pins", "pin names", "pin"],
    },
  ],
  read(cells) {
    const reference = cells.text("reference", 40);
    if (/[\s.]/u.test(reference))
      cells.refuse(
        "reference",
        `'${reference}' holds a space or a point. Write one reference in each row, such as R12.`,
      );
    const kind = partKindOf(reference);
    const named = cells.words("pins", MAX_PINS);
    const wide = named.find((pin) => pin.length > 40);
    if (wide) cells.refuse("pins", `'${wide}' is too long for a pin's name.`);
    return {
      reference,
      partNumber: cells.text("partNumber", 80),
      value: cells.text("value", 40),
      kind,
      pins: expandCount(named, kind, (reason) => cells.refuse("pins", reason)),
    };
  },
  key: (row) => row.reference.toUpperCase(),
  unique: "reference",
};

/** Kind by the letters of the reference (common practice). */
export function partKindOf(reference: string): PartKind {
  const letters = /^\p{L}*/u.exec(reference)?.[0].toUpperCase() ?? "";
  if (/^(R|RN|RP|RA|RES)$/.test(letters)) return "resistor";
  if (/^(C|CN|CA|CAP)$/.test(letters) && letters !== "CN") return "capacitor";
  if (/^(FB|FER|BEAD)$/.test(letters)) return "ferrite";
  if (/^(L|IND)$/.test(letters)) return "inductor";
  if (/^(U|IC)$/.test(letters)) return "ic";
  if (/^(J|P|CN|CON|CONN|X|XP|XS)$/.test(letters)) return "connector";
  return "other";
}

/** What is strange about a part whose value cannot be read; null when nothing is. */
export function valueWarning(part: PartDoc): string | null {
  const wanted = DIMENSIONS[part.kind];
  if (!wanted || part.value === "" || /^(dn[pim]|nc|nf|do not (fit|place|populate))$/i.test(part.value))
    return null;
  try {
    parsePrintedValue(part.value, wanted);
    return null;
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    return `${error.message} Paths through ${part.reference} have no data until its value is known.`;
  }
}

/** A lone name that is no count: two ends need two. Null where nothing is strange. */
export function pinsWarning(part: PartDoc): string | null {
  const [only] = part.pins;
  if (!DIMENSIONS[part.kind] || part.pins.length !== 1 || only === undefined || only === "1") return null;
  return `'${only}' is neither a count nor the pins of ${part.reference}. Write 2, or the names of both pins, such as 1 2.`;
}

/** A lone count stands for pins 1…n where pins are counted through; a large package names its own. */
function expandCount(named: string[], kind: PartKind, refuse: (reason: string) => void): string[] {
  const [only] = named;
  if (named.length !== 1 || only === undefined || !/^\d+$/.test(only)) return named;
  const count = Number(only);
  if (count > MAX_PINS) {
    refuse(`'${only}' pins are more than any part has; at most ${MAX_PINS} are kept.`);
    return [];
  }
  return kind === "ic" || kind === "other"
    ? []
    : Array.from({ length: count }, (_, index) => String(index + 1));
}
