"use client";

import { Button } from "@/components/ui/button";
import { ApiError, errorMessage } from "@/lib/client/api";
import type { StoredStackup } from "@/lib/schemas/stackup";
import type { StackupEditor } from "./use-stackup-editor";

/** One line that says whether what is on screen is saved, and if not, why. */
export function SaveStatus({ editor }: { editor: StackupEditor }) {
  const { state } = editor.saving;
  const first = editor.issues[0];
  const words =
    state === "saved"
      ? "Saved"
      : state === "saving" || state === "waiting"
        ? "Saving…"
        : state === "blocked"
          ? `Not saved: ${editor.issues.length === 1 ? "1 thing needs" : `${editor.issues.length} things need`} mending`
          : "Not saved";
  return (
    <span className="text-sm">
      <span
        role="status"
        className={state === "failed" || state === "blocked" ? "text-fail" : "text-ink-soft"}
      >
        {words}
      </span>
      {state === "blocked" && first ? (
        <button type="button" className="prose-link ml-2" onClick={() => editor.select(first.layerKey)}>
          Show it
        </button>
      ) : null}
    </span>
  );
}

/** What went wrong with saving, and what can be done; nothing while all is well. */
export function SaveTrouble({ editor }: { editor: StackupEditor }) {
  const { error, retry, state } = editor.saving;
  if (state !== "failed" || error === null) return null;
  const conflict =
    error instanceof ApiError && error.isConflict ? (error.current as StoredStackup | null) : null;
  return (
    <div
      role="alert"
      className="border-fail bg-sheet mb-4 flex flex-wrap items-start gap-3 border-l-4 px-4 py-3 text-sm"
    >
      <div className="min-w-0 flex-1">
        <p>{errorMessage(error)}</p>
        {error instanceof ApiError && error.changed.length > 5 ? (
          <ul className="text-ink-soft mt-1 list-disc pl-5">
            {error.changed.slice(0, 12).map((name) => (
              <li key={name}>{name}</li>
            ))}
            {error.changed.length > 12 ? <li>and {error.changed.length - 12} more</li> : null}
          </ul>
        ) : null}
      </div>
      {conflict ? (
        <>
          <Button onClick={() => editor.take(conflict)}>Take the present one</Button>
          <Button variant="primary" onClick={() => editor.keepMine(conflict.version)}>
            Keep mine
          </Button>
        </>
      ) : (
        <Button onClick={retry}>Save again</Button>
      )}
    </div>
  );
}
