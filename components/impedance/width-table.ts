import type { CellAnswer } from "@/lib/client/engine-impedance";
import type { FormulaValue, Outcome } from "@/lib/client/engine-line";
import type { SpreadFacts } from "@/lib/client/engine-spread";
import type { LengthUnit } from "@/lib/client/preferences";
import { writeDelimited } from "@/lib/formats/delimited/write";
import { lengthDigits } from "./grids";
import type { ImpedanceRow } from "./impedance-rows";
import { remarks } from "./row-words";

/** "meeting": the width that meets the target; "present": the one that the class has. */
export type WidthChoice = "meeting" | "present";

/** Class × layer with width and gap, headings first; a cell is empty where there is no width. */
export function widthTable(rows: readonly ImpedanceRow[], unit: LengthUnit, choice: WidthChoice): string[][] {
  return [
    ["Class", "Layer", `Width (${unit})`, `Gap (${unit})`, "Target (Ω)", "Impedance (Ω)"],
    ...rows.map((row) => {
      const { width, gap, impedance } = lineOf(row, choice);
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

/**
 * The same with everything that is known of each line.
 * @param spreads of the chosen lines, in the order of the rows; null where there is no line
 */
export function widthTableCsv(
  rows: readonly ImpedanceRow[],
  unit: LengthUnit,
  choice: WidthChoice,
  spreads: readonly (Outcome<SpreadFacts> | null)[],
): string {
  const [head = [], ...lines] = widthTable(rows, unit, choice);
  return writeDelimited([
    [
      ...head,
      "Tolerance (%)",
      "Formula (Ω)",
      "Formula",
      "Spread low (Ω)",
      "Spread high (Ω)",
      "Yield (%)",
      "Least width (" + unit + ")",
      "Remarks",
    ],
    ...lines.map((cells, at) => {
      const row = rows[at];
      if (!row) return cells;
      const { formula } = lineOf(row, choice);
      const spread = spreads[at];
      const facts = spread?.ok ? spread.value : null;
      return [
        ...cells,
        String(row.tolerance),
        formula ? formula.ohms.toFixed(1) : "",
        formula ? `${formula.title}${formula.inRange ? "" : " (beyond its range)"}` : "",
        facts ? facts.low.toFixed(1) : "",
        facts ? facts.high.toFixed(1) : "",
        facts ? (100 * facts.yield).toFixed(1) : "",
        row.least ? lengthDigits(row.least.minWidth, unit) : "",
        remarks(row, unit).join("; "),
      ];
    }),
  ]);
}

interface ChosenLine {
  width: number | null;
  gap: number | null;
  impedance: number | null;
  formula: FormulaValue | null;
}

export function lineOf(row: ImpedanceRow, choice: WidthChoice): ChosenLine {
  if (choice === "present") {
    const facts = row.now?.ok ? row.now.value : null;
    return {
      width: row.width,
      gap: row.gapAssumed ? null : row.gap,
      impedance: facts?.impedance ?? null,
      formula: facts?.formula ?? null,
    };
  }
  const found: CellAnswer["meets"] | null = row.meets;
  const facts = found?.ok ? found.value : null;
  return {
    width: facts?.dimension ?? null,
    gap: row.gap,
    impedance: facts?.impedance ?? null,
    formula: facts?.formula ?? null,
  };
}
