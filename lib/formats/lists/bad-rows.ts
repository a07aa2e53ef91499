import { writeDelimited } from "../delimited/write";
import type { ListPreview } from "./preview";

/** The report of what was not taken, as CSV: row, column, value, reason; rows given twice at the end. */
export function badRowsCsv(preview: Pick<ListPreview<unknown>, "problems" | "duplicates">): string {
  return writeDelimited([
    ["row", "column", "value", "reason"],
    ...preview.problems.map(({ row, column, value, reason }) => [row, column, value, reason]),
    ...preview.duplicates.map(({ row, firstRow, text }) => [
      row,
      "whole row",
      text,
      `The same as row ${firstRow}; taken once.`,
    ]),
  ]);
}
