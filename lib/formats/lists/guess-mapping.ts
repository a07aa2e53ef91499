import { listKinds, type ListKind, type ListMapping } from "@/lib/schemas/import-list";
import { readHeader } from "../delimited/header-unit";
import type { DelimitedTable, TableRow } from "../delimited/table";
import type { ListField } from "./list-field";
import { listFormats } from "./list-formats";

/** A title or two may stand above the header. */
const HEADER_SEARCH_ROWS = 20;

/**
 * How a table is most likely to be read as a list of `kind`: the header row is the one that names most fields, each
 * field takes the column whose header fits best, units come from headers, else `defaultUnit`. Without any header the
 * columns are taken in the order of the fields.
 */
export function guessMapping(table: DelimitedTable, kind: ListKind, defaultUnit: string): ListMapping {
  const fields = listFormats[kind].fields;
  const header = findHeader(table.rows, fields);
  const columns = header ? matchColumns(header.cells, fields) : inOrder(table, fields);
  const mapped = fields.map((field) => {
    const column = columns.get(field.id) ?? null;
    const said = header && column !== null ? readHeader(header.cells[column] ?? "").unit : null;
    return [field.id, { column, unit: field.kind === "length" ? (said ?? defaultUnit) : null }] as const;
  });
  return {
    kind,
    delimiter: table.delimiter,
    decimalComma: table.decimalComma,
    headerRow: header?.row ?? null,
    fields: Object.fromEntries(mapped),
    layers: {},
  };
}

/** The kind of list that a header speaks of; null where none has all its required fields. */
export function guessKind(table: DelimitedTable): ListKind | null {
  let best: ListKind | null = null;
  let bestScore = 0;
  for (const kind of listKinds) {
    const fields = listFormats[kind].fields;
    const header = findHeader(table.rows, fields);
    if (!header) continue;
    const columns = matchColumns(header.cells, fields);
    if (fields.some((field) => field.required && !columns.has(field.id))) continue;
    // Required fields tell kinds apart: "from" and "to" make a section list of what is also a net list.
    const required = fields.filter((field) => field.required).length;
    const score = columns.size * 10 + required;
    if (score > bestScore) {
      best = kind;
      bestScore = score;
    }
  }
  return best;
}

function findHeader(rows: readonly TableRow[], fields: readonly ListField[]): TableRow | null {
  let best: TableRow | null = null;
  let bestCount = 0;
  for (const row of rows.slice(0, HEADER_SEARCH_ROWS)) {
    // A row of data may hold a word such as "net"; a header holds no numbers.
    if (row.cells.some((cell) => /^[+-]?\d+([.,]\d+)?$/.test(cell))) continue;
    const count = matchColumns(row.cells, fields).size;
    if (count > bestCount) {
      best = row;
      bestCount = count;
    }
  }
  return best;
}

/** Field → column, each column once; earlier synonyms fit better, then earlier columns. */
function matchColumns(cells: readonly string[], fields: readonly ListField[]): Map<string, number> {
  const names = cells.slice(0, 256).map((cell) => (cell.length > 80 ? "" : readHeader(cell).name));
  const fits: { field: string; column: number; rank: number }[] = [];
  for (const field of fields)
    names.forEach((name, column) => {
      const rank = name === "" ? -1 : field.headers.indexOf(name);
      if (rank >= 0) fits.push({ field: field.id, column, rank });
    });
  fits.sort((a, b) => a.rank - b.rank || a.column - b.column);
  const columns = new Map<string, number>();
  const taken = new Set<number>();
  for (const { field, column } of fits)
    if (!columns.has(field) && !taken.has(column)) {
      columns.set(field, column);
      taken.add(column);
    }
  return columns;
}

function inOrder(table: DelimitedTable, fields: readonly ListField[]): Map<string, number> {
  return new Map(fields.slice(0, table.columns).map((field, index) => [field.id, index]));
}
