"use client";

import { Select } from "@/components/ui/select";
import type { View } from "./net-state";

interface Props {
  view: View;
  drivers: readonly string[];
  receivers: readonly string[];
  onLook: (at: { edge?: "rise" | "fall"; driver?: string; pin?: string }) => void;
}

/** Which edge, and where there are several, which driver and which receiver. */
export function ViewControls({ view, drivers, receivers, onLook }: Props) {
  return (
    <div className="flex flex-wrap items-end gap-3 print:hidden">
      <fieldset className="text-sm">
        <legend className="mb-1 font-medium">Edge</legend>
        <div className="border-field-line flex h-8 w-fit rounded border">
          {(["rise", "fall"] as const).map((edge) => (
            <label
              key={edge}
              className="has-checked:bg-rule-line/60 has-focus-visible:outline-violet text-ink-soft has-checked:text-ink flex cursor-pointer items-center px-3 has-checked:font-medium has-focus-visible:outline-2"
            >
              <input
                type="radio"
                name="edge"
                className="sr-only"
                checked={view.edge === edge}
                onChange={() => onLook({ edge })}
              />
              {edge === "rise" ? "rising" : "falling"}
            </label>
          ))}
        </div>
      </fieldset>
      {drivers.length > 1 ? (
        <Select
          label="Driver"
          fieldClassName="w-36"
          value={view.driver}
          options={drivers.map((pin) => ({ value: pin, label: pin }))}
          onChange={(event) => onLook({ driver: event.target.value })}
        />
      ) : null}
      {receivers.length > 1 ? (
        <Select
          label="Receiver"
          fieldClassName="w-36"
          value={view.pin ?? ""}
          options={receivers.map((pin) => ({ value: pin, label: pin }))}
          onChange={(event) => onLook({ pin: event.target.value })}
        />
      ) : null}
    </div>
  );
}
