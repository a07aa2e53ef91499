"use client";

import { useId, useState } from "react";
import { Button } from "@/components/ui/button";
import { Progress } from "@/components/ui/progress";
import { type BoardReading, MAX_BOARD_BYTES } from "@/lib/client/board-file";
import type { ListKind } from "@/lib/schemas/import-list";
import { BoardPreview } from "./board-preview";

interface Props {
  board: BoardReading;
  /** A list is on its way to the server. */
  busy: boolean;
  onList: (list: { body: string; name: string; kind: ListKind }) => void;
}

const KB = 1024;
const DISTANCE_M = 0.5e-3;

/** A whole board in one file: read in the browser, then taken over list by list, each with its own preview. */
export function BoardFilePanel({ board, busy, onList }: Props) {
  const inputId = useId();
  const [distance, setDistance] = useState(DISTANCE_M);
  const { state } = board;
  return (
    <section aria-labelledby="board-file" className="flex flex-col gap-3">
      <h2 id="board-file" className="text-lg font-semibold">
        Board file (IPC-2581)
      </h2>
      <div className="flex flex-wrap items-center gap-3">
        <label htmlFor={inputId} className="text-sm font-medium">
          Choose a board file
        </label>
        <input
          id={inputId}
          type="file"
          accept=".xml,.cvg,.gz,application/xml,text/xml,application/gzip"
          disabled={busy || state.phase === "reading"}
          className="file:border-field-line file:bg-sheet file:text-ink hover:file:border-ink max-w-full text-sm file:mr-3 file:h-8 file:cursor-pointer file:rounded file:border file:border-solid file:px-3 file:text-sm file:font-medium"
          onChange={(event) => {
            const file = event.target.files?.[0];
            // The same file, mended, can be chosen again.
            event.target.value = "";
            if (file) board.read(file, distance);
          }}
        />
      </div>
      <p className="text-ink-soft max-w-prose text-sm">
        Revision A to C, as XML or packed with gzip, to {MAX_BOARD_BYTES / KB / KB} MB. It is read in this
        browser; its parts, sections and neighbours are then taken over one list after the other.
      </p>
      {state.phase === "reading" ? (
        <Progress
          label={`Reading ${state.name}`}
          done={Math.round(state.bytes / KB)}
          total={Math.max(1, Math.round(state.total / KB))}
          noun="KB"
          onCancel={board.forget}
        />
      ) : null}
      {state.phase === "refused" ? (
        <p role="alert" className="text-fail max-w-prose text-sm">
          {state.name}: {state.message}
        </p>
      ) : null}
      {state.phase === "read" ? (
        <>
          <BoardPreview
            {...state}
            busy={busy}
            distance={distance}
            onDistance={(distance_m) => {
              setDistance(distance_m);
              board.search(distance_m);
            }}
            onList={onList}
          />
          <Button className="self-start" onClick={board.forget} disabled={busy}>
            Put this file away
          </Button>
        </>
      ) : null}
    </section>
  );
}
