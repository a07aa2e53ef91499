import { normaliseText } from "@/lib/formats/delimited/decode";
import { readTable } from "@/lib/formats/delimited/table";

export interface PastedColumn<Key extends string> {
  key: Key;
  /** As it is written when rows are copied. */
  header: string;
  /** Other headers for it, in lower case without spaces and marks. */
  also: readonly string[];
}

export interface PastedRow<Key extends string> {
  /** As the spreadsheet counts. */
  row: number;
  cells: Partial<Record<Key, string>>;
}

/**
 * Rows of a pasted table. A first row that names the first column is a header and says the order; without one the
 * columns stand in their usual order.
 * @throws DelimitedError where it is no table; Error where a header's column is not known
 */
export function readPasted<Key extends string>(
  text: string,
  columns: readonly PastedColumn<Key>[],
  needed: Key,
): PastedRow<Key>[] {
  const { rows } = readTable(normaliseText(text), { maxRows: 2000, maxColumns: 60 });
  const [first] = rows;
  if (!first) return [];
  const named = first.cells.map((cell) => columnNamed(cell, columns));
  const isHeader = named.includes(needed) && named.filter((key) => key !== null).length > 1;
  const order = isHeader ? named : columns.map(({ key }) => key);
  if (isHeader) {
    const stray = first.cells.filter((cell, index) => cell !== "" && named[index] === null);
    if (stray.length > 0)
      throw new Error(
        `The column ${stray.map((cell) => `'${cell.slice(0, 30)}'`).join(", ")} is not known here. Known are: ${columns.map(({ header }) => header).join(", ")}.`,
      );
  }
  return rows.slice(isHeader ? 1 : 0).map(({ row, cells }) => ({
    row,
    cells: Object.fromEntries(
      cells.flatMap((cell, index) => {
        const key = order[index];
        return key && cell !== "" ? [[key, cell]] : [];
      }),
    ) as Partial<Record<Key, string>>,
  }));
}

function columnNamed<Key extends string>(cell: string, columns: readonly PastedColumn<Key>[]): Key | null {
  const bare = (text: string) => text.toLowerCase().replace(/[^a-z0-9]/g, "");
  const name = bare(cell.replace(/\[.*\]|\(.*\)/g, ""));
  if (name === "") return null;
  return columns.find(({ header, also }) => bare(header) === name || also.includes(name))?.key ?? null;
}
