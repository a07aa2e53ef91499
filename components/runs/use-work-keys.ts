"use client";

import { useEffect, useRef } from "react";

export interface WorkKeys {
  open: () => void;
  flag: () => void;
  waive: () => void;
  tick: () => void;
  search: () => void;
  help: () => void;
  close: () => void;
}

/** f, w, x, /, ? and Enter anywhere on the page, except in a field, on a control, or while a dialog is open. */
export function useWorkKeys(keys: WorkKeys): void {
  const latest = useRef(keys);
  useEffect(() => {
    latest.current = keys;
  });
  useEffect(() => {
    const listen = (event: KeyboardEvent) => {
      if (event.ctrlKey || event.metaKey || event.altKey) return;
      if (document.querySelector("[role=dialog], [role=menu]") || isTyping(event.target)) return;
      const act = ACTS[event.key];
      if (!act || (event.key === "Enter" && isControl(event.target))) return;
      event.preventDefault();
      latest.current[act]();
    };
    document.addEventListener("keydown", listen);
    return () => document.removeEventListener("keydown", listen);
  }, []);
}

const ACTS: Readonly<Record<string, keyof WorkKeys>> = {
  Enter: "open",
  f: "flag",
  w: "waive",
  x: "tick",
  "/": "search",
  "?": "help",
  Escape: "close",
};

const isTyping = (target: EventTarget | null) =>
  target instanceof Element && target.closest("input, select, textarea, [contenteditable=true]") !== null;
const isControl = (target: EventTarget | null) =>
  target instanceof Element && target.closest("a, button, [role=tab], summary") !== null;
