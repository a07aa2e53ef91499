"use client";

import { useState } from "react";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { isCopper, type StackupTemplate, stackupTemplates, totalThickness } from "@/lib/si/stackup";
import { cn } from "@/components/ui/class-names";
import { shownLength } from "./layer-field-text";
import { replacedWords } from "./replaced-words";
import type { EditStackup } from "./edit-layer";
import { useStackupUnits } from "./stackup-units";

interface Props {
  open: boolean;
  onOpenChange: (open: boolean) => void;
  present: EditStackup;
  onTake: (template: StackupTemplate) => void;
}

/** Stackups to start from, and what taking one would replace. */
export function TemplateDialog({ open, onOpenChange, present, onTake }: Props) {
  const { reader } = useStackupUnits();
  const [chosen, setChosen] = useState<string | null>(null);
  const template = stackupTemplates.find(({ id }) => id === chosen);
  return (
    <Dialog
      wide
      open={open}
      onOpenChange={onOpenChange}
      title="Start from a template"
      description="Symmetric builds in generic glass-epoxy. Every value is assumed until you say where it comes from."
      footer={
        <>
          <Button onClick={() => onOpenChange(false)}>
            {present.layers.length > 0 ? "Keep the present one" : "Not now"}
          </Button>
          <Button
            variant="primary"
            disabled={!template}
            onClick={() => {
              if (template) onTake(template);
              onOpenChange(false);
            }}
          >
            {!template
              ? "Choose a template"
              : present.layers.length > 0
                ? `Replace ${present.layers.length} layers by ${template.layers.length}`
                : `Start with ${template.title}`}
          </Button>
        </>
      }
    >
      <div role="radiogroup" aria-label="Templates" className="grid gap-2 sm:grid-cols-2">
        {stackupTemplates.map((entry) => (
          <label
            key={entry.id}
            className={cn(
              "flex cursor-pointer items-start gap-3 rounded border px-3 py-2 text-sm has-focus-visible:outline-2",
              entry.id === chosen ? "border-copper bg-copper/10" : "border-field-line",
            )}
          >
            <input
              type="radio"
              name="template"
              className="accent-copper mt-1"
              checked={entry.id === chosen}
              onChange={() => setChosen(entry.id)}
            />
            <span className="min-w-0 flex-1">
              <span className="font-medium">{entry.title}</span>
              <span className="text-ink-soft block text-xs">{entry.description}</span>
              <span className="text-ink-soft block text-xs">
                {shownLength(rounded(totalThickness(entry.layers, reader).withoutMask), reader)} over copper
              </span>
              <Order template={entry} />
            </span>
          </label>
        ))}
      </div>
      {present.layers.length > 0 ? <p className="text-sm">{replacedWords(present)}</p> : null}
    </Dialog>
  );
}

/** The copper layers from top to bottom: tall bars are planes. */
function Order({ template }: { template: StackupTemplate }) {
  const copper = template.layers.filter(isCopper);
  const words = copper.map(({ kind }) => (kind === "plane" ? "plane" : "signal")).join(", ");
  return (
    <span className="mt-1.5 flex h-3 items-end gap-0.5" title={words}>
      {copper.map((layer) => (
        <span
          key={layer.name}
          className={cn("bg-copper", layer.kind === "plane" ? "h-3 w-2.5" : "h-1 w-1.5 opacity-80")}
        />
      ))}
      <span className="sr-only">{words}</span>
    </span>
  );
}

function rounded(quantity: { value: string; unit: string }) {
  return { ...quantity, value: String(Number(Number(quantity.value).toFixed(3))) };
}
