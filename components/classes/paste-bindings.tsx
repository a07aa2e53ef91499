"use client";

import { useMemo, useState } from "react";
import { Button } from "@/components/ui/button";
import { CopyButton } from "@/components/ui/copy-button";
import { Dialog } from "@/components/ui/dialog";
import { TextArea } from "@/components/ui/input";
import type { BindingDoc } from "@/lib/schemas/model";
import { readBindingRows, writeBindingRows } from "./binding-rows";
import { counted } from "./class-words";
import { useClassesDesk } from "./classes-desk";
import { read } from "./paste-models";
import { PastePreview } from "./paste-preview";

interface Props {
  present: readonly BindingDoc[];
  onTake: (added: BindingDoc[]) => void;
  onClose: () => void;
}

/** Bindings from the rows of a spreadsheet, tried before the present ones or after them. */
export function PasteBindings({ present, onTake, onClose }: Props) {
  const { models } = useClassesDesk();
  const [text, setText] = useState("");
  const { rows, error } = useMemo(() => read(text, () => readBindingRows(text, models)), [text, models]);
  const good = rows.flatMap(({ doc }) => (doc ? [doc] : []));
  const bad = rows.length - good.length;
  return (
    <Dialog
      wide
      open
      onOpenChange={(open) => (open ? undefined : onClose())}
      title="Paste bindings"
      description="Rows copied from a spreadsheet: reference, part number, pin, net, role, model. An empty pattern is any. They come after the present ones and can be moved."
      footer={
        <>
          {present.length > 0 ? (
            <CopyButton text={() => writeBindingRows(present, models)} label="Copy the present rows" />
          ) : null}
          <Button onClick={onClose}>Take none</Button>
          <Button
            variant="primary"
            disabled={good.length === 0}
            onClick={() => {
              onTake(good);
              onClose();
            }}
          >
            {good.length === 0
              ? "Take the rows"
              : `Take ${counted(good.length, "row")}${bad > 0 ? `, leave out ${bad}` : ""}`}
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
      {rows.length > 0 ? (
        <PastePreview
          rows={rows}
          name={(row) => row.words}
          says={({ doc }) =>
            doc
              ? `${doc.role}${doc.modelLineageId ? `, ${models.find(({ lineageId }) => lineageId === doc.modelLineageId)?.name ?? ""}` : ""}`
              : ""
          }
        />
      ) : null}
    </Dialog>
  );
}
