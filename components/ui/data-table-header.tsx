"use client";

import { ArrowDown, ArrowUp } from "lucide-react";
import { cn } from "./class-names";
import type { DataColumn, NumberFrame } from "./data-table-columns";
import { Tooltip } from "./tooltip";

interface Props<Row> {
  column: DataColumn<Row>;
  frame: NumberFrame | undefined;
  sorted: "ascending" | "descending" | null;
  onSort: () => void;
}

/** The head of a column: its name, and where it sorts, the button that does it. */
export function HeaderCell<Row>({ column, sorted, onSort }: Props<Row>) {
  const right = column.kind === "number";
  const name = <span className="truncate">{column.header}</span>;
  const arrow =
    sorted === "ascending" ? (
      <ArrowUp size={12} aria-hidden="true" className="shrink-0" />
    ) : sorted === "descending" ? (
      <ArrowDown size={12} aria-hidden="true" className="shrink-0" />
    ) : null;
  const inner = column.sortValue ? (
    <button
      type="button"
      onClick={onSort}
      className={cn(
        "hover:text-ink flex h-8 w-full items-center gap-1 -outline-offset-2",
        right && "justify-end text-right",
      )}
    >
      {name}
      {arrow}
    </button>
  ) : (
    <span className={cn("flex h-8 items-center", right && "justify-end")}>{name}</span>
  );
  return (
    <th
      scope="col"
      aria-sort={sorted ?? (column.sortValue ? "none" : undefined)}
      className="border-field-line bg-sheet text-ink-soft sticky top-0 z-10 border-b px-2 text-left font-medium"
    >
      {column.explanation ? <Tooltip content={column.explanation}>{inner}</Tooltip> : inner}
    </th>
  );
}
