import { writeDelimited } from "@/lib/formats/delimited/write";
import { bindingDoc, type BindingDoc, pinRoles, type StoredModel } from "@/lib/schemas/model";
import { type PastedColumn, readPasted } from "./pasted-table";

export interface BindingRow {
  row: number;
  doc: BindingDoc | null;
  words: string;
  problems: string[];
}

type Key = "referencePattern" | "partNumberPattern" | "pinPattern" | "netPattern" | "role" | "model";

const COLUMNS: readonly PastedColumn<Key>[] = [
  { key: "referencePattern", header: "Reference", also: ["ref", "refdes", "designator"] },
  { key: "partNumberPattern", header: "Part number", also: ["part", "partno"] },
  { key: "pinPattern", header: "Pin", also: ["pins"] },
  { key: "netPattern", header: "Net", also: ["nets", "netname"] },
  { key: "role", header: "Role", also: [] },
  { key: "model", header: "Model", also: [] },
];

/** Bindings from pasted rows; an empty pattern is any. */
export function readBindingRows(text: string, models: readonly StoredModel[]): BindingRow[] {
  return readPasted(text, COLUMNS, "role").map(({ row, cells }) => {
    const problems: string[] = [];
    const role = pinRoles.find((entry) => entry === cells.role?.toLowerCase().trim());
    if (!role)
      problems.push(
        `Column Role: ${cells.role ? `'${cells.role.slice(0, 40)}'` : "it is empty and"} is not one of ${pinRoles.join(", ")}.`,
      );
    const wanted = cells.model && cells.model !== "-" && cells.model !== "–" ? cells.model : null;
    const model = wanted ? models.find(({ name }) => name.toLowerCase() === wanted.toLowerCase()) : undefined;
    if (wanted && !model)
      problems.push(
        `Column Model: there is no model named '${wanted.slice(0, 60)}'. Make it on the Models tab first.`,
      );
    const { model: _model, role: _role, ...patterns } = cells;
    const parsed = bindingDoc.safeParse({
      ...patterns,
      role: role ?? "passive",
      modelLineageId: model?.lineageId ?? null,
    });
    if (!parsed.success)
      problems.push(...parsed.error.issues.map(({ path, message }) => `${path.join(" ")}: ${message}`));
    return {
      row,
      problems,
      doc: parsed.success && problems.length === 0 ? parsed.data : null,
      words: COLUMNS.slice(0, 4)
        .map(({ key }) => cells[key] ?? "*")
        .join("  "),
    };
  });
}

/** The bindings as rows for a spreadsheet. */
export function writeBindingRows(bindings: readonly BindingDoc[], models: readonly StoredModel[]): string {
  const names = new Map(models.map(({ lineageId, name }) => [lineageId, name]));
  return writeDelimited(
    [
      COLUMNS.map(({ header }) => header),
      ...bindings.map((line) => [
        line.referencePattern,
        line.partNumberPattern,
        line.pinPattern,
        line.netPattern,
        line.role,
        line.modelLineageId ? (names.get(line.modelLineageId) ?? "") : "",
      ]),
    ],
    "\t",
  );
}
