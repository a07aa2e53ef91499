"use client";

import { useEffect, useReducer, useRef } from "react";
import type { Engine } from "./engine";
import type { EngineAnswers, EngineJob } from "./engine-jobs";

export interface EngineState<A> {
  /** of the newest job that was answered; stays while the next one is computed, so that nothing jumps */
  answer: A | null;
  error: string | null;
  busy: boolean;
}

/**
 * The answer to a job, anew whenever the job changes (keep it stable with useMemo; null asks nothing). While one is
 * computed only the newest of those that follow is kept, so that a dragged slider never queues.
 */
export function useEngine<K extends EngineJob["kind"]>(
  engine: Engine,
  job: (EngineJob & { kind: K }) | null,
): EngineState<EngineAnswers[K]> {
  type State = EngineState<EngineAnswers[K]>;
  const [state, set] = useReducer((now: State, change: Partial<State>): State => ({ ...now, ...change }), {
    answer: null,
    error: null,
    busy: job !== null,
  });
  const lane = useRef<{ wanted: (EngineJob & { kind: K }) | null; running: boolean }>({
    wanted: null,
    running: false,
  });

  useEffect(() => {
    const { current } = lane;
    current.wanted = job;
    if (job === null) {
      set({ answer: null, error: null, busy: false });
      return;
    }
    if (current.running) return;
    current.running = true;
    void (async () => {
      while (current.wanted) {
        const asked = current.wanted;
        set({ busy: true });
        try {
          const answer = (await engine.run(asked)) as EngineAnswers[K];
          if (current.wanted) set({ answer, error: null });
        } catch (error) {
          if (current.wanted)
            set({ answer: null, error: error instanceof Error ? error.message : String(error) });
        }
        if (current.wanted === asked) break;
      }
      current.running = false;
      set({ busy: false });
    })();
  }, [engine, job]);

  // A page that is gone wants nothing more.
  useEffect(() => {
    const { current } = lane;
    return () => {
      current.wanted = null;
    };
  }, []);
  return state;
}
