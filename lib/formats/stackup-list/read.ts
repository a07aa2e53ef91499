import { origins } from "@/lib/schemas/common";
import { layerKinds, stackupDoc, type LayerKind, type StackupDoc } from "@/lib/schemas/stackup";
import { DomainError } from "@/lib/si/errors";
import { parseQuantity, type Dimension, type Quantity } from "@/lib/si/units";
import { readHeader } from "../delimited/header-unit";
import { readTable, type TableRow } from "../delimited/table";
import type { RowProblem } from "../lists/list-field";
import { kindWords, stackupColumns, type StackupColumn } from "./columns";
import { readPlies } from "./plies";

export interface StackupListReading {
  /** Null where a row is wrong: half a stackup is none. */
  doc: StackupDoc | null;
  problems: RowProblem[];
  rows: number;
}

type Columns = Map<StackupColumn, { column: number; unit: string | null }>;

/**
 * Reads a stackup from delimited text (see decodeText): one row a layer, top to bottom, with a header row. Bare
 * numbers are in the header's unit, else in `defaultUnit`.
 *
 * @throws DelimitedError where the text is no table
 */
export function readStackupList(text: string, name: string, defaultUnit: string): StackupListReading {
  const table = readTable(text);
  const [header, ...rows] = table.rows;
  const columns: Columns = header ? findColumns(header) : new Map<never, never>();
  if (!header || !columns.has("kind") || !columns.has("name"))
    return {
      doc: null,
      rows: table.rows.length,
      problems: [
        {
          row: header?.row ?? 1,
          column: "header",
          value: header?.cells.join(", ").slice(0, 60) ?? "",
          reason:
            "names no columns kind and name. Begin with a header row; the export of a stackup shows how.",
        },
      ],
    };
  const problems: RowProblem[] = [];
  const layers = rows.map((row) => readLayer(new LayerRow(row, columns, defaultUnit, problems)));
  if (problems.length > 0) return { doc: null, problems, rows: rows.length };
  const parsed = stackupDoc.safeParse({ name, layers });
  if (parsed.success) return { doc: parsed.data, problems, rows: rows.length };
  for (const issue of parsed.error.issues) {
    const [, index, field] = issue.path;
    const row = typeof index === "number" ? rows[index] : undefined;
    problems.push({
      row: row?.row ?? header.row,
      column: labelOf(String(field ?? "name")),
      value: "",
      reason: issue.message,
    });
  }
  return { doc: null, problems, rows: rows.length };
}

function findColumns(header: TableRow): Columns {
  const columns: Columns = new Map();
  for (const { id, headers } of stackupColumns)
    header.cells.forEach((cell, column) => {
      const { name, unit } = readHeader(cell);
      if (!columns.has(id) && (headers as readonly string[]).includes(name))
        columns.set(id, { column, unit });
    });
  return columns;
}

function readLayer(row: LayerRow): unknown {
  const kind = row.kind();
  const copper = kind === "foil" || kind === "signal" || kind === "plane";
  const pressed = /^pressed$/i.test(row.text("thickness"));
  const thickness = pressed ? null : row.quantity("thickness", "length");
  return {
    kind,
    name: row.text("name"),
    material: row.text("material"),
    // A list that gives copper one thickness means the finished one.
    thickness: copper ? null : thickness,
    thicknessMode: pressed ? "pressed" : "typed",
    tolerancePercent: row.number("tolerance"),
    plies: row.plies(),
    dk: row.number("dk"),
    df: row.number("df"),
    dkFrequency: row.quantity("dkFrequency", "frequency"),
    baseFoil: row.quantity("baseFoil", "length") ?? (copper ? thickness : null),
    plating: row.quantity("plating", "length"),
    coveragePercent: row.number("coverage"),
    etch: row.quantity("etch", "length"),
    roughness: row.quantity("roughness", "length"),
    maskOverTrace: row.quantity("maskOverTrace", "length"),
    planeNet: row.text("planeNet"),
    origin: origins.find((origin) => origin === row.text("origin").toLowerCase()) ?? "assumed",
    sourceNote: row.text("sourceNote").slice(0, 200).trim() || undefined,
  };
}

class LayerRow {
  constructor(
    private readonly source: TableRow,
    private readonly columns: Columns,
    private readonly defaultUnit: string,
    private readonly problems: RowProblem[],
  ) {}

  text(column: StackupColumn): string {
    const at = this.columns.get(column);
    return at ? (this.source.cells[at.column] ?? "").slice(0, 400) : "";
  }

  kind(): LayerKind {
    const word = this.text("kind")
      .toLowerCase()
      .replace(/[^a-z]+/g, " ")
      .trim();
    const kind = layerKinds.find((candidate) => kindWords[candidate].includes(word));
    if (!kind)
      this.refuse(
        "kind",
        `'${this.text("kind")}' is no kind of layer. Write mask, foil, signal, plane, core or prepreg.`,
      );
    return kind ?? "signal";
  }

  /** A plain number: percent signs are dropped, a decimal comma becomes a point. */
  number(column: StackupColumn): string | null {
    const text = this.text(column).replace(/\s*%$/, "").replace(",", ".");
    if (text === "") return null;
    if (/^[+-]?(\d+(\.\d*)?|\.\d+)(e[+-]?\d{1,2})?$/i.test(text)) return text;
    this.refuse(column, `'${text}' is not a number. Write one such as 4.2.`);
    return null;
  }

  quantity(column: StackupColumn, dimension: Dimension): Quantity | null {
    const text = this.text(column);
    if (text === "") return null;
    const unit = dimension === "length" ? (this.columns.get(column)?.unit ?? this.defaultUnit) : "GHz";
    try {
      return parseQuantity(text, dimension, unit);
    } catch (error) {
      if (!(error instanceof DomainError)) throw error;
      this.refuse(column, error.message);
      return null;
    }
  }

  plies(): ReturnType<typeof readPlies> {
    try {
      const plies = readPlies(this.text("plies"));
      if (plies) return plies;
      this.refuse(
        "plies",
        `'${this.text("plies")}' cannot be read. Write 2 × 1080 62 % 76 µm + 1 × 2116 120 µm.`,
      );
    } catch (error) {
      if (!(error instanceof DomainError)) throw error;
      this.refuse("plies", error.message);
    }
    return [];
  }

  private refuse(column: StackupColumn, reason: string): void {
    this.problems.push({
      row: this.source.row,
      column: labelOf(column),
      value: this.text(column).slice(0, 60),
      reason,
    });
  }
}

function labelOf(field: string): string {
  const names: Record<string, string> = { tolerancePercent: "tolerance %", coveragePercent: "coverage %" };
  return names[field] ?? stackupColumns.find(({ id }) => id === field)?.label ?? field;
}
