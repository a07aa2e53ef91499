"use client";

import { type KeyboardEvent, type RefObject, useEffect, useRef } from "react";

interface Options {
  ids: readonly string[];
  activeId: string | null;
  setActive: (id: string | null) => void;
  scroller: RefObject<HTMLDivElement | null>;
  scrollTo: (index: number) => void;
  open: (id: string) => void;
  /** Space ticks the row where rows can be ticked. */
  tick?: (id: string) => void;
  /** Listens on the whole page, except while someone types or a dialog is open. */
  everywhere: boolean;
}

type Key = Pick<
  globalThis.KeyboardEvent,
  "key" | "ctrlKey" | "metaKey" | "altKey" | "target" | "defaultPrevented" | "preventDefault"
>;

const PAGE = 15;

interface RowKeys {
  onKeyDown: (event: KeyboardEvent) => void;
  /** A row was given the focus: by the person (it becomes the current one), or back by this table (it does not). */
  focused: (id: string) => void;
}

/** Moves through rows: j or down, k or up, Home, End, page keys; Enter opens, Space ticks. */
export function useRowKeys(options: Options): RowKeys {
  const latest = useRef(options);
  /** The row that the focus is on its way to: it may only be drawn after a scroll. */
  const pending = useRef<string | null>(null);
  const returning = useRef(false);
  useEffect(() => {
    const was = latest.current.activeId;
    latest.current = options;
    // A panel that stood in the table's place took the focus with it when it closed.
    if (was !== null && options.activeId === null && document.activeElement === document.body)
      pending.current = was;
    if (pending.current === null) return;
    returning.current = true;
    if (focusRow(options.scroller.current, pending.current)) pending.current = null;
    returning.current = false;
  });

  function handle(event: Key): void {
    const { ids, activeId, setActive, scrollTo, open, tick } = latest.current;
    if (event.defaultPrevented || event.ctrlKey || event.metaKey || event.altKey) return;
    if (ids.length === 0 || isTyping(event.target)) return;
    const at = activeId === null ? -1 : ids.indexOf(activeId);
    const next = destination(event.key, at, ids.length);
    if (next !== null) {
      event.preventDefault();
      const id = ids[next];
      if (id === undefined) return;
      setActive(id);
      scrollTo(next);
      pending.current = id;
    } else if (at >= 0 && activeId !== null && !isControl(event.target)) {
      if (event.key === "Enter") {
        event.preventDefault();
        open(activeId);
      } else if (event.key === " " && tick) {
        event.preventDefault();
        tick(activeId);
      }
    }
  }

  const { everywhere } = options;
  const handler = useRef(handle);
  useEffect(() => {
    handler.current = handle;
  });
  useEffect(() => {
    if (!everywhere) return;
    const listen = (event: globalThis.KeyboardEvent) => {
      if (document.querySelector("[role=dialog], [role=menu]")) return;
      handler.current(event);
    };
    document.addEventListener("keydown", listen);
    return () => document.removeEventListener("keydown", listen);
  }, [everywhere]);

  return {
    onKeyDown: (event) => {
      if (!everywhere) handle(event);
    },
    focused: (id) => {
      if (!returning.current && id !== options.activeId) options.setActive(id);
    },
  };
}

function destination(key: string, at: number, count: number): number | null {
  const within = (index: number) => Math.min(count - 1, Math.max(0, index));
  switch (key) {
    case "j":
    case "ArrowDown":
      return within(at + 1);
    case "k":
    case "ArrowUp":
      return within(at - 1);
    case "PageDown":
      return within(at + PAGE);
    case "PageUp":
      return within(at - PAGE);
    case "Home":
      return 0;
    case "End":
      return count - 1;
    default:
      return null;
  }
}

function focusRow(scroller: HTMLElement | null, id: string): boolean {
  const rows = scroller?.querySelectorAll<HTMLElement>("[data-row-id]") ?? [];
  const row = [...rows].find((candidate) => candidate.dataset.rowId === id);
  row?.focus({ preventScroll: true });
  row?.scrollIntoView({ block: "nearest" });
  // A row that is not displayed cannot take it; it gets its turn once it is.
  return row !== undefined && document.activeElement === row;
}

function isTyping(target: EventTarget | null): boolean {
  return (
    target instanceof Element && target.closest("input, select, textarea, [contenteditable=true]") !== null
  );
}

function isControl(target: EventTarget | null): boolean {
  return target instanceof Element && target.closest("a, button, [role=tab], [role=slider]") !== null;
}
