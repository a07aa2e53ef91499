"use client";

import { useState } from "react";
import { Button } from "@/components/ui/button";
import type { ImportMode, ImportPreview } from "@/lib/schemas/import-list";
import { effectWords, replaceWords, rows } from "./list-words";

interface Props {
  preview: ImportPreview;
  /** Still reading with the last change of the columns. */
  reading: boolean;
  busy: boolean;
  onConfirm: (mode: ImportMode) => void;
  onDrop: () => void;
}

/** What would come in, in numbers, and the choice to add or to replace; nothing is written before. */
export function ConfirmList({ preview, reading, busy, onConfirm, onDrop }: Props) {
  const [mode, setMode] = useState<ImportMode>("merge");
  const { good, badRows, total, missingFields, effect } = preview;
  const ready = good > 0 && missingFields.length === 0;
  // Into an empty draft there is nothing to choose.
  const mayReplace = effect.present + effect.absent > 0;
  const choices: { value: ImportMode; label: string; hint: string }[] = [
    {
      value: "merge",
      label: "Add to what is there",
      hint:
        effect.things === "neighbour rows"
          ? "Rows of the nets that the list names are put in place of the former ones; the rest stays."
          : `What is there by the same name takes the new routing and keeps its history, class and decisions; other ${effect.things} stay.`,
    },
    { value: "replace", label: "Replace what is there", hint: replaceWords(effect) },
  ];
  return (
    <section
      aria-labelledby="result"
      className="border-copper bg-sheet flex flex-col gap-4 border-l-2 px-4 py-3"
    >
      <div>
        <h2 id="result" className="text-lg font-semibold" aria-live="polite">
          {missingFields.length > 0
            ? "Columns are missing"
            : `${good.toLocaleString("en")} of ${rows(total)} can be taken`}
        </h2>
        <p className="text-sm">{ready ? effectWords(effect) : "Choose the columns below, then import."}</p>
      </div>
      {mayReplace ? (
        <fieldset className="flex flex-col gap-2">
          <legend className="sr-only">Add or replace</legend>
          {choices.map(({ value, label, hint }) => (
            <label key={value} className="flex items-start gap-2 text-sm">
              <input
                type="radio"
                name="mode"
                className="accent-copper mt-1"
                checked={mode === value}
                onChange={() => setMode(value)}
              />
              <span>
                <span className="font-medium">{label}</span>
                <span className="text-ink-soft block max-w-prose text-xs">{hint}</span>
              </span>
            </label>
          ))}
        </fieldset>
      ) : null}
      <div className="flex flex-wrap gap-2">
        <Button variant="primary" busy={busy || reading} disabled={!ready} onClick={() => onConfirm(mode)}>
          {badRows > 0
            ? `Import ${rows(good)}, leave out ${badRows.toLocaleString("en")}`
            : `Import ${rows(good)}`}
        </Button>
        <Button onClick={onDrop} disabled={busy || reading}>
          Drop this list
        </Button>
      </div>
    </section>
  );
}
