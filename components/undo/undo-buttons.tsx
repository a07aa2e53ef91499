"use client";

import { Redo2, Undo2 } from "lucide-react";
import { Button } from "@/components/ui/button";
import type { Undo } from "./use-undo";

/** Undo and redo, each saying what it would do. `unsaved`: there is more to take back than the server knows yet. */
export function UndoButtons({ undo, unsaved = false }: { undo: Undo; unsaved?: boolean }) {
  const { undoWords, redoWords } = undo;
  return (
    <>
      <Button
        size="icon"
        aria-label={undoWords ? `Undo: ${undoWords}` : "Undo"}
        title={undoWords ? `Undo: ${undoWords} (Ctrl Z)` : "Nothing to undo"}
        disabled={(undoWords === null && !unsaved) || undo.busy}
        onClick={undo.undo}
      >
        <Undo2 size={15} aria-hidden="true" />
      </Button>
      <Button
        size="icon"
        aria-label={redoWords ? `Redo: ${redoWords}` : "Redo"}
        title={redoWords ? `Redo: ${redoWords} (Ctrl Shift Z)` : "Nothing to redo"}
        disabled={redoWords === null || undo.busy}
        onClick={undo.redo}
      >
        <Redo2 size={15} aria-hidden="true" />
      </Button>
    </>
  );
}
