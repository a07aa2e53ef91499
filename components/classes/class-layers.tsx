"use client";

import type { Route } from "next";
import Link from "next/link";
import { useStackupFields } from "@/components/stackup/stackup-fields";
import { Checkbox } from "@/components/ui/checkbox";
import { netClassDoc, type NetClassDoc } from "@/lib/schemas/net-class";
import { useClassesDesk } from "./classes-desk";
import { QuantityText } from "./doc-fields";

interface Props {
  doc: NetClassDoc;
  onChange: (layers: NetClassDoc["layers"]) => void;
  onUntick: (lineageId: string) => void;
  readOnly: boolean;
}

type ClassLayer = NetClassDoc["layers"][number];
const { shape } = netClassDoc.shape.layers.unwrap().element;

/** Every signal layer of the stackup: whether the class may use it, its width there, and a pair's gap. */
export function ClassLayers({ doc, onChange, onUntick, readOnly }: Props) {
  const { layers, projectId, search } = useClassesDesk();
  const { refusals } = useStackupFields();
  const pair = doc.kind === "differential";
  const known = new Set(layers.map(({ lineageId }) => lineageId));
  const rows = [
    ...layers,
    ...doc.layers
      .filter(({ layerLineageId }) => !known.has(layerLineageId))
      .map(({ layerLineageId }) => ({ lineageId: layerLineageId, name: "No longer in the stackup" })),
  ];
  const set = (lineageId: string, change: Partial<ClassLayer>) =>
    onChange(
      doc.layers.map((entry) => (entry.layerLineageId === lineageId ? { ...entry, ...change } : entry)),
    );
  const toggle = (lineageId: string, allowed: boolean) => {
    if (!allowed) onUntick(lineageId);
    onChange(
      allowed
        ? [...doc.layers, { layerLineageId: lineageId, width: null, gap: null }]
        : doc.layers.filter(({ layerLineageId }) => layerLineageId !== lineageId),
    );
  };

  return (
    <section aria-labelledby="class-layers">
      <div className="mb-1 flex items-baseline justify-between gap-4">
        <h3 id="class-layers" className="text-sm font-semibold">
          Layers
        </h3>
        <Link className="prose-link text-xs" href={`/projects/${projectId}/impedance${search}` as Route}>
          Find widths for the target
        </Link>
      </div>
      {rows.length === 0 ? (
        <p className="text-ink-soft text-sm">
          The stackup has no signal layer yet.{" "}
          <Link className="prose-link" href={`/projects/${projectId}/stackup${search}` as Route}>
            Edit the stackup
          </Link>
        </p>
      ) : (
        <table className="w-full text-left text-sm">
          <thead>
            <tr className="text-ink-soft">
              <th scope="col" className="border-rule-line border-b py-1 font-medium">
                Allowed
              </th>
              <th scope="col" className="border-rule-line w-28 border-b px-2 py-1 text-right font-medium">
                Width
              </th>
              {pair ? (
                <th scope="col" className="border-rule-line w-28 border-b px-2 py-1 text-right font-medium">
                  Gap
                </th>
              ) : null}
            </tr>
          </thead>
          <tbody>
            {rows.map(({ lineageId, name }) => {
              const entry = doc.layers.find(({ layerLineageId }) => layerLineageId === lineageId);
              const wrong = refusals[`layer.${lineageId}.width`] ?? refusals[`layer.${lineageId}.gap`];
              return (
                <tr key={lineageId} className="align-top">
                  <td className="border-rule-line/60 border-b py-1.5">
                    <Checkbox
                      label={name}
                      checked={entry !== undefined}
                      disabled={readOnly}
                      onCheckedChange={(checked) => toggle(lineageId, checked)}
                    />
                    {wrong ? (
                      <p role="alert" className="text-fail mt-1 text-xs">
                        {wrong.reason}
                      </p>
                    ) : null}
                  </td>
                  <td className={`border-rule-line/60 border-b ${readOnly ? "py-1.5" : "py-0.5"}`}>
                    {entry ? (
                      <QuantityText
                        inTable
                        alignRight
                        address={`layer.${lineageId}.width`}
                        label={`Width on ${name}`}
                        placeholder="not given"
                        dimension="length"
                        value={entry.width}
                        schema={shape.width}
                        onChange={(width) => set(lineageId, { width })}
                      />
                    ) : null}
                  </td>
                  {pair ? (
                    <td className={`border-rule-line/60 border-b ${readOnly ? "py-1.5" : "py-0.5"}`}>
                      {entry ? (
                        <QuantityText
                          inTable
                          alignRight
                          address={`layer.${lineageId}.gap`}
                          label={`Gap on ${name}`}
                          placeholder="not given"
                          dimension="length"
                          value={entry.gap}
                          schema={shape.gap}
                          onChange={(gap) => set(lineageId, { gap })}
                        />
                      ) : null}
                    </td>
                  ) : null}
                </tr>
              );
            })}
          </tbody>
        </table>
      )}
    </section>
  );
}
