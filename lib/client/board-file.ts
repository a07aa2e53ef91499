import { useCallback, useEffect, useRef, useState } from "react";
import type { BoardContents, NeighbourRows } from "@/lib/formats/ipc2581/contents";

export type BoardQuestion =
  { kind: "read"; file: Blob; distance_m: number } | { kind: "neighbours"; distance_m: number };

export type BoardAnswer =
  | { kind: "progress"; bytes: number }
  | { kind: "read"; contents: BoardContents }
  | { kind: "neighbours"; neighbours: NeighbourRows }
  | { kind: "refused"; message: string };

/** A board file in this page: not chosen, being read, read, or refused. */
export type BoardState =
  | { phase: "none" }
  | { phase: "reading"; name: string; bytes: number; total: number }
  | { phase: "refused"; name: string; message: string }
  | { phase: "read"; name: string; contents: BoardContents; neighbours: NeighbourRows | null };

/** Up to here a browser reads a file in one go [bytes]. */
export const MAX_BOARD_BYTES = 200 * 1024 * 1024;

export interface BoardReading {
  state: BoardState;
  read: (file: File, distance_m: number) => void;
  /** Looks for neighbours within another distance. */
  search: (distance_m: number) => void;
  forget: () => void;
}

/** Reads a board file in a Web Worker of its own, which ends with the page, a cancel or another file. */
export function useBoardFile(): BoardReading {
  const [state, setState] = useState<BoardState>({ phase: "none" });
  const worker = useRef<Worker | null>(null);
  const stop = useCallback(() => {
    worker.current?.terminate();
    worker.current = null;
  }, []);
  useEffect(() => stop, [stop]);

  const read = useCallback(
    (file: File, distance_m: number) => {
      stop();
      const { name, size } = file;
      if (size > MAX_BOARD_BYTES) {
        const message = `${name} has ${Math.ceil(size / 1024 / 1024)} MB; at most ${MAX_BOARD_BYTES / 1024 / 1024} MB are read. Export only the conductor and drill layers, or pack it with gzip.`;
        setState({ phase: "refused", name, message });
        return;
      }
      setState({ phase: "reading", name, bytes: 0, total: size });
      const started = new Worker(new URL("./board-file-worker.ts", import.meta.url), { type: "module" });
      worker.current = started;
      started.onmessage = ({ data }: MessageEvent<BoardAnswer>) => {
        if (worker.current !== started) return;
        setState((before) => after(before, data, name, size));
        if (data.kind === "refused") stop();
      };
      started.onerror = () => {
        if (worker.current !== started) return;
        stop();
        const message = "The browser could not hold this file. Export only the conductor and drill layers.";
        setState({ phase: "refused", name, message });
      };
      started.postMessage({ kind: "read", file, distance_m } satisfies BoardQuestion);
    },
    [stop],
  );
  const search = useCallback((distance_m: number) => {
    setState((before) => (before.phase === "read" ? { ...before, neighbours: null } : before));
    worker.current?.postMessage({ kind: "neighbours", distance_m } satisfies BoardQuestion);
  }, []);
  const forget = useCallback(() => {
    stop();
    setState({ phase: "none" });
  }, [stop]);
  return { state, read, search, forget };
}

function after(before: BoardState, answer: BoardAnswer, name: string, total: number): BoardState {
  switch (answer.kind) {
    case "progress":
      return { phase: "reading", name, bytes: answer.bytes, total };
    case "read":
      return { phase: "read", name, contents: answer.contents, neighbours: null };
    case "neighbours":
      return before.phase === "read" ? { ...before, neighbours: answer.neighbours } : before;
    case "refused":
      return { phase: "refused", name, message: answer.message };
  }
}
