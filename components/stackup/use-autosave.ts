"use client";

import { useCallback, useEffect, useRef, useState } from "react";

export type SaveState = "saved" | "waiting" | "saving" | "failed" | "blocked";

interface Options {
  /** What would be saved, as text that differs when it differs. */
  content: string;
  /** True where it must not be saved as it is, or where a field holds what could not be read. */
  blocked: boolean;
  /** Saves what is on screen now. */
  save: () => Promise<void>;
  /** Content and blocked as they are at this moment, where that may be ahead of what was drawn last. */
  read?: () => { content: string; blocked: boolean };
  /** The editor left the screen; the promise tells whether all of it was saved. */
  left?: (saved: Promise<boolean>) => void;
  /** Quiet time before a save [ms] */
  delay?: number;
}

export interface Autosave {
  state: SaveState;
  error: unknown;
  /** True where something on screen is not on the server yet. */
  unsaved: () => boolean;
  /** Saves at once what waits; true when nothing is left to save. */
  flush: () => Promise<boolean>;
  /** Tries again what failed. */
  retry: () => void;
  /** Says that this content is what the server has. */
  settle: (content: string) => void;
}

/**
 * Saves a document a moment after its last change and when its editor leaves the screen, one request at a time, and
 * never loses the latest state.
 */
export function useAutosave({ content, blocked, save, read, left, delay = 700 }: Options): Autosave {
  const [saved, setSaved] = useState(content);
  const [busy, setBusy] = useState(false);
  const [failure, setFailure] = useState<{ content: string; error: unknown } | null>(null);
  const latest = useRef({ content, blocked, save, saved, read, left });
  const running = useRef<Promise<boolean> | null>(null);
  useEffect(() => {
    latest.current = { content, blocked, save, saved, read, left };
  });

  const flush = useCallback(async (): Promise<boolean> => {
    while (running.current) await running.current;
    const { save: act, saved: known } = latest.current;
    const { content: sending, blocked: held } = present(latest.current);
    if (held) return false;
    if (sending === known) return true;
    const work = (async () => {
      setBusy(true);
      try {
        await act();
        latest.current.saved = sending;
        setSaved(sending);
        setFailure(null);
        return true;
      } catch (error) {
        setFailure({ content: sending, error });
        return false;
      } finally {
        running.current = null;
        setBusy(false);
      }
    })();
    running.current = work;
    return work;
  }, []);

  useEffect(
    () => () => {
      const { left: tell } = latest.current;
      const work = flush();
      tell?.(work);
    },
    [flush],
  );

  const dirty = content !== saved;
  // The same content is not sent again by itself: it failed, and somebody has to say what shall happen.
  const failed = failure !== null && failure.content === content && dirty;
  const conflicting = failure !== null && dirty && isConflict(failure.error);
  useEffect(() => {
    if (!dirty || blocked || busy || failed || conflicting) return;
    const timer = setTimeout(() => void flush(), delay);
    return () => clearTimeout(timer);
  }, [content, dirty, blocked, busy, failed, conflicting, delay, flush]);

  const warned = dirty || blocked;
  useEffect(() => {
    if (!warned) return;
    const warn = (event: BeforeUnloadEvent) => event.preventDefault();
    window.addEventListener("beforeunload", warn);
    return () => window.removeEventListener("beforeunload", warn);
  }, [warned]);

  const unsaved = useCallback(() => {
    const { content: now, blocked: held } = present(latest.current);
    return held || now !== latest.current.saved || running.current !== null;
  }, []);
  const retry = useCallback(() => {
    setFailure(null);
    void flush();
  }, [flush]);
  const settle = useCallback((settled: string) => {
    latest.current.saved = settled;
    setSaved(settled);
    setFailure(null);
  }, []);

  const state: SaveState = busy
    ? "saving"
    : blocked
      ? "blocked"
      : !dirty
        ? "saved"
        : failed || conflicting
          ? "failed"
          : "waiting";
  const error = state === "failed" ? (failure?.error ?? null) : null;
  return { state, error, unsaved, flush, retry, settle };
}

function present({ read, content, blocked }: Pick<Options, "read" | "content" | "blocked">) {
  return read?.() ?? { content, blocked };
}

/** Only its maker decides between two versions: further typing must not. */
function isConflict(error: unknown): boolean {
  return typeof error === "object" && error !== null && "isConflict" in error && error.isConflict === true;
}
