"use client";

import { useMutation, useQueryClient } from "@tanstack/react-query";
import { useMemo, useState } from "react";
import { Button } from "@/components/ui/button";
import { CopyButton } from "@/components/ui/copy-button";
import { Dialog } from "@/components/ui/dialog";
import { TextArea } from "@/components/ui/input";
import { toast } from "@/components/ui/toast";
import { errorMessage } from "@/lib/client/api";
import { createModel, modelsKey, putModel } from "@/lib/client/models";
import { undoKey } from "@/lib/client/undo";
import { counted } from "./class-words";
import { useClassesDesk } from "./classes-desk";
import { type ModelRow, readModelRows, writeModelRows } from "./model-rows";
import { PastePreview } from "./paste-preview";

/** Models from the rows of a spreadsheet: what each row would do, and nothing until one confirms. */
export function PasteModels({ onClose }: { onClose: () => void }) {
  const { projectId, revision, models } = useClassesDesk();
  const client = useQueryClient();
  const [text, setText] = useState("");
  const { rows, error } = useMemo(() => read(text, () => readModelRows(text, models)), [text, models]);
  const good = rows.filter(({ doc }) => doc !== null);
  const take = useMutation({
    mutationFn: async () => {
      const refused: string[] = [];
      for (const { row, name, doc, replaces } of good) {
        if (!doc) continue;
        try {
          await (replaces
            ? putModel(projectId, replaces.id, replaces.version, { ...doc, name: replaces.name })
            : createModel(projectId, doc));
        } catch (reason) {
          refused.push(`Row ${row}, ${name}: ${errorMessage(reason)}`);
        }
      }
      return refused;
    },
    onSuccess: async (refused) => {
      await client.invalidateQueries({ queryKey: modelsKey(projectId, revision) });
      void client.invalidateQueries({ queryKey: undoKey(projectId) });
      const taken = good.length - refused.length;
      if (taken > 0) toast.success(`${counted(taken, "model")} taken; undo takes them back one by one`);
      for (const reason of refused) toast.error(reason);
      if (refused.length === 0) onClose();
    },
  });
  const bad = rows.length - good.length;

  return (
    <Dialog
      wide
      open
      onOpenChange={(open) => (open ? undefined : onClose())}
      title="Paste models"
      description="Rows copied from a spreadsheet, one row a model, with a header row or in the order of Copy the present models. Bare numbers are V, Ω, ns and pF. A row with the name of a present model changes it."
      footer={
        <>
          {models.length > 0 ? (
            <CopyButton text={() => writeModelRows(models)} label="Copy the present models" />
          ) : null}
          <Button onClick={onClose}>Take none</Button>
          <Button
            variant="primary"
            disabled={good.length === 0}
            busy={take.isPending}
            onClick={() => take.mutate()}
          >
            {good.length === 0
              ? "Take the models"
              : `Take ${counted(good.length, "model")}${bad > 0 ? `, leave out ${bad}` : ""}`}
          </Button>
        </>
      }
    >
      <TextArea
        label="Rows"
        rows={5}
        className="font-mono text-xs"
        value={text}
        onChange={(event) => setText(event.target.value)}
        error={error}
      />
      {rows.length > 0 ? <PastePreview rows={rows} name={(row) => row.name} says={says} /> : null}
    </Dialog>
  );
}

function says({ doc, replaces }: ModelRow): string {
  if (!doc) return "";
  const parts = [doc.driver ? "drives" : null, doc.receiver ? "receives" : null]
    .filter(Boolean)
    .join(" and ");
  return `${replaces ? "changes the present model" : "new"}, ${parts}, ${doc.origin}`;
}

/** Reads as one types; what is no table says so below the field. */
export function read<Row>(text: string, act: () => Row[]): { rows: Row[]; error: string | null } {
  if (text.trim() === "") return { rows: [], error: null };
  try {
    return { rows: act(), error: null };
  } catch (reason) {
    return { rows: [], error: reason instanceof Error ? reason.message : "This could not be read." };
  }
}
