"use client";

import { Button } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";
import { ApiError, errorMessage } from "@/lib/client/api";
import type { DocEditor } from "./use-doc-editor";

interface Props<Doc extends object, Stored extends { version: number }> {
  editor: DocEditor<Doc, Stored>;
}

/** One word on whether what is on screen is saved, and if not, why. */
export function SaveStatus<Doc extends object, Stored extends { version: number }>({
  editor,
}: Props<Doc, Stored>) {
  const { state } = editor.saving;
  const { issues } = editor;
  const words =
    state === "saved"
      ? "Saved"
      : state === "saving" || state === "waiting"
        ? "Saving…"
        : state === "blocked"
          ? `Not saved: ${issues.length === 1 ? "1 thing needs" : `${issues.length} things need`} mending`
          : "Not saved";
  const wrong = state === "failed" || state === "blocked";
  return (
    <span
      role="status"
      className={`text-sm font-normal whitespace-nowrap ${wrong ? "text-fail" : "text-ink-soft"}`}
    >
      {words}
    </span>
  );
}

/** What went wrong with saving, and what can be done; nothing while all is well. */
export function SaveTrouble<Doc extends object, Stored extends { version: number }>({
  editor,
}: Props<Doc, Stored>) {
  const { error, retry, state } = editor.saving;
  if (state !== "failed" || error === null) return null;
  const conflict = error instanceof ApiError && error.isConflict ? error : null;
  const current = conflict?.current as Stored | null | undefined;
  return (
    <Notice
      tone="refusal"
      actions={
        current ? (
          <>
            <Button onClick={() => editor.take(current)}>Take the present one</Button>
            <Button variant="primary" onClick={() => editor.keepMine(current)}>
              Keep mine
            </Button>
          </>
        ) : (
          <Button onClick={retry}>Save again</Button>
        )
      }
    >
      <p>{errorMessage(error)}</p>
      {conflict && conflict.changed.length > 0 ? (
        <>
          <p className="text-ink-soft mt-1">They changed:</p>
          <ul className="text-ink-soft list-disc pl-5">
            {conflict.changed.slice(0, 8).map((name) => (
              <li key={name}>{name}</li>
            ))}
            {conflict.changed.length > 8 ? <li>and {conflict.changed.length - 8} more</li> : null}
          </ul>
        </>
      ) : null}
    </Notice>
  );
}
