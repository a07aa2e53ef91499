"use client";

import type { ReactNode } from "react";
import { type DataColumn, DataTable, type RowSelectionState } from "@/components/ui/data-table";

interface Props<Row> {
  id: string;
  title: string;
  /** What ticking does. */
  meaning: ReactNode;
  rows: readonly Row[];
  columns: readonly DataColumn<Row>[];
  rowId: (row: Row) => string;
  ticked: RowSelectionState;
  onTicked: (ticked: RowSelectionState) => void;
}

/** One kind of proposal: a table to tick, with how many are ticked beside its title. Nothing where there is none. */
export function ProposalTable<Row extends object>({
  id,
  title,
  meaning,
  rows,
  columns,
  rowId,
  ticked,
  onTicked,
}: Props<Row>) {
  if (rows.length === 0) return null;
  const count = rows.filter((row) => ticked[rowId(row)]).length;
  return (
    <section aria-labelledby={id} className="flex flex-col gap-2">
      <h2 id={id} className="text-lg font-semibold">
        {title}
        <span className="text-ink-soft ml-2 text-sm font-normal">
          {count.toLocaleString("en")} of {rows.length.toLocaleString("en")} ticked
        </span>
      </h2>
      <p className="text-ink-soft max-w-prose text-sm">{meaning}</p>
      <DataTable
        label={title}
        rows={rows}
        columns={columns}
        rowId={rowId}
        selection={ticked}
        onSelectionChange={onTicked}
        height="16rem"
      />
    </section>
  );
}
