"use client";

import { RotateCcw } from "lucide-react";
import { useState } from "react";
import { Button } from "@/components/ui/button";
import { QuantityField } from "@/components/ui/quantity-field";
import { type Dimension, formatQuantity, fromSi, toSi } from "@/lib/si/units";

interface Props {
  label: string;
  dimension: Dimension;
  unit: string;
  /** as it is on trial [SI] */
  value: number;
  /** as the path has it [SI]; null: it has none */
  start: number | null;
  changed: boolean;
  /** what the slider stops at, rising [SI] */
  steps: readonly number[];
  least: number;
  most: number;
  hint?: string;
  onChange: (value: number | null) => void;
}

/** One value to try: a slider over sensible steps, and a field for any other. */
export function WhatIfField(props: Props) {
  const { label, dimension, unit, value, start, changed, steps, least, most, hint, onChange } = props;
  const [refusal, setRefusal] = useState<string | null>(null);
  const text = (si: number | null) => (si === null ? "none" : formatQuantity(fromSi(si, unit, 4)));

  function take(si: number | null): void {
    if (si !== null && (si < least || si > most)) {
      setRefusal(`${text(si)} is out of range. Choose between ${text(least)} and ${text(most)}.`);
      return;
    }
    setRefusal(null);
    onChange(si);
  }

  return (
    <div className="min-w-0">
      <div className="flex items-end gap-1">
        <QuantityField
          label={label}
          dimension={dimension}
          unit={unit}
          className="grow"
          value={fromSi(value, unit, 4)}
          error={refusal}
          onChange={(typed) => take(typed ? toSi(typed, dimension) : null)}
        />
        <Button
          variant="quiet"
          size="icon"
          aria-label={`Put back to ${text(start)}: ${label}`}
          disabled={!changed}
          onClick={() => take(null)}
        >
          <RotateCcw size={14} aria-hidden />
        </Button>
      </div>
      <input
        type="range"
        className="accent-copper mt-1 h-6 w-full"
        aria-label={`${label}, slider`}
        aria-valuetext={text(value)}
        min={0}
        max={steps.length - 1}
        value={nearest(steps, value)}
        onChange={(event) => take(steps[Number(event.target.value)] ?? null)}
      />
      <p className={changed ? "text-copper min-h-4 text-xs" : "text-ink-soft min-h-4 text-xs"}>
        {changed ? `was ${text(start)}` : "as it is"}
        {hint ? ` · ${hint}` : ""}
      </p>
    </div>
  );
}

function nearest(steps: readonly number[], value: number): number {
  let best = 0;
  steps.forEach((step, i) => {
    if (Math.abs(step - value) < Math.abs((steps[best] ?? 0) - value)) best = i;
  });
  return best;
}
