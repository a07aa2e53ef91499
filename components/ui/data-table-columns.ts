import type { ReactNode } from "react";
import { fractionDigits } from "./number-text";

/** A number as a table shows it: its digits as read, and its unit. */
export interface TableNumber {
  text: string;
  unit?: string;
}

interface ColumnBase<Row> {
  id: string;
  header: string;
  /** Width in pixels; a column without one takes what is left. */
  width?: number;
  /** What the column sorts by; without it, it does not sort. Absent values go last either way. */
  sortValue?: (row: Row) => number | string | null | undefined;
  /** A remark on the header, for those who need it spelled out. */
  explanation?: string;
}

/** A column of text, marks or controls. */
export interface TextColumn<Row> extends ColumnBase<Row> {
  kind?: "text" | "mono";
  cell: (row: Row) => ReactNode;
}

/** A column of numbers, aligned on the decimal point. */
export interface NumberColumn<Row> extends ColumnBase<Row> {
  kind: "number";
  number: (row: Row) => TableNumber | null;
}

export type DataColumn<Row> = TextColumn<Row> | NumberColumn<Row>;

/** What a column of numbers reserves, so that its points and units stand in line. */
export interface NumberFrame {
  fraction: number;
  unitWidth: number;
}

/** Reads the frames over all rows, not only those in view: nothing shifts as one scrolls. */
export function numberFrames<Row>(
  columns: readonly DataColumn<Row>[],
  rows: readonly Row[],
): Map<string, NumberFrame> {
  const frames = new Map<string, NumberFrame>();
  for (const column of columns) {
    if (column.kind !== "number") continue;
    const frame = { fraction: 0, unitWidth: 0 };
    for (const row of rows) {
      const number = column.number(row);
      if (!number) continue;
      frame.fraction = Math.max(frame.fraction, fractionDigits(number.text));
      frame.unitWidth = Math.max(frame.unitWidth, number.unit?.length ?? 0);
    }
    frames.set(column.id, frame);
  }
  return frames;
}

/** Orders names as people count: U2 before U10. */
const NAMES = new Intl.Collator("en", { numeric: true, sensitivity: "base" });

export function compareValues(a: unknown, b: unknown): number {
  if (typeof a === "number" && typeof b === "number") return a - b;
  return NAMES.compare(String(a), String(b));
}
