import type { ComponentProps } from "react";
import { ExportMenu } from "@/components/charts/export-menu";

/** A drawing's caption with its menu. */
export function Saved({ words, ...menu }: { words?: string } & ComponentProps<typeof ExportMenu>) {
  return (
    <div className="flex items-start justify-between gap-3">
      <p className="text-ink-soft min-w-0 pt-1.5 text-xs">{words}</p>
      <ExportMenu {...menu} />
    </div>
  );
}
