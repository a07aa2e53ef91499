"use client";

import { useId } from "react";
import { QuantityField } from "@/components/ui/quantity-field";
import type { LengthUnit } from "@/lib/client/preferences";
import { toSi } from "@/lib/si/units";
import { lengthDigits } from "./grids";

interface Props {
  label: string;
  /** [m] */
  value: number;
  min: number;
  max: number;
  step: number;
  unit: LengthUnit;
  onChange: (metres: number) => void;
}

/** A length by slider, on the grid, or as a number, exactly as typed. */
export function LengthSlider({ label, value, min, max, step, unit, onChange }: Props) {
  const id = useId();
  const first = Math.ceil(min / step - 1e-9);
  const last = Math.floor(max / step + 1e-9);
  return (
    <div className="grid grid-cols-[1fr_112px] items-end gap-3">
      <label htmlFor={id} className="flex flex-col gap-1 text-sm font-medium">
        {label}
        <input
          id={id}
          type="range"
          min={first}
          max={last}
          step={1}
          value={Math.min(last, Math.max(first, Math.round(value / step)))}
          aria-valuetext={`${lengthDigits(value, unit)} ${unit}`}
          onChange={(event) => onChange(Number((Number(event.target.value) * step).toPrecision(12)))}
          className="accent-copper h-8 w-full"
        />
      </label>
      <QuantityField
        label={`${label}, as a number`}
        labelHidden
        dimension="length"
        unit={unit}
        alignRight
        value={{ value: lengthDigits(value, unit), unit }}
        onChange={(quantity) => {
          const metres = quantity ? toSi(quantity, "length") : 0;
          if (metres > 0) onChange(metres);
        }}
      />
    </div>
  );
}
