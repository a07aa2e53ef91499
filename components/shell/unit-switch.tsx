"use client";

import { ToggleGroup } from "radix-ui";
import { LENGTH_UNITS, parseLengthUnit } from "@/lib/client/preferences";
import { useLengthUnit } from "./length-unit";

/** Lengths in millimetres or in mils: one person's choice, for every page. */
export function UnitSwitch() {
  const { unit, setUnit } = useLengthUnit();
  return (
    <ToggleGroup.Root
      type="single"
      value={unit}
      onValueChange={(next) => {
        if (next) setUnit(parseLengthUnit(next));
      }}
      aria-label="Unit of length"
      className="border-field-line flex h-8 rounded border"
    >
      {LENGTH_UNITS.map((name) => (
        <ToggleGroup.Item
          key={name}
          value={name}
          className="text-ink-soft hover:text-ink data-[state=on]:bg-rule-line/60 data-[state=on]:text-ink px-2 text-sm first:rounded-l last:rounded-r data-[state=on]:font-medium"
        >
          {name}
        </ToggleGroup.Item>
      ))}
    </ToggleGroup.Root>
  );
}
