import Papa from "papaparse";
import { detectDelimiter, type Delimiter } from "./delimiter";
import { DelimitedError } from "./errors";
import { restoreCell } from "./write";

export interface TableRow {
  /** As a spreadsheet counts: the first row is 1, blank ones count. */
  row: number;
  cells: string[];
}

export interface DelimitedTable {
  delimiter: Delimiter;
  /** Rows that are not blank. */
  rows: TableRow[];
  blankRows: number;
  /** Numbers in it are written with a comma. */
  decimalComma: boolean;
  /** Largest number of cells in a row. */
  columns: number;
}

export interface TableOptions {
  delimiter?: Delimiter;
  maxRows?: number;
  maxColumns?: number;
}

/** More than any board's section list; the reader's memory is the reason. */
export const MAX_ROWS = 500_000;
export const MAX_COLUMNS = 256;

/**
 * Cells of delimited text (RFC 4180, with `;` and tab). Takes text whose line ends are "\n" (see decodeText).
 *
 * @throws DelimitedError for too many rows or columns and for a quote that is never closed
 */
export function readTable(text: string, options: TableOptions = {}): DelimitedTable {
  const maxRows = options.maxRows ?? MAX_ROWS;
  const maxColumns = options.maxColumns ?? MAX_COLUMNS;
  // Some spreadsheets write their delimiter into a first line of its own.
  const declared = /^sep=([,;\t])\n/i.exec(text);
  const body = declared ? text.slice(declared[0].length) : text;
  const delimiter = options.delimiter ?? (declared?.[1] as Delimiter | undefined) ?? detectDelimiter(body);

  const parsed = Papa.parse<string[]>(body, { delimiter, newline: "\n", skipEmptyLines: false });
  for (const error of parsed.errors) {
    if (error.type !== "Quotes") continue;
    const row = (error.row ?? 0) + 1;
    throw new DelimitedError(
      "open quote",
      `Row ${row}: a cell opens with a double quote that is not closed where the cell ends. Close it, or write the quote twice inside the cell.`,
      row,
    );
  }

  const rows: TableRow[] = [];
  let blankRows = 0;
  let columns = 0;
  parsed.data.forEach((raw, index) => {
    const cells = raw.map((cell) => restoreCell(cell.trim()));
    if (cells.every((cell) => cell === "")) {
      // The end of the last line is not a row.
      if (index < parsed.data.length - 1) blankRows++;
      return;
    }
    if (cells.length > maxColumns && cells.slice(maxColumns).some((cell) => cell !== ""))
      throw new DelimitedError(
        "too many columns",
        `Row ${index + 1} has ${cells.length} cells; at most ${maxColumns} columns can be read. Remove those that are not needed.`,
        index + 1,
      );
    rows.push({ row: index + 1, cells });
    columns = Math.max(columns, Math.min(cells.length, maxColumns));
  });
  if (rows.length > maxRows)
    throw new DelimitedError(
      "too many rows",
      `There are ${rows.length.toLocaleString("en")} rows; at most ${maxRows.toLocaleString("en")} can be read at once. Split the list into parts.`,
    );
  return { delimiter, rows, blankRows, decimalComma: usesDecimalComma(rows, delimiter), columns };
}

const UNIT = String.raw`(?:\s*[a-zµμ"]+)?`;
const COMMA_NUMBER = new RegExp(String.raw`^[+-]?(?:\d*|[1-9]\d{0,2}(?:\.\d{3})+),\d+${UNIT}$`, "i");
const POINT_NUMBER = new RegExp(String.raw`^[+-]?(?:\d*|[1-9]\d{0,2}(?:,\d{3})+)\.\d+${UNIT}$`, "i");
/** "1,500" and "1.500" are one and a half or fifteen hundred: they show neither way of writing. */
const EITHER_WAY = new RegExp(String.raw`^[+-]?[1-9]\d{0,2}(?:,\d{3}|\.\d{3})${UNIT}$`, "i");

/** Some number has a comma that can only stand where a decimal point would, and none has such a point. */
function usesDecimalComma(rows: readonly TableRow[], delimiter: Delimiter): boolean {
  let commas = 0;
  for (const { cells } of rows.slice(0, 2000))
    for (const cell of cells) {
      if (cell.length > 24 || EITHER_WAY.test(cell)) continue;
      if (POINT_NUMBER.test(cell)) return false;
      if (COMMA_NUMBER.test(cell)) commas++;
    }
  // A comma-separated list has them in quotes only; one or two may be something else.
  return commas > 0 && (delimiter !== "," || commas > 2);
}
