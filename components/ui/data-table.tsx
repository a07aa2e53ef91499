"use client";

import {
  createSortedRowModel,
  rowSelectionFeature,
  rowSortingFeature,
  type RowData,
  type RowSelectionState,
  type SortingState,
  tableFeatures,
  useTable,
} from "@tanstack/react-table";
import { useVirtualizer } from "@tanstack/react-virtual";
import { type ReactNode, useMemo, useRef, useState } from "react";
import { Checkbox } from "./checkbox";
import { cn } from "./class-names";
import { compareValues, type DataColumn, numberFrames } from "./data-table-columns";
import { HeaderCell } from "./data-table-header";
import { useRowKeys } from "./data-table-keys";
import { NumberText } from "./number-text";

export type { DataColumn, TableNumber } from "./data-table-columns";
export type { RowSelectionState, SortingState } from "@tanstack/react-table";

export const ROW_HEIGHT = 32;
/** Beyond this many rows only those in view are in the page. */
const VIRTUAL_BEYOND = 200;

const features = tableFeatures({
  rowSortingFeature,
  rowSelectionFeature,
  sortedRowModel: createSortedRowModel(),
});

interface Props<Row extends RowData> {
  /** Names the table for those who do not see it. */
  label: string;
  rows: readonly Row[];
  columns: readonly DataColumn<Row>[];
  rowId: (row: Row) => string;
  /** Enter, or a click on a row. */
  onOpen?: (row: Row) => void;
  /** The row whose panel is open, or on which the keyboard stands; give both to control it. */
  activeId?: string | null;
  onActiveChange?: (id: string | null) => void;
  /** "page": j, k and Enter work wherever the focus is, except in a field. One such table a page. */
  keys?: "table" | "page";
  sorting?: SortingState;
  onSortingChange?: (sorting: SortingState) => void;
  defaultSorting?: SortingState;
  /** Give both to let rows be ticked, for bulk edit. */
  selection?: RowSelectionState;
  onSelectionChange?: (selection: RowSelectionState) => void;
  /** Further classes of a row, such as the hatching of what is waived. */
  rowClassName?: (row: Row) => string | undefined;
  /** Shown in place of rows when there are none. */
  empty?: ReactNode;
  /** Height of the scrolling part; rows beyond 200 need one. */
  height?: string;
}

/** The table that pages are made of: sticky header, 32 px rows, sorting, ticking, j/k/Enter, virtual rows. */
export function DataTable<Row extends RowData>(props: Props<Row>) {
  const { rows, columns, rowId, selection, onSelectionChange, height = "calc(100dvh - 14rem)" } = props;
  const scroller = useRef<HTMLDivElement>(null);
  const [ownSorting, setOwnSorting] = useState<SortingState>(props.defaultSorting ?? []);
  const sorting = props.sorting ?? ownSorting;
  const [ownActive, setOwnActive] = useState<string | null>(null);
  const activeId = props.activeId === undefined ? ownActive : props.activeId;

  const definitions = useMemo(
    () =>
      columns.map((column) => ({
        id: column.id,
        accessorFn: (row: Row) => column.sortValue?.(row) ?? undefined,
        enableSorting: column.sortValue !== undefined,
        sortUndefined: "last" as const,
        sortFn: (
          a: { getValue: (id: string) => unknown },
          b: { getValue: (id: string) => unknown },
          id: string,
        ) => compareValues(a.getValue(id), b.getValue(id)),
      })),
    [columns],
  );
  const data = useMemo(() => [...rows], [rows]);
  const table = useTable({
    features,
    data,
    columns: definitions,
    getRowId: rowId,
    state: { sorting, rowSelection: selection ?? {} },
    onSortingChange: (next) => {
      const value = typeof next === "function" ? next(sorting) : next;
      setOwnSorting(value);
      props.onSortingChange?.(value);
    },
    onRowSelectionChange: (next) =>
      onSelectionChange?.(typeof next === "function" ? next(selection ?? {}) : next),
    enableMultiSort: false,
  });
  const sorted = table.getRowModel().rows;
  const frames = useMemo(() => numberFrames(columns, rows), [columns, rows]);

  const virtual = sorted.length > VIRTUAL_BEYOND;
  const virtualizer = useVirtualizer({
    count: sorted.length,
    getScrollElement: () => scroller.current,
    estimateSize: () => ROW_HEIGHT,
    overscan: 12,
    scrollPaddingStart: ROW_HEIGHT,
    enabled: virtual,
    initialRect: { width: 800, height: 800 },
  });
  const items = virtual ? virtualizer.getVirtualItems() : null;
  const first = items?.[0]?.index ?? 0;
  const last = items ? (items.at(-1)?.index ?? -1) : sorted.length - 1;
  const above = first * ROW_HEIGHT;
  const below = Math.max(0, sorted.length - 1 - last) * ROW_HEIGHT;

  const setActive = (id: string | null) => {
    setOwnActive(id);
    props.onActiveChange?.(id);
  };
  const tickActive = selection
    ? (id: string) => sorted.find((row) => row.id === id)?.toggleSelected()
    : undefined;
  const rowKeys = useRowKeys({
    ids: useMemo(() => sorted.map((row) => row.id), [sorted]),
    activeId,
    setActive,
    scroller,
    scrollTo: (index) => {
      if (virtual) virtualizer.scrollToIndex(index, { align: "auto" });
    },
    open: (id) => {
      const row = sorted.find((candidate) => candidate.id === id);
      if (row) props.onOpen?.(row.original);
    },
    tick: tickActive,
    everywhere: props.keys === "page",
  });

  const span = columns.length + (selection ? 1 : 0);
  const tabStop = sorted.some((row) => row.id === activeId) ? activeId : sorted[first]?.id;

  return (
    <div
      ref={scroller}
      className="scroll-hint border-rule-line relative overflow-auto border-y print:overflow-visible"
      style={{ maxHeight: height }}
      onKeyDown={rowKeys.onKeyDown}
    >
      <table
        aria-label={props.label}
        aria-rowcount={virtual ? sorted.length + 1 : undefined}
        className="w-full table-fixed border-separate border-spacing-0 text-sm"
        style={{ minWidth: columns.reduce((sum, column) => sum + (column.width ?? 160), selection ? 36 : 0) }}
      >
        <colgroup>
          {selection ? <col style={{ width: 36 }} /> : null}
          {columns.map((column) => (
            <col key={column.id} style={column.width ? { width: column.width } : undefined} />
          ))}
        </colgroup>
        <thead>
          <tr className="h-8">
            {selection ? (
              <th scope="col" className="border-rule-line bg-sheet sticky top-0 z-10 border-b px-2">
                <Checkbox
                  label="Tick all rows"
                  labelHidden
                  checked={
                    table.getIsAllRowsSelected()
                      ? true
                      : table.getIsSomeRowsSelected()
                        ? "indeterminate"
                        : false
                  }
                  onCheckedChange={(checked) => table.toggleAllRowsSelected(checked)}
                />
              </th>
            ) : null}
            {columns.map((column) => {
              const sort = sorting.find((entry) => entry.id === column.id);
              return (
                <HeaderCell
                  key={column.id}
                  column={column}
                  frame={frames.get(column.id)}
                  sorted={sort ? (sort.desc ? "descending" : "ascending") : null}
                  onSort={() => table.getColumn(column.id)?.toggleSorting()}
                />
              );
            })}
          </tr>
        </thead>
        <tbody>
          {above > 0 ? <Spacer span={span} height={above} /> : null}
          {sorted.slice(first, last + 1).map((row, offset) => (
            <tr
              key={row.id}
              data-row-id={row.id}
              aria-rowindex={virtual ? first + offset + 2 : undefined}
              aria-current={row.id === activeId ? "true" : undefined}
              tabIndex={row.id === tabStop ? 0 : -1}
              onFocus={(event) => {
                if (event.target === event.currentTarget) rowKeys.focused(row.id);
              }}
              onClick={(event) => {
                if (isOwnControl(event.target, event.currentTarget)) return;
                setActive(row.id);
                props.onOpen?.(row.original);
              }}
              className={cn(
                "hover:bg-rule-line/30 h-8 scroll-mt-8 -outline-offset-2",
                row.id === activeId && "bg-copper/10",
                props.onOpen && "cursor-pointer",
                props.rowClassName?.(row.original),
              )}
            >
              {selection ? (
                <td className="border-rule-line/60 border-b px-2">
                  <Checkbox
                    label="Tick this row"
                    labelHidden
                    checked={row.getIsSelected()}
                    onCheckedChange={(checked) => row.toggleSelected(checked)}
                  />
                </td>
              ) : null}
              {columns.map((column) => (
                <td
                  key={column.id}
                  className={cn(
                    "border-rule-line/60 truncate border-b px-2",
                    column.kind === "number" && "text-right",
                    column.kind === "mono" && "font-mono text-xs",
                  )}
                >
                  {column.kind === "number" ? (
                    <NumberText
                      text={column.number(row.original)?.text ?? null}
                      unit={column.number(row.original)?.unit}
                      {...frames.get(column.id)}
                    />
                  ) : (
                    column.cell(row.original)
                  )}
                </td>
              ))}
            </tr>
          ))}
          {below > 0 ? <Spacer span={span} height={below} /> : null}
          {sorted.length === 0 ? (
            <tr>
              <td colSpan={span} className="text-ink-soft px-2 py-6">
                {props.empty ?? "Nothing to show."}
              </td>
            </tr>
          ) : null}
        </tbody>
      </table>
    </div>
  );
}

function Spacer({ span, height }: { span: number; height: number }) {
  return (
    <tr aria-hidden="true">
      <td colSpan={span} style={{ height, padding: 0 }} />
    </tr>
  );
}

/** A click on a link, button or field inside a row is that control's, not the row's. */
function isOwnControl(target: EventTarget, row: Element): boolean {
  // A menu that hangs from the row stands elsewhere in the page, yet its clicks reach the row.
  if (target instanceof Element && !row.contains(target)) return true;
  const control =
    target instanceof Element ? target.closest("a, button, input, select, textarea, label") : null;
  return control !== null && row.contains(control);
}
