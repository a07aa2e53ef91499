"use client";

import { ChevronDown, Copy } from "lucide-react";
import { save } from "@/components/charts/save-file";
import { Button } from "@/components/ui/button";
import { Menu, MenuItem, MenuSeparator } from "@/components/ui/menu";
import { toast } from "@/components/ui/toast";
import { errorMessage } from "@/lib/client/api";
import type { Engine } from "@/lib/client/engine";
import type { Outcome } from "@/lib/client/engine-line";
import type { SpreadFacts } from "@/lib/client/engine-spread";
import type { LengthUnit } from "@/lib/client/preferences";
import type { ProcessDoc } from "@/lib/schemas/process";
import type { Stackup } from "@/lib/si/stackup";
import type { ImpedanceRow } from "./impedance-rows";
import { lineOf, type WidthChoice, widthTableCsv, widthTableText } from "./width-table";

interface Props {
  rows: readonly ImpedanceRow[];
  unit: LengthUnit;
  fileName: string;
  engine: Engine;
  stackup: Stackup;
  process: ProcessDoc;
}

/** The table class × layer → width, gap for the layout program: on the clipboard or as a file. */
export function CopyMenu({ rows, unit, fileName, engine, stackup, process }: Props) {
  async function copy(choice: WidthChoice): Promise<void> {
    try {
      await navigator.clipboard.writeText(widthTableText(rows, unit, choice));
      toast.success(`${rows.length === 1 ? "1 row" : `${rows.length} rows`} copied, in ${unit}`);
    } catch {
      toast.error("The browser did not allow copying. Save the table as CSV instead.");
    }
  }
  async function saveCsv(choice: WidthChoice): Promise<void> {
    try {
      const spreads: (Outcome<SpreadFacts> | null)[] = [];
      for (const row of rows) spreads.push(await spreadOf(row, choice));
      save(
        `${fileName}.csv`,
        new Blob([widthTableCsv(rows, unit, choice, spreads)], { type: "text/csv;charset=utf-8" }),
      );
    } catch (error) {
      toast.error(errorMessage(error));
    }
  }
  async function spreadOf(row: ImpedanceRow, choice: WidthChoice): Promise<Outcome<SpreadFacts> | null> {
    if (choice === "present" && !row.spreadPending) return row.spread;
    const { width, gap } = lineOf(row, choice);
    if (width === null || (row.line === "differential" && gap === null)) return null;
    const { index, target, tolerance } = row;
    return engine.run({
      kind: "line-spread",
      stackup,
      index,
      shape: { width, gap },
      process,
      ohms: target,
      tolerance,
    });
  }
  const waiting = rows.some(({ pending }) => pending);
  return (
    <Menu
      align="end"
      trigger={
        <Button disabled={rows.length === 0 || waiting}>
          <Copy size={14} aria-hidden="true" />
          Copy as table
          <ChevronDown size={14} aria-hidden="true" />
        </Button>
      }
    >
      <MenuItem onSelect={() => void copy("meeting")}>Copy widths that meet the target, in {unit}</MenuItem>
      <MenuItem onSelect={() => void copy("present")}>
        Copy widths as the classes have them, in {unit}
      </MenuItem>
      <MenuSeparator />
      <MenuItem onSelect={() => void saveCsv("meeting")}>Save widths that meet the target as CSV</MenuItem>
      <MenuItem onSelect={() => void saveCsv("present")}>
        Save widths as the classes have them as CSV
      </MenuItem>
    </Menu>
  );
}
