"use client";

import { useCallback, useEffect, useMemo, useReducer, useSyncExternalStore } from "react";
import { type Playback, playbackAfter, startPlayback } from "@/lib/drawings/playback";

export interface PlaybackControl extends Playback {
  /** motion is unwanted: "play" moves on by one step */
  still: boolean;
  play: () => void;
  pause: () => void;
  toggle: () => void;
  seek: (time: number) => void;
  step: (steps: number) => void;
  setRate: (rate: number) => void;
}

/**
 * One cursor for all drawings of a net: give `time` to each as its cursor and `seek` as its onCursor.
 *
 * @param start of the time shown [s]
 * @param end   of it [s]; a change keeps the cursor, if it still lies within
 * @param at    where the cursor begins [s]
 */
export function usePlayback(start: number, end: number, at?: number): PlaybackControl {
  const [state, act] = useReducer(playbackAfter, null, () => startPlayback(start, end, at));
  const still = useStillness();

  useEffect(() => act({ kind: "span", start, end }), [start, end]);

  useEffect(() => {
    if (!state.playing) return;
    let before: number | null = null;
    let frame = requestAnimationFrame(function tick(now) {
      // A tab that slept does not leap.
      if (before !== null) act({ kind: "tick", elapsed: Math.min((now - before) / 1000, 0.1) });
      before = now;
      frame = requestAnimationFrame(tick);
    });
    return () => cancelAnimationFrame(frame);
  }, [state.playing]);

  const pause = useCallback(() => act({ kind: "pause" }), []);
  const seek = useCallback((time: number) => act({ kind: "seek", time }), []);
  const step = useCallback((steps: number) => act({ kind: "step", steps }), []);
  const setRate = useCallback((rate: number) => act({ kind: "rate", rate }), []);
  const play = useCallback(() => act(still ? { kind: "step", steps: 1 } : { kind: "play" }), [still]);
  const toggle = useCallback(() => (state.playing ? pause() : play()), [state.playing, pause, play]);
  return useMemo(
    () => ({ ...state, still, play, pause, toggle, seek, step, setRate }),
    [state, still, play, pause, toggle, seek, step, setRate],
  );
}

const QUERY = "(prefers-reduced-motion: reduce)";

function useStillness(): boolean {
  return useSyncExternalStore(
    (changed) => {
      const query = window.matchMedia?.(QUERY);
      query?.addEventListener("change", changed);
      return () => query?.removeEventListener("change", changed);
    },
    () => window.matchMedia?.(QUERY).matches ?? false,
    () => false,
  );
}
