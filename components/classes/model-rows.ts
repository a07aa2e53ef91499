import { writeDelimited } from "@/lib/formats/delimited/write";
import { origins, type Origin } from "@/lib/schemas/common";
import type { ModelDoc, StoredModel } from "@/lib/schemas/model";
import {
  driverFields,
  type EditModel,
  editModelOf,
  type ModelField,
  modelDocOf,
  type PartValues,
  receiverFields,
} from "./edit-model";
import { checkModel } from "./model-checks";
import { readQuantity, typedQuantity } from "./field-words";
import { type PastedColumn, readPasted } from "./pasted-table";

export interface ModelRow {
  row: number;
  name: string;
  /** null where the row cannot be taken */
  doc: ModelDoc | null;
  /** The present model of that name, which the row changes. */
  replaces: StoredModel | null;
  problems: string[];
}

const SHORT: Record<string, string> = {
  "driver.vdd": "Driver supply",
  "driver.resistance.slow": "R slow",
  "driver.resistance.typical": "R typical",
  "driver.resistance.fast": "R fast",
  "driver.riseTime.slow": "Rise slow",
  "driver.riseTime.typical": "Rise typical",
  "driver.riseTime.fast": "Rise fast",
  "driver.capacitance": "C out",
  "receiver.vdd": "Receiver supply",
  "receiver.capacitance.min": "C min",
  "receiver.capacitance.typical": "C typical",
  "receiver.capacitance.max": "C max",
  "receiver.vil": "VIL",
  "receiver.vih": "VIH",
  "receiver.vilAc": "VIL ac",
  "receiver.vihAc": "VIH ac",
  "receiver.vmeas": "Vmeas",
  "receiver.maxAbove": "Max above",
  "receiver.maxBelow": "Max below",
};

const PARTS = [
  { part: "driver", fields: driverFields },
  { part: "receiver", fields: receiverFields },
] as const;

const COLUMNS: readonly PastedColumn<string>[] = [
  { key: "name", header: "Name", also: ["model"] },
  { key: "technology", header: "Technology", also: [] },
  ...PARTS.flatMap(({ part, fields }) =>
    fields.map(({ key }) => {
      const header = SHORT[`${part}.${key}`] ?? key;
      return {
        key: `${part}.${key}`,
        header,
        also: [
          header
            .toLowerCase()
            .replace("typical", "typ")
            .replace(/[^a-z0-9]/g, ""),
        ],
      };
    }),
  ),
  { key: "origin", header: "Origin", also: ["source"] },
  { key: "note", header: "Note", also: ["remark"] },
];

/** What pasted rows would make of the models; a bad cell is named by its row and column. */
export function readModelRows(text: string, present: readonly StoredModel[]): ModelRow[] {
  const seen = new Map<string, number>();
  return readPasted(text, COLUMNS, "name").map(({ row, cells }) => {
    const name = cells.name ?? "";
    const problems: string[] = [];
    const replaces = present.find((model) => model.name.toLowerCase() === name.toLowerCase()) ?? null;
    const before = seen.get(name.toLowerCase());
    if (name === "") problems.push("Column Name: it is empty. Give the model a name.");
    else if (before !== undefined) problems.push(`Column Name: '${name}' stands in row ${before} already.`);
    else seen.set(name.toLowerCase(), row);
    const edit: EditModel = {
      name,
      technology: cells.technology ?? replaces?.technology ?? "",
      origin: originOf(cells.origin, problems) ?? replaces?.origin ?? "assumed",
      note: cells.note ?? replaces?.note ?? "",
      driver: readPart("driver", driverFields, cells, problems),
      receiver: readPart("receiver", receiverFields, cells, problems),
    };
    const whole = modelDocOf(edit);
    if (problems.length === 0) {
      if ("lacks" in whole) problems.push(...whole.lacks);
      problems.push(...checkModel(edit).flatMap(({ kind, text }) => (kind === "error" ? [text] : [])));
    }
    return { row, name, replaces, problems, doc: problems.length === 0 && "doc" in whole ? whole.doc : null };
  });
}

/** The models as rows for a spreadsheet, in the order in which they are pasted back. */
export function writeModelRows(models: readonly StoredModel[]): string {
  const rows = models.map((model) => {
    const edit = editModelOf(model);
    return COLUMNS.map(({ key }) => {
      if (key === "name" || key === "technology" || key === "origin" || key === "note") return edit[key];
      for (const { part, fields } of PARTS)
        for (const field of fields)
          if (key === `${part}.${field.key}`)
            return typedQuantity(edit[part]?.[field.key] ?? null, field.dimension);
      return "";
    });
  });
  return writeDelimited([COLUMNS.map(({ header }) => header), ...rows], "\t");
}

function readPart(
  part: "driver" | "receiver",
  fields: readonly ModelField[],
  cells: Readonly<Partial<Record<string, string>>>,
  problems: string[],
): PartValues | null {
  const values: PartValues = {};
  for (const field of fields) {
    const address = `${part}.${field.key}`;
    const cell = cells[address];
    if (cell === undefined || cell === "-" || cell === "–") continue;
    try {
      const value = readQuantity(cell, field.dimension, field.unit, field.schema);
      if (value) values[field.key] = value;
    } catch (reason) {
      problems.push(`Column ${SHORT[address]}: ${reason instanceof Error ? reason.message : "not a value."}`);
    }
  }
  return Object.keys(values).length > 0 ? values : null;
}

function originOf(cell: string | undefined, problems: string[]): Origin | null {
  if (cell === undefined) return null;
  const found = origins.find((origin) => origin === cell.toLowerCase().trim());
  if (!found) problems.push(`Column Origin: '${cell}' is not one of ${origins.join(", ")}.`);
  return found ?? null;
}
