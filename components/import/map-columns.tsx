"use client";

import { Checkbox } from "@/components/ui/checkbox";
import { Input } from "@/components/ui/input";
import { Select } from "@/components/ui/select";
import { type ImportPreview, listKinds, type ListMapping } from "@/lib/schemas/import-list";
import { fieldOf, withField, withUnit } from "./edit-mapping";
import { DELIMITER_WORDS, KIND_LABELS } from "./list-words";

interface Props {
  mapping: ListMapping;
  preview: ImportPreview;
  onChange: (mapping: ListMapping) => void;
}

const UNITS = ["mm", "mil", "µm", "in", "cm", "m"];

/** How the list is read: its kind, its marks, and which column holds what, over its first rows. */
export function MapColumns({ mapping, preview, onChange }: Props) {
  return (
    <section aria-labelledby="columns" className="flex flex-col gap-3">
      <h2 id="columns" className="text-lg font-semibold">
        Columns
      </h2>
      <div className="flex flex-wrap items-end gap-3">
        <Select
          label="Kind of list"
          fieldClassName="w-44"
          value={mapping.kind}
          options={listKinds.map((value) => ({ value, label: KIND_LABELS[value] }))}
          onChange={(event) =>
            onChange({
              ...mapping,
              kind: listKinds.find((kind) => kind === event.target.value) ?? mapping.kind,
            })
          }
        />
        <Select
          label="Between cells"
          fieldClassName="w-36"
          value={mapping.delimiter}
          options={Object.entries(DELIMITER_WORDS).map(([value, label]) => ({ value, label }))}
          onChange={(event) =>
            onChange({ ...mapping, delimiter: event.target.value as ListMapping["delimiter"] })
          }
        />
        <Input
          key={mapping.headerRow ?? 0}
          label="Header in row"
          fieldClassName="w-32"
          inputMode="numeric"
          placeholder="none"
          defaultValue={mapping.headerRow ?? ""}
          onBlur={(event) => {
            const row = Number.parseInt(event.target.value, 10);
            const headerRow = Number.isInteger(row) && row >= 1 && row <= 1000 ? row : null;
            if (headerRow !== mapping.headerRow) onChange({ ...mapping, headerRow });
          }}
        />
        <div className="flex h-8 items-center">
          <Checkbox
            label="Decimal comma"
            checked={mapping.decimalComma}
            onCheckedChange={(decimalComma) => onChange({ ...mapping, decimalComma })}
          />
        </div>
      </div>
      <div
        className="border-rule-line relative overflow-x-auto border-y"
        role="region"
        aria-label="Columns and first rows"
        tabIndex={0}
      >
        <table className="bg-sheet min-w-full text-left text-sm">
          <thead>
            <tr>
              <th scope="col" className="text-ink-soft px-2 py-1 align-bottom text-xs font-normal">
                Row
              </th>
              {preview.columns.map((name, column) => (
                <ColumnHead key={column} {...{ name, column, mapping, preview, onChange }} />
              ))}
            </tr>
          </thead>
          <tbody>
            {preview.sample.map(({ row, cells }) => (
              <tr key={row} className="border-rule-line/60 border-t">
                <td className="text-ink-soft px-2 py-1 text-xs">{row}</td>
                {preview.columns.map((_, column) => (
                  <td
                    key={column}
                    className="max-w-60 truncate px-2 py-1 font-mono text-xs whitespace-nowrap"
                  >
                    {cells[column] ?? ""}
                  </td>
                ))}
              </tr>
            ))}
          </tbody>
        </table>
      </div>
      {preview.missingFields.length > 0 ? (
        <p role="alert" className="text-fail text-sm">
          No column is chosen for {preview.missingFields.map((field) => field.toLowerCase()).join(", ")}.
          Choose it above.
        </p>
      ) : null}
    </section>
  );
}

interface HeadProps extends Props {
  name: string;
  column: number;
}

function ColumnHead({ name, column, mapping, preview, onChange }: HeadProps) {
  const chosen = fieldOf(mapping, column);
  const field = preview.fields.find(({ id }) => id === chosen);
  return (
    <th scope="col" className="min-w-36 px-2 py-2 align-top font-normal">
      <span className="text-ink-soft mb-1 block max-w-60 truncate text-xs" title={name}>
        {name}
      </span>
      <span className="flex gap-1">
        <Select
          label={`What column ${name} holds`}
          labelHidden
          fieldClassName="min-w-28 flex-1"
          value={chosen}
          placeholder="Not used"
          className={chosen ? "font-medium" : "text-ink-soft"}
          options={preview.fields.map(({ id, label, required }) => ({
            value: id,
            label: required ? `${label} *` : label,
          }))}
          onChange={(event) => onChange(withField(mapping, column, event.target.value))}
        />
        {field?.isLength ? (
          <Select
            label={`Unit of column ${field.label.toLowerCase()}`}
            labelHidden
            fieldClassName="w-20"
            value={mapping.fields[chosen]?.unit ?? ""}
            options={UNITS.map((value) => ({ value, label: value }))}
            onChange={(event) => onChange(withUnit(mapping, chosen, event.target.value))}
          />
        ) : null}
      </span>
    </th>
  );
}
