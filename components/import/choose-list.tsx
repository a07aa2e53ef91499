"use client";

import { FileUp } from "lucide-react";
import { type DragEvent, useEffect, useId, useRef, useState } from "react";
import { Button } from "@/components/ui/button";
import { cn } from "@/components/ui/class-names";
import { TextArea } from "@/components/ui/input";
import { Select } from "@/components/ui/select";
import { type ListKind, listKinds } from "@/lib/schemas/import-list";
import { KIND_HINTS, KIND_LABELS } from "./list-words";

interface Props {
  busy: boolean;
  error: string | null;
  onList: (list: { body: Blob | string; name: string; kind: ListKind | null }) => void;
}

const MAX_MB = 50;

/** The list itself: a file chosen or dropped, or cells pasted from a spreadsheet. */
export function ChooseList({ busy, error, onList }: Props) {
  const [kind, setKind] = useState<ListKind | "">("");
  const [text, setText] = useState("");
  const [over, setOver] = useState(false);
  const [refusal, setRefusal] = useState<string | null>(null);
  const inputId = useId();
  const send = (list: { body: Blob | string; name: string }) =>
    onList({ ...list, kind: kind === "" ? null : kind });

  function take(file: File | undefined) {
    if (!file) return;
    if (file.size > MAX_MB * 1024 * 1024) {
      setRefusal(
        `${file.name} has ${Math.ceil(file.size / 1024 / 1024)} MB; at most ${MAX_MB} MB are taken at once. Split it.`,
      );
      return;
    }
    setRefusal(null);
    send({ body: file, name: file.name });
  }
  function drop(event: DragEvent) {
    event.preventDefault();
    setOver(false);
    take(event.dataTransfer.files[0]);
  }

  // Cells pasted anywhere on the page are meant for this.
  const latest = useRef(send);
  useEffect(() => {
    latest.current = send;
  });
  useEffect(() => {
    const paste = (event: ClipboardEvent) => {
      if (event.target instanceof HTMLElement && event.target.closest("input, textarea, select")) return;
      const pasted = event.clipboardData?.getData("text/plain") ?? "";
      if (pasted.includes("\n") || pasted.includes("\t"))
        latest.current({ body: pasted, name: "Pasted list" });
    };
    document.addEventListener("paste", paste);
    return () => document.removeEventListener("paste", paste);
  }, []);

  const said = refusal ?? error;
  return (
    <div className="flex flex-col gap-6">
      <Select
        label="Kind of list"
        fieldClassName="max-w-md"
        value={kind}
        onChange={(event) => setKind(listKinds.find((one) => one === event.target.value) ?? "")}
        placeholder="Told by its header"
        options={listKinds.map((value) => ({ value, label: KIND_LABELS[value] }))}
        hint={kind === "" ? "Section list, net list, parts list or neighbour list." : KIND_HINTS[kind]}
      />
      <div className="grid gap-6 lg:grid-cols-2">
        <div
          onDragOver={(event) => {
            event.preventDefault();
            setOver(true);
          }}
          onDragLeave={() => setOver(false)}
          onDrop={drop}
          className={cn(
            "border-field-line flex min-h-56 flex-col items-start justify-center gap-3 border border-dashed px-6 py-8",
            over && "border-copper bg-copper/10",
          )}
        >
          <FileUp size={20} aria-hidden="true" className="text-copper" />
          <label htmlFor={inputId} className="font-medium">
            Drop a file here, or choose one
          </label>
          <input
            id={inputId}
            type="file"
            accept=".csv,.tsv,.txt,text/csv,text/tab-separated-values,text/plain"
            disabled={busy}
            className="file:border-field-line file:bg-sheet file:text-ink hover:file:border-ink max-w-full text-sm file:mr-3 file:h-8 file:cursor-pointer file:rounded file:border file:border-solid file:px-3 file:text-sm file:font-medium"
            onChange={(event) => {
              take(event.target.files?.[0]);
              // The same file, mended, can be chosen again.
              event.target.value = "";
            }}
          />
          <p className="text-ink-soft max-w-prose text-sm">
            CSV or tab-separated text, to {MAX_MB} MB. Comma, semicolon and tab, decimal comma and point,
            UTF-8, UTF-16 and Windows-1252 are recognised.
          </p>
        </div>
        <form
          className="flex flex-col items-start gap-3"
          onSubmit={(event) => {
            event.preventDefault();
            send({ body: text, name: "Pasted list" });
          }}
        >
          <TextArea
            label="Or paste from a spreadsheet"
            fieldClassName="w-full"
            className="font-mono text-xs"
            rows={8}
            placeholder={"net\tfrom\tto\tlayer\twidth_mm\tlength_mm"}
            spellCheck={false}
            value={text}
            onChange={(event) => setText(event.target.value)}
          />
          <Button type="submit" variant="primary" busy={busy} disabled={text.trim() === ""}>
            Read the paste
          </Button>
        </form>
      </div>
      {busy ? (
        <p role="status" className="text-ink-soft text-sm">
          Reading the list…
        </p>
      ) : null}
      {said ? (
        <p role="alert" className="text-fail max-w-prose text-sm">
          {said}
        </p>
      ) : null}
    </div>
  );
}
