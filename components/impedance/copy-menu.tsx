"use client";

import { ChevronDown, Copy } from "lucide-react";
import { save } from "@/components/charts/save-file";
import { Button } from "@/components/ui/button";
import { Menu, MenuItem, MenuSeparator } from "@/components/ui/menu";
import { toast } from "@/components/ui/toast";
import type { LengthUnit } from "@/lib/client/preferences";
import type { ImpedanceRow } from "./impedance-rows";
import { type WidthChoice, widthTableCsv, widthTableText } from "./width-table";

interface Props {
  rows: readonly ImpedanceRow[];
  unit: LengthUnit;
  fileName: string;
}

/** The table class × layer → width, gap for the layout program: on the clipboard or as a file. */
export function CopyMenu({ rows, unit, fileName }: Props) {
  async function copy(choice: WidthChoice): Promise<void> {
    try {
      await navigator.clipboard.writeText(widthTableText(rows, unit, choice));
      toast.success(`${rows.length === 1 ? "1 row" : `${rows.length} rows`} copied, in ${unit}`);
    } catch {
      toast.error("The browser did not allow copying. Save the table as CSV instead.");
    }
  }
  function saveCsv(choice: WidthChoice): void {
    save(
      `${fileName}.csv`,
      new Blob([widthTableCsv(rows, unit, choice)], { type: "text/csv;charset=utf-8" }),
    );
  }
  return (
    <Menu
      align="end"
      trigger={
        <Button disabled={rows.length === 0}>
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
      <MenuItem onSelect={() => saveCsv("meeting")}>Save widths that meet the target as CSV</MenuItem>
      <MenuItem onSelect={() => saveCsv("present")}>Save widths as the classes have them as CSV</MenuItem>
    </Menu>
  );
}
