import { readTable } from "@/lib/formats/delimited/table";
import { writeDelimited } from "@/lib/formats/delimited/write";
import { readStackupList, type StackupListReading } from "@/lib/formats/stackup-list/read";

/**
 * The stackup that remains when the rows with problems are left out; null where too little remains to be one.
 * @param text  as decodeText or normaliseText gave it
 */
export function withoutBadRows(
  text: string,
  reading: StackupListReading,
  name: string,
  unit: string,
): StackupListReading["doc"] {
  const bad = new Set(reading.problems.map(({ row }) => row));
  const { rows, delimiter } = readTable(text);
  const good = rows.filter(({ row }) => !bad.has(row));
  // A problem in the header, or of the list as a whole, is no matter of single rows.
  if (bad.has(rows[0]?.row ?? 1) || good.length < 2) return null;
  return readStackupList(
    writeDelimited(
      good.map(({ cells }) => cells),
      delimiter,
    ),
    name,
    unit,
  ).doc;
}
