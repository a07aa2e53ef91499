import type { ListKind, ListMapping } from "@/lib/schemas/import-list";
import type { DelimitedTable, TableRow } from "../delimited/table";
import type { GoodRow, ListField, ListFormat, RowProblem } from "./list-field";
import { listFormats, type ListRows } from "./list-formats";
import { MappedRow } from "./row-cells";

/** Rows read before others get a turn. */
const ROWS_A_TURN = 500;

export interface ListPreview<T> {
  kind: ListKind;
  /** Rows below the header that are not blank: good + bad, none lost. */
  total: number;
  good: GoodRow<T>[];
  /** Every problem of every bad row, in order. */
  problems: RowProblem[];
  badRows: number;
  /** Good rows that say what an earlier one said; they add nothing and are listed. */
  duplicates: { row: number; firstRow: number; text: string }[];
  blankRows: number;
  /** Rows above the header. */
  skippedRows: number;
  /** Layer names of the good rows, most used first. */
  layers: { name: string; rows: number }[];
  /** Required fields that no column is chosen for. */
  missingFields: string[];
}

/** Reads a whole list under a mapping: good rows, and every bad one by row, column, value and reason. */
export function previewTable<K extends ListKind>(
  table: DelimitedTable,
  mapping: ListMapping & { kind: K },
): ListPreview<ListRows[K]> {
  const steps = previewSteps(table, mapping);
  for (;;) {
    const step = steps.next();
    if (step.done) return step.value;
  }
}

/** The same in turns, for a thread that others wait for. `rest` is called between them. */
export async function previewInTurns<K extends ListKind>(
  table: DelimitedTable,
  mapping: ListMapping & { kind: K },
  rest: () => Promise<void>,
): Promise<ListPreview<ListRows[K]>> {
  const steps = previewSteps(table, mapping);
  for (;;) {
    const step = steps.next();
    if (step.done) return step.value;
    await rest();
  }
}

function* previewSteps<K extends ListKind>(
  table: DelimitedTable,
  mapping: ListMapping & { kind: K },
): Generator<void, ListPreview<ListRows[K]>> {
  const format: ListFormat<ListRows[K]> = listFormats[mapping.kind];
  const fields = new Map(format.fields.map((field) => [field.id, field]));
  const headerRow = mapping.headerRow ?? 0;
  const rows = table.rows.filter((row) => row.row > headerRow);
  const headerWidth = table.rows.find((row) => row.row === headerRow)?.cells.length ?? null;

  const good: GoodRow<ListRows[K]>[] = [];
  const problems: RowProblem[] = [];
  const duplicates: { row: number; firstRow: number; text: string }[] = [];
  const seen = new Map<string, GoodRow<ListRows[K]>>();
  let badRows = 0;
  for (const [index, row] of rows.entries()) {
    if (index % ROWS_A_TURN === ROWS_A_TURN - 1) yield;
    const found = readRow(row, mapping, fields, format, headerWidth, seen);
    if (found.problems.length > 0) {
      badRows++;
      for (const problem of found.problems) problems.push(problem);
      continue;
    }
    good.push(found.row);
    if (found.row.duplicateOf !== null)
      duplicates.push({
        row: row.row,
        firstRow: found.row.duplicateOf,
        text: row.cells.join(" ").slice(0, 120),
      });
  }
  return {
    kind: mapping.kind,
    total: rows.length,
    good,
    problems,
    badRows,
    duplicates,
    blankRows: table.blankRows,
    skippedRows: table.rows.filter((row) => row.row < headerRow).length,
    layers: countLayers(good),
    missingFields: missingFields(mapping, format.fields),
  };
}

/** Labels of required fields without a column. */
export function missingFields(mapping: ListMapping, fields: readonly ListField[]): string[] {
  return fields
    .filter((field) => field.required && (mapping.fields[field.id]?.column ?? null) === null)
    .map((field) => field.label);
}

function readRow<T>(
  row: TableRow,
  mapping: ListMapping,
  fields: ReadonlyMap<string, ListField>,
  format: ListFormat<T>,
  headerWidth: number | null,
  seen: Map<string, GoodRow<T>>,
): { row: GoodRow<T>; problems: RowProblem[] } {
  const cells = new MappedRow(row, mapping, fields);
  const value = format.read(cells);
  const read: GoodRow<T> = { row: row.row, value, duplicateOf: null };
  const width = widthOf(row);
  if (headerWidth !== null && width > headerWidth)
    cells.problems.unshift({
      row: row.row,
      column: `cell ${headerWidth + 1}`,
      value: (row.cells[headerWidth] ?? "").slice(0, 60),
      reason: `stands beyond the header's ${headerWidth} columns. Put cells that hold the delimiter in double quotes.`,
    });
  if (cells.problems.length > 0) return { row: read, problems: cells.problems };

  const key = format.key(value);
  const first = seen.get(key);
  if (!first) seen.set(key, read);
  else if (format.unique === null || JSON.stringify(first.value) === JSON.stringify(value))
    read.duplicateOf = first.row;
  else
    cells.refuse(
      format.unique,
      `was given in row ${first.row} already, with other values. Keep one of the two.`,
    );
  return { row: read, problems: cells.problems };
}

function widthOf(row: TableRow): number {
  let width = row.cells.length;
  while (width > 0 && row.cells[width - 1] === "") width--;
  return width;
}

function countLayers(good: readonly GoodRow<unknown>[]): { name: string; rows: number }[] {
  const counts = new Map<string, number>();
  for (const { value } of good) {
    if (typeof value !== "object" || value === null || !("layer" in value) || typeof value.layer !== "string")
      continue;
    if (value.layer !== "") counts.set(value.layer, (counts.get(value.layer) ?? 0) + 1);
  }
  return [...counts]
    .map(([name, rows]) => ({ name, rows }))
    .sort((a, b) => b.rows - a.rows || (a.name < b.name ? -1 : 1));
}
