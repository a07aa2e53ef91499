"use client";

import type { ClosedFormResult } from "@/lib/si/cross-section";
import type { LineKind } from "@/lib/client/engine-line";
import { ohms, signedPercent } from "./row-words";

interface Props {
  forms: readonly ClosedFormResult[];
  kind: LineKind;
  /** the field solution [Ω] */
  field: number | null;
}

/** Every published formula that fits the section: its value, its difference to the field solution, range and source. */
export function FormsTable({ forms, kind, field }: Props) {
  return (
    <section aria-label="Formulas" className="mt-5">
      <h3 className="mb-1 text-sm font-semibold">Every formula that fits</h3>
      {forms.length === 0 ? (
        <p className="text-ink-soft text-sm">No published formula fits this section.</p>
      ) : (
        <ul className="border-rule-line border-t text-sm">
          {forms.map((form, index) => {
            const value = valueOf(form, kind);
            return (
              <li key={`${form.id} ${form.variant ?? ""}`} className="border-rule-line/60 border-b py-1.5">
                <div className="flex items-baseline justify-between gap-3">
                  <span className={index === 0 ? "font-medium" : undefined}>
                    {form.title}
                    {index === 0 ? <span className="text-ink-soft font-normal">, fits best</span> : null}
                  </span>
                  <span className="whitespace-nowrap">
                    {ohms(value)}
                    <span className="text-ink-soft">{"\u2009Ω"}</span>
                    {field !== null && value !== undefined ? (
                      <span className="text-ink-soft ml-2 text-xs">
                        {signedPercent((100 * (value - field)) / field)}
                        {"\u2009%"}
                      </span>
                    ) : null}
                  </span>
                </div>
                <p className={`text-xs ${form.inRange ? "text-ink-soft" : "text-near"}`}>
                  {form.inRange ? "Within its range" : "Outside its range"}: {form.range}
                </p>
                {form.ignores.length > 0 ? (
                  <p className="text-ink-soft text-xs">Does not see: {form.ignores.join(", ")}.</p>
                ) : null}
                <p className="text-ink-soft text-xs">{form.source}</p>
              </li>
            );
          })}
        </ul>
      )}
    </section>
  );
}

function valueOf(form: ClosedFormResult, kind: LineKind): number | undefined {
  return kind === "single" ? form.impedance.single : form.impedance.differential;
}
