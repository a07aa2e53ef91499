"use client";

import { ArrowDown, ArrowUp, Trash2 } from "lucide-react";
import { type KeyboardEvent, useRef } from "react";
import { useStackupFields } from "@/components/stackup/stackup-fields";
import { Button } from "@/components/ui/button";
import { cn } from "@/components/ui/class-names";
import { Select } from "@/components/ui/select";
import type { BindingMatches } from "@/lib/schemas/binding-matches";
import { bindingDoc, pinRole, pinRoles } from "@/lib/schemas/model";
import type { EditBinding } from "./bindings-tab";
import { counted } from "./class-words";
import { useClassesDesk } from "./classes-desk";
import { LineText } from "./doc-fields";
import { checked } from "./field-words";
import { modelOptions } from "./model-options";

interface Props {
  lines: readonly EditBinding[];
  /** null while they are not known for the list as it stands */
  counts: BindingMatches["lines"] | null;
  selected: string | null;
  onSelect: (key: string | null) => void;
  onChange: (key: string, change: Partial<EditBinding>) => void;
  onMove: (key: string, by: number) => void;
  onRemove: (key: string) => void;
}

const PATTERNS = [
  { field: "referencePattern", label: "Reference" },
  { field: "partNumberPattern", label: "Part number" },
  { field: "pinPattern", label: "Pin" },
  { field: "netPattern", label: "Net" },
] as const;

const ROLE_OPTIONS = pinRoles.map((value) => ({
  value,
  label: value.charAt(0).toUpperCase() + value.slice(1),
}));

/** The ordered rows, edited in place; the arrows move through them, Alt and an arrow move the row. */
export function BindingsTable({ lines, counts, selected, onSelect, onChange, onMove, onRemove }: Props) {
  const { readOnly, refusals } = useStackupFields();
  const { models } = useClassesDesk();
  const body = useRef<HTMLTableSectionElement>(null);
  const names = new Map(models.map(({ lineageId, name }) => [lineageId, name]));

  function onKeyDown(event: KeyboardEvent<HTMLTableRowElement>, index: number) {
    const line = lines[index];
    if (!line || event.ctrlKey || event.metaKey) return;
    const step = { ArrowDown: 1, j: 1, ArrowUp: -1, k: -1 }[event.key];
    const within = event.target !== event.currentTarget;
    if (event.altKey && (event.key === "ArrowDown" || event.key === "ArrowUp") && step && !readOnly) {
      event.preventDefault();
      onMove(line.key, step);
    } else if (!within && step) {
      event.preventDefault();
      body.current?.querySelectorAll<HTMLElement>("tr[data-line]")[index + step]?.focus();
    } else if (!within && event.key === "Enter") {
      event.preventDefault();
      event.currentTarget.querySelector<HTMLElement>("input, select")?.focus();
    } else if (!within && event.key === "Delete" && !readOnly) {
      event.preventDefault();
      onRemove(line.key);
    } else if (within && event.key === "Escape" && !event.defaultPrevented) {
      event.preventDefault();
      event.currentTarget.focus();
    }
  }

  return (
    <div>
      <div className="border-rule-line bg-sheet relative overflow-x-auto border-y">
        <table aria-label="Bindings" className="w-full min-w-[1060px] table-fixed text-left text-sm">
          <colgroup>
            <col className="w-10" />
            <col />
            <col />
            <col className="w-24" />
            <col />
            <col className="w-28" />
            <col className="w-60" />
            <col className="w-36" />
            {readOnly ? null : <col className="w-28" />}
          </colgroup>
          <thead>
            <tr className="text-ink-soft h-8">
              <th scope="col" className="px-2 text-right font-medium">
                <span className="sr-only">Order</span>
              </th>
              {PATTERNS.map(({ field, label }) => (
                <th key={field} scope="col" className="px-2 font-medium">
                  {label}
                </th>
              ))}
              <th scope="col" className="px-2 font-medium">
                Role
              </th>
              <th scope="col" className="px-2 font-medium">
                Model
              </th>
              <th scope="col" className="px-2 font-medium">
                Pins on this board
              </th>
              {readOnly ? null : (
                <th scope="col" className="px-2 font-medium">
                  <span className="sr-only">Acts</span>
                </th>
              )}
            </tr>
          </thead>
          <tbody ref={body}>
            {lines.map((line, index) => {
              const which = `row ${index + 1}`;
              const wrong = PATTERNS.map(({ field }) => refusals[`${line.key}.${field}`]).find(Boolean);
              return (
                <tr
                  key={line.key}
                  data-line
                  tabIndex={line.key === selected || (selected === null && index === 0) ? 0 : -1}
                  aria-current={line.key === selected ? "true" : undefined}
                  onFocus={() => onSelect(line.key)}
                  onClick={() => onSelect(line.key)}
                  onKeyDown={(event) => onKeyDown(event, index)}
                  className={cn(
                    "border-rule-line/60 h-8 border-t align-top -outline-offset-2",
                    line.key === selected ? "bg-copper/10" : "hover:bg-rule-line/30",
                  )}
                >
                  <td className="text-ink-soft px-2 py-1.5 text-right">{index + 1}</td>
                  {PATTERNS.map(({ field, label }) => (
                    <td key={field} className="py-0.5 font-mono text-xs">
                      <LineText
                        inTable
                        address={`${line.key}.${field}`}
                        label={`${label}, ${which}`}
                        value={line[field]}
                        read={(text) => checked(bindingDoc.shape[field], text.trim() === "" ? "*" : text)}
                        onChange={(value) => onChange(line.key, { [field]: value })}
                      />
                      {field === "referencePattern" && wrong ? (
                        <p role="alert" className="text-fail px-2 font-sans">
                          {wrong.reason}
                        </p>
                      ) : null}
                    </td>
                  ))}
                  <td className="px-1 py-0.5">
                    {readOnly ? (
                      <span className="px-1">{line.role}</span>
                    ) : (
                      <Select
                        label={`Role, ${which}`}
                        labelHidden
                        className="hover:border-field-line focus:border-field-line h-7 border-transparent bg-transparent"
                        options={ROLE_OPTIONS}
                        value={line.role}
                        onChange={(event) =>
                          onChange(line.key, { role: checked(pinRole, event.target.value) })
                        }
                      />
                    )}
                  </td>
                  <td className="px-1 py-0.5">
                    {readOnly ? (
                      <span className="block truncate px-1">
                        {line.modelLineageId ? names.get(line.modelLineageId) : "the class’s"}
                      </span>
                    ) : (
                      <Select
                        label={`Model, ${which}`}
                        labelHidden
                        className="hover:border-field-line focus:border-field-line h-7 border-transparent bg-transparent"
                        disabled={line.role === "passive"}
                        placeholder={line.role === "passive" ? "none needed" : "The class’s"}
                        options={modelOptions(models)}
                        value={line.modelLineageId ?? ""}
                        onChange={(event) =>
                          onChange(line.key, { modelLineageId: event.target.value || null })
                        }
                      />
                    )}
                  </td>
                  <td className="px-2 py-1.5">
                    <Count counts={counts?.[index]} known={counts !== null} />
                  </td>
                  {readOnly ? null : (
                    <td className="px-1 py-0 whitespace-nowrap">
                      <Button
                        variant="quiet"
                        size="icon"
                        aria-label={`Move ${which} up`}
                        disabled={index === 0}
                        onClick={() => onMove(line.key, -1)}
                      >
                        <ArrowUp size={14} aria-hidden="true" />
                      </Button>
                      <Button
                        variant="quiet"
                        size="icon"
                        aria-label={`Move ${which} down`}
                        disabled={index === lines.length - 1}
                        onClick={() => onMove(line.key, 1)}
                      >
                        <ArrowDown size={14} aria-hidden="true" />
                      </Button>
                      <Button
                        variant="quiet"
                        size="icon"
                        aria-label={`Remove ${which}`}
                        onClick={() => onRemove(line.key)}
                      >
                        <Trash2 size={14} aria-hidden="true" />
                      </Button>
                    </td>
                  )}
                </tr>
              );
            })}
          </tbody>
        </table>
      </div>
      <p className="text-ink-soft mt-2 text-xs max-sm:hidden print:hidden">
        The first row that fits a pin gives its role; the first that fits and names a model gives its model. *
        is any run of characters, ? is one.
        {readOnly
          ? ""
          : " j and k go through the rows, Enter edits one, Alt and an arrow move it, Delete removes it."}
      </p>
    </div>
  );
}

/** How many pins a row decides: none fit, or an earlier row takes them all, is worth a second look. */
function Count({ counts, known }: { counts: BindingMatches["lines"][number] | undefined; known: boolean }) {
  if (!known || !counts) return <span className="text-ink-soft">counting…</span>;
  if (counts.fits === 0) return <span className="text-near">fits no pin</span>;
  if (counts.takes === 0)
    return (
      <span
        className="text-near"
        title={`${counted(counts.fits, "pin")} fit, and earlier rows decide all of them`}
      >
        all taken above
      </span>
    );
  return (
    <span>
      {counted(counts.takes, "pin")}
      {counts.fits > counts.takes ? (
        <span
          className="text-ink-soft"
          title={`${counted(counts.fits, "pin")} fit; earlier rows decide the others`}
        >
          {" "}
          of {counts.fits.toLocaleString("en")}
        </span>
      ) : null}
    </span>
  );
}
