"use client";

import { Download } from "lucide-react";
import { DropdownMenu } from "radix-ui";
import { toast } from "@/components/ui/toast";
import { buttonClasses } from "@/components/ui/button";
import { csvText } from "@/lib/drawings/csv-rows";
import type { Drawing } from "@/lib/drawings/marks";
import { svgString } from "@/lib/drawings/svg-string";
import { pngOf, save } from "./save-file";

interface Props {
  /** made when it is asked for */
  drawing: () => Drawing;
  /** rows of the same facts, the first one its headings with units */
  rows?: () => readonly (readonly (string | number | null)[])[];
  /** without an ending */
  fileName: string;
}

const ITEM =
  "flex h-8 cursor-default items-center rounded px-3 text-sm outline-none select-none data-[highlighted]:bg-rule-line/60";

/** Saves a drawing as SVG or PNG, and its numbers as CSV. */
export function ExportMenu({ drawing, rows, fileName }: Props) {
  const png = async (): Promise<void> => {
    try {
      save(`${fileName}.png`, await pngOf(drawing()));
    } catch {
      toast.error("The picture could not be made in this browser. Save the drawing as SVG instead.");
    }
  };
  return (
    <DropdownMenu.Root>
      <DropdownMenu.Trigger className={`${buttonClasses({ variant: "quiet" })} print:hidden`}>
        <Download size={14} aria-hidden />
        Save drawing
      </DropdownMenu.Trigger>
      <DropdownMenu.Portal>
        <DropdownMenu.Content
          align="end"
          sideOffset={4}
          className="border-field-line bg-sheet text-ink z-20 rounded border p-1"
        >
          <DropdownMenu.Item
            className={ITEM}
            onSelect={() =>
              save(`${fileName}.svg`, new Blob([svgString(drawing())], { type: "image/svg+xml" }))
            }
          >
            Drawing as SVG
          </DropdownMenu.Item>
          <DropdownMenu.Item className={ITEM} onSelect={() => void png()}>
            Picture as PNG
          </DropdownMenu.Item>
          {rows ? (
            <DropdownMenu.Item
              className={ITEM}
              onSelect={() =>
                save(`${fileName}.csv`, new Blob([csvText(rows())], { type: "text/csv;charset=utf-8" }))
              }
            >
              Numbers as CSV
            </DropdownMenu.Item>
          ) : null}
        </DropdownMenu.Content>
      </DropdownMenu.Portal>
    </DropdownMenu.Root>
  );
}
