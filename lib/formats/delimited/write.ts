import { delimiters, type Delimiter } from "./delimiter";

/** Characters with which a spreadsheet begins a formula; a lead of apostrophes does not count. */
const FORMULA_LEAD = /^'*[=+\-@\t\r]/;
const NUMBER = /^[+-]?(\d+([.,]\d*)?|[.,]\d+)(e[+-]?\d+)?$/i;

/**
 * A cell that no spreadsheet takes for a formula: one that begins with = + - @ tab or CR gets an apostrophe in
 * front. Plain numbers, negative ones too, stay as they are.
 */
export function neutraliseCell(text: string): string {
  return FORMULA_LEAD.test(text) && !NUMBER.test(text) ? `'${text}` : text;
}

/** Undoes neutraliseCell, so that our own export reads back as it was. */
export function restoreCell(text: string): string {
  return text.startsWith("'") && FORMULA_LEAD.test(text) ? text.slice(1) : text;
}

/** Delimited text after RFC 4180: CRLF between rows, quotes where needed, formulas made harmless. */
export function writeDelimited(
  rows: readonly (readonly (string | number)[])[],
  delimiter: Delimiter = ",",
): string {
  return rows
    .map((row) => `${row.map((cell) => quoted(neutraliseCell(String(cell)))).join(delimiter)}\r\n`)
    .join("");
}

function quoted(cell: string): string {
  const needed = /["\n\r]|^\s|\s$/.test(cell) || delimiters.some((delimiter) => cell.includes(delimiter));
  return needed ? `"${cell.replaceAll('"', '""')}"` : cell;
}
