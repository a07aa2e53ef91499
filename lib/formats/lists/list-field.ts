import type { ListKind } from "@/lib/schemas/import-list";
import type { Quantity } from "@/lib/si/units";

/** One thing that a list says of each row, and the headers under which it is known. */
export interface ListField {
  id: string;
  label: string;
  required: boolean;
  kind: "text" | "length" | "count" | "pins";
  /** Folded as readHeader does: lower case, words single-spaced. The first is what we write. */
  headers: readonly string[];
}

export interface RowProblem {
  row: number;
  column: string;
  value: string;
  reason: string;
}

export interface GoodRow<T> {
  row: number;
  value: T;
  /** Row that said the same before; this one counts as read but adds nothing. */
  duplicateOf: number | null;
}

/** A kind of list: its fields and how a row of it is read. */
export interface ListFormat<T> {
  kind: ListKind;
  fields: readonly ListField[];
  read(cells: RowCells): T;
  /** What makes a row the same as another; equal keys with unequal text are refused when `unique`. */
  key(value: T): string;
  unique: string | null;
}

/** "any": a coordinate may be negative. */
export type LengthRule = "positive" | "not negative" | "any";

/** What a list format asks of a row; problems are collected, not thrown, so that all of a row are told at once. */
export interface RowCells {
  text(field: string, max: number): string;
  node(field: string): string;
  length(field: string, rule: LengthRule): Quantity | null;
  count(field: string, max: number): number | null;
  words(field: string, max: number): string[];
  refuse(field: string, reason: string): void;
}
