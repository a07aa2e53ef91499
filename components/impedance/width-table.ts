import type { LengthUnit } from "@/lib/client/preferences";
import { writeDelimited } from "@/lib/formats/delimited/write";
import { lengthDigits } from "./grids";
import type { ImpedanceRow } from "./impedance-rows";

/** "meeting": the width that meets the target; "present": the one that the class has. */
export type WidthChoice = "meeting" | "present";

/** Class × layer with width and gap, headings first; a cell is empty where there is no width. */
export function widthTable(rows: readonly ImpedanceRow[], unit: LengthUnit, choice: WidthChoice): string[][] {
  return [
    ["Class", "Layer", `Width (${unit})`, `Gap (${unit})`, "Target (Ω)", "Impedance (Ω)"],
    ...rows.map((row) => {
      const { width, gap, impedance } = dimensionsOf(row, choice);
      return [
        row.netClass.name,
        row.layer.name,
        width === null ? "" : lengthDigits(width, unit),
        width === null || gap === null ? "" : lengthDigits(gap, unit),
        String(Number(row.target.toFixed(3))),
        impedance === null ? "" : impedance.toFixed(1),
      ];
    }),
  ];
}

/** For a spreadsheet or a layout program: cells apart by tabs. */
export function widthTableText(rows: readonly ImpedanceRow[], unit: LengthUnit, choice: WidthChoice): string {
  return writeDelimited(widthTable(rows, unit, choice), "\t").replace(/\r\n/g, "\n");
}

export function widthTableCsv(rows: readonly ImpedanceRow[], unit: LengthUnit, choice: WidthChoice): string {
  return writeDelimited(widthTable(rows, unit, choice));
}

function dimensionsOf(row: ImpedanceRow, choice: WidthChoice) {
  if (choice === "present")
    return {
      width: row.width,
      gap: row.gapAssumed ? null : row.gap,
      impedance: row.now?.ok ? row.now.value.impedance : null,
    };
  const found = row.width0.ok ? row.width0.value : null;
  return { width: found?.dimension ?? null, gap: row.gap, impedance: found?.impedance ?? null };
}
