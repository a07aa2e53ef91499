"use client";

import { useMutation, useQuery, useQueryClient } from "@tanstack/react-query";
import { useEffect, useRef } from "react";
import { toast } from "@/components/ui/toast";
import { errorMessage } from "@/lib/client/api";
import { redoEdit, undoEdit, undoKey, undoQuery } from "@/lib/client/undo";

interface Options {
  projectId: string;
  enabled: boolean;
  /** Saves what waits; false where it cannot be saved, and then nothing is undone. */
  flush: () => Promise<boolean>;
  /** Reads anew what may have changed. */
  reload: () => Promise<unknown>;
}

export type Undo = ReturnType<typeof useUndo>;

/** Undo and redo of this person's edits of the draft, by button and by Ctrl+Z, Ctrl+Shift+Z. */
export function useUndo({ projectId, enabled, flush, reload }: Options) {
  const client = useQueryClient();
  const { data } = useQuery({ ...undoQuery(projectId), enabled });
  const { mutate, isPending } = useMutation({
    mutationFn: async (direction: "undo" | "redo") => {
      if (!(await flush()))
        throw new Error("There are changes that are not saved yet. Mend or give them up first.");
      const moved = await (direction === "undo" ? undoEdit(projectId) : redoEdit(projectId));
      await reload();
      return { direction, moved };
    },
    onSuccess: ({ direction, moved }) => {
      toast.success(`${direction === "undo" ? "Taken back" : "Brought back"}: ${moved.summary}`);
    },
    onError: (error) => toast.error(errorMessage(error)),
    onSettled: () => client.invalidateQueries({ queryKey: undoKey(projectId) }),
  });

  const act = useRef(mutate);
  useEffect(() => {
    act.current = mutate;
  });
  useEffect(() => {
    if (!enabled) return;
    const listen = (event: KeyboardEvent) => {
      if (event.key.toLowerCase() !== "z" || !(event.ctrlKey || event.metaKey) || event.altKey) return;
      const target = event.target as HTMLElement | null;
      // Within a text that is being typed the browser's own undo goes first.
      if (target?.closest("[data-typing], textarea, [contenteditable=true], [role=dialog]")) return;
      event.preventDefault();
      act.current(event.shiftKey ? "redo" : "undo");
    };
    document.addEventListener("keydown", listen);
    return () => document.removeEventListener("keydown", listen);
  }, [enabled]);

  return {
    undo: () => mutate("undo"),
    redo: () => mutate("redo"),
    undoWords: data?.undo ?? null,
    redoWords: data?.redo ?? null,
    busy: isPending,
  };
}
