"use client";

import { Select } from "@/components/ui/select";
import type { ImportPreview, ListMapping } from "@/lib/schemas/import-list";
import { withLayer } from "./edit-mapping";
import { rows } from "./list-words";

interface Props {
  mapping: ListMapping;
  preview: ImportPreview;
  onChange: (mapping: ListMapping) => void;
}

/** Which layer of the stackup each layer name of the list means. */
export function MapLayers({ mapping, preview, onChange }: Props) {
  if (preview.layers.length === 0) return null;
  const open = preview.layers.filter(({ lineageId }) => lineageId === null);
  return (
    <section aria-labelledby="layers" className="flex flex-col gap-2">
      <h2 id="layers" className="text-lg font-semibold">
        Layers
      </h2>
      <p className="text-ink-soft max-w-prose text-sm">
        {preview.copper.length === 0
          ? "This draft has no stackup yet. The rows come in all the same; their impedance is not known until layers of these names are in it."
          : open.length > 0
            ? `${open.length === 1 ? `${open[0]?.name ?? ""} is` : `${open.length} names are`} not in the stackup. Rows on it come in, without an impedance.`
            : "Proposed from the names; change what is not meant."}
      </p>
      <ul className="border-rule-line bg-sheet max-w-xl border-y">
        {preview.layers.slice(0, 40).map(({ name, rows: count, lineageId }) => (
          <li
            key={name}
            className="border-rule-line/60 flex min-h-10 items-center gap-3 border-b px-2 py-1 text-sm last:border-b-0"
          >
            <span className="min-w-0 flex-1 truncate font-mono text-xs" title={name}>
              {name}
            </span>
            <span className="text-ink-soft w-24 shrink-0 text-right text-xs">{rows(count)}</span>
            <Select
              label={`Layer ${name} of the list`}
              labelHidden
              fieldClassName="w-36 sm:w-52"
              value={lineageId ?? ""}
              placeholder="Not in the stackup"
              options={preview.copper.map((layer) => ({ value: layer.lineageId, label: layer.name }))}
              onChange={(event) => onChange(withLayer(mapping, name, event.target.value || null))}
            />
          </li>
        ))}
      </ul>
    </section>
  );
}
