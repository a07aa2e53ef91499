"use client";

import { Button } from "@/components/ui/button";
import {
  netClassDoc,
  termination as terminationSchema,
  type NetClassDoc,
  type TerminationDoc,
} from "@/lib/schemas/net-class";
import { FIELD_LABELS, SCHEME_OPTIONS } from "./class-words";
import { useClassesDesk } from "./classes-desk";
import { Choice, QuantityText } from "./doc-fields";
import { checked } from "./field-words";
import { fieldsOf, suggestTermination, withScheme } from "./suggest-termination";

interface Props {
  doc: NetClassDoc;
  onChange: (termination: TerminationDoc) => void;
  readOnly: boolean;
}

const DIMENSIONS = {
  resistance: { dimension: "resistance", unit: "Ω" },
  resistanceLow: { dimension: "resistance", unit: "Ω" },
  capacitance: { dimension: "capacitance", unit: "pF" },
  voltage: { dimension: "voltage", unit: "V" },
} as const;

/** How the nets of a class end: the scheme, the values that belong to it, and the standard value that fits. */
export function ClassTermination({ doc, onChange, readOnly }: Props) {
  const { models } = useClassesDesk();
  const { termination } = doc;
  const { scheme } = termination;
  const suggestion = suggestTermination(scheme, doc, models);
  const taken =
    suggestion?.values &&
    Object.entries(suggestion.values).every(
      ([field, value]) => termination[field as "resistance"]?.value === value?.value,
    );
  const { shape } = terminationSchema;
  return (
    <section aria-labelledby="class-termination">
      <h3 id="class-termination" className="mb-1 text-sm font-semibold">
        Termination
      </h3>
      <div className="grid grid-cols-2 gap-x-4 gap-y-3">
        <Choice
          label="Scheme"
          options={SCHEME_OPTIONS}
          value={scheme}
          onChange={(chosen) =>
            onChange(
              withScheme(termination, checked(netClassDoc.shape.termination.unwrap().shape.scheme, chosen)),
            )
          }
        />
        {fieldsOf(scheme).map((field) => (
          <QuantityText
            key={field}
            address={`termination.${field}`}
            label={
              scheme === "thevenin" && field === "resistance"
                ? "Resistor to the upper rail"
                : FIELD_LABELS[field]
            }
            hint={field === "voltage" ? "Empty: 0 V." : undefined}
            {...DIMENSIONS[field]}
            value={termination[field]}
            schema={shape[field]}
            onChange={(value) => onChange({ ...termination, [field]: value })}
          />
        ))}
      </div>
      {suggestion && (!readOnly || suggestion.values) ? (
        <p className="mt-2 flex flex-wrap items-center gap-x-3 gap-y-1 text-sm">
          <span className="text-ink-soft">{suggestion.words}</span>
          {suggestion.values && !readOnly && !taken ? (
            <Button onClick={() => onChange({ ...termination, ...suggestion.values })}>
              Use {suggestion.values.resistance?.value} Ω
            </Button>
          ) : null}
        </p>
      ) : null}
    </section>
  );
}
