"use client";

import { Checkbox } from "@/components/ui/checkbox";
import type { Quantity } from "@/lib/si/units";
import { QuantityText } from "./doc-fields";
import type { ModelField, PartValues } from "./edit-model";

interface Props {
  title: string;
  about: string;
  part: "driver" | "receiver";
  fields: readonly ModelField[];
  values: PartValues | null;
  readOnly: boolean;
  onChange: (values: PartValues | null) => void;
}

/** One part of a model: its numbers, three in a row where they are corners of one quantity. */
export function ModelPart({ title, about, part, fields, values, readOnly, onChange }: Props) {
  function set(field: ModelField, value: Quantity | null) {
    const { [field.key]: _gone, ...others } = values ?? {};
    onChange(value ? { ...others, [field.key]: value } : others);
  }
  const rows = rowsOf(fields);
  return (
    <section aria-label={title}>
      <Checkbox
        label={<span className="font-semibold">{title}</span>}
        hint={about}
        checked={values !== null}
        disabled={readOnly}
        onCheckedChange={(on) => onChange(on ? {} : null)}
      />
      {values ? (
        <div className="mt-3 flex flex-col gap-3">
          {rows.map((row) => (
            <div key={row[0]?.key} className="grid grid-cols-3 items-end gap-x-4">
              {row.map((field) => (
                <QuantityText
                  key={field.key}
                  address={`${part}.${field.key}`}
                  label={field.label}
                  className={row.length === 1 ? "col-span-2" : undefined}
                  placeholder={field.needed ? "needed" : "not given"}
                  dimension={field.dimension}
                  unit={field.unit}
                  value={values[field.key] ?? null}
                  schema={field.schema}
                  onChange={(value) => set(field, value)}
                />
              ))}
            </div>
          ))}
        </div>
      ) : null}
    </section>
  );
}

/** Corners of one quantity share a row; thresholds stand low beside high. */
function rowsOf(fields: readonly ModelField[]): ModelField[][] {
  const rows: ModelField[][] = [];
  const GROUPS: Record<string, string> = { vih: "vil", vihAc: "vilAc", maxBelow: "maxAbove" };
  for (const field of fields) {
    const group = field.key.includes(".")
      ? (field.key.split(".")[0] ?? "")
      : (GROUPS[field.key] ?? field.key);
    const last = rows.at(-1);
    const lead = last?.[0];
    const leadGroup = lead ? (lead.key.includes(".") ? lead.key.split(".")[0] : lead.key) : null;
    if (last && leadGroup === group) last.push(field);
    else rows.push([field]);
  }
  return rows;
}
