"use client";

import { useCallback, useSyncExternalStore } from "react";

const PREFIX = "draft:";
/** Where the browser keeps nothing for this tab, at least this page does. */
const here = new Map<string, string>();
const listeners = new Set<() => void>();

/**
 * A text that is being written, kept in this tab until it is sent: leaving the page and coming back finds it.
 *
 * @param key of the thing that it is written about
 */
export function useDraftText(key: string): [text: string, setText: (text: string) => void] {
  const text = useSyncExternalStore(subscribe, () => read(key), nothing);
  const setText = useCallback((next: string) => write(key, next), [key]);
  return [text, setText];
}

/** Forgets every text: whoever comes next is somebody else. */
export function forgetDraftTexts(): void {
  here.clear();
  try {
    sessionStorage.clear();
  } catch {
    // Nothing was kept.
  }
}

function subscribe(listener: () => void): () => void {
  listeners.add(listener);
  return () => listeners.delete(listener);
}

function read(key: string): string {
  try {
    return sessionStorage.getItem(PREFIX + key) ?? here.get(key) ?? "";
  } catch {
    return here.get(key) ?? "";
  }
}

function write(key: string, text: string): void {
  here.delete(key);
  try {
    if (text === "") sessionStorage.removeItem(PREFIX + key);
    else sessionStorage.setItem(PREFIX + key, text);
  } catch {
    here.set(key, text);
  }
  for (const listener of listeners) listener();
}

const nothing = () => "";
