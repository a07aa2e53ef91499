"use client";

import { useRef, useState } from "react";
import type { ImpedanceRow } from "./impedance-rows";
import { NO_TRIAL, type TrialAddress } from "./trial-address";
import type { ImpedanceState } from "./use-impedance-state";

/** A width to begin with where neither class nor target gives one [m]; common practice, no source. */
const USUAL_WIDTH = 0.15e-3;

/**
 * What is tried in the panel, kept in the address, with a history of its own. A drag is one step of it, from where the
 * hand took hold to where it let go.
 */
export function useTrial(row: ImpedanceRow, state: ImpedanceState) {
  const { set } = state;
  const now = Object.fromEntries(
    Object.keys(NO_TRIAL).map((key) => [key, state[key as keyof TrialAddress]]),
  ) as unknown as TrialAddress;
  const [past, setPast] = useState<TrialAddress[]>([]);
  const [future, setFuture] = useState<TrialAddress[]>([]);
  const [dragging, setDragging] = useState(false);
  const held = useRef<TrialAddress | null>(null);

  const own = { width: row.width ?? (row.meets?.ok ? row.meets.value.dimension : USUAL_WIDTH), gap: row.gap };

  function remember(before: TrialAddress): void {
    setPast((steps) => [...steps, before].slice(-100));
    setFuture([]);
  }
  return {
    shape: { width: now.width ?? own.width, gap: own.gap === null ? null : (now.gap ?? own.gap) },
    change: now,
    isTried: Object.values(now).some((value) => value !== null),
    dragging,
    /** While a slider is held. */
    drag(part: Partial<TrialAddress>): void {
      held.current ??= now;
      setDragging(true);
      void set(part);
    },
    /** The slider is let go of. */
    settle(): void {
      if (held.current) remember(held.current);
      held.current = null;
      setDragging(false);
    },
    /** At once: a number that was typed, a button. */
    put(part: Partial<TrialAddress>): void {
      remember(held.current ?? now);
      held.current = null;
      setDragging(false);
      void set(part);
    },
    undo: step(past, setPast, setFuture),
    redo: step(future, setFuture, setPast),
  };

  /** null where there is nothing to go back or forth to */
  function step(
    from: TrialAddress[],
    setFrom: (steps: TrialAddress[]) => void,
    setOther: (change: (steps: TrialAddress[]) => TrialAddress[]) => void,
  ): (() => void) | null {
    const to = from.at(-1);
    if (!to) return null;
    return () => {
      setFrom(from.slice(0, -1));
      setOther((steps) => [...steps, now]);
      void set(to);
    };
  }
}

export type TrialState = ReturnType<typeof useTrial>;
