"use client";

import { Select } from "@/components/ui/select";
import { type Origin, origins } from "@/lib/schemas/common";
import { processDoc, type ProcessDoc, usualProcess } from "@/lib/schemas/process";
import { parseQuantity } from "@/lib/si/units";
import { shownLength } from "./layer-field-text";
import { FieldText, useStackupFields } from "./stackup-fields";
import { useStackupUnits } from "./stackup-units";

const PERCENTS = [
  { field: "widthPercent", label: "Trace width", hint: "finished foot width" },
  { field: "copperPercent", label: "Copper", hint: "where a layer names none" },
  { field: "dielectricPercent", label: "Core and prepreg", hint: "where a layer names none" },
  { field: "dkPercent", label: "Dk", hint: "all dielectrics" },
  { field: "maskPercent", label: "Solder mask", hint: "its thickness" },
] as const;

const LEAST = [
  { field: "minWidth", label: "Least width" },
  { field: "minGap", label: "Least gap" },
] as const;

const DISTRIBUTIONS = [
  { value: "normal", label: "normal, 3 σ" },
  { value: "uniform", label: "uniform" },
] as const;

interface Props {
  process: ProcessDoc | undefined;
  onChange: (process: ProcessDoc) => void;
}

/** What the fabricator's process holds: the spread of every impedance, its yield and its warnings rest on it. */
export function ProcessFields({ process, onChange }: Props) {
  const { readOnly } = useStackupFields();
  const { reader } = useStackupUnits();
  const present = process ?? usualProcess;
  const change = (part: Partial<ProcessDoc>) => onChange({ ...present, ...part });
  return (
    <section aria-labelledby="process" className="border-rule-line mt-8 border-t pt-3">
      <h2 id="process" className="text-base font-semibold">
        Fabricator’s process
      </h2>
      <p className="text-ink-soft mt-1 mb-3 max-w-prose text-sm">
        {process
          ? "The spread and yield of every controlled impedance rest on these tolerances."
          : "Assumed as usual in the trade until a fabricator’s own are entered. The spread and yield of every controlled impedance rest on these tolerances."}
      </p>
      <div className="grid grid-cols-2 gap-x-4 gap-y-3 sm:grid-cols-3 lg:grid-cols-5">
        {PERCENTS.map(({ field, label, hint }) => (
          <FieldText
            key={field}
            address={`process.${field}`}
            label={`${label} ±`}
            hint={hint}
            typed={present[field]}
            shown={`${present[field]} %`}
            commit={(text) => change({ [field]: readPercent(text) })}
          />
        ))}
        {LEAST.map(({ field, label }) => (
          <FieldText
            key={field}
            address={`process.${field}`}
            label={label}
            hint="empty: by the copper"
            typed={present[field] ? shownLength(present[field], reader) : ""}
            shown={present[field] ? shownLength(present[field], reader) : ""}
            placeholder="by the copper"
            commit={(text) => {
              const value = text.trim() === "" ? null : parseQuantity(text, "length", reader);
              const parsed = processDoc.shape[field].safeParse(value);
              if (!parsed.success)
                throw new Error(parsed.error.issues[0]?.message ?? "This is not a length.");
              change({ [field]: parsed.data });
            }}
          />
        ))}
        {readOnly ? (
          <>
            <Shown label="Distribution" value={present.distribution} />
            <Shown label="Origin of these values" value={present.origin} />
          </>
        ) : (
          <>
            <Select
              label="Distribution"
              value={present.distribution}
              options={DISTRIBUTIONS}
              onChange={(event) => change({ distribution: event.target.value as ProcessDoc["distribution"] })}
            />
            <Select
              label="Origin of these values"
              value={present.origin}
              options={origins.map((value) => ({ value, label: value }))}
              onChange={(event) => change({ origin: event.target.value as Origin })}
            />
          </>
        )}
      </div>
    </section>
  );
}

function Shown({ label, value }: { label: string; value: string }) {
  return (
    <div className="flex flex-col gap-1 text-sm">
      <span className="font-medium">{label}</span>
      <span className="text-ink-soft">{value}</span>
    </div>
  );
}

/** @throws Error with the sentence to show */
function readPercent(text: string): string {
  const number = text.trim().replace(/\s*%$/, "").replace(/^±\s*/, "").replace(",", ".");
  const parsed = processDoc.shape.widthPercent.safeParse(number);
  if (!parsed.success) throw new Error(`'${text.trim().slice(0, 40)}' is not a tolerance. Write 0 to 50 %.`);
  return parsed.data;
}
