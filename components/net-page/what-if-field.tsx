"use client";

import { RotateCcw } from "lucide-react";
import { createContext, useContext, useState } from "react";
import { Button } from "@/components/ui/button";
import { QuantityField } from "@/components/ui/quantity-field";
import { ohmsText, quantityText } from "@/lib/drawings/number-text";
import { type Dimension, formatQuantity, fromSi, type Quantity, toSi } from "@/lib/si/units";

/** Tells the panel whether a field, by its label, holds a text that it does not take. */
export const RefusedContext = createContext<(label: string, refused: boolean) => void>(() => undefined);

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
  const tellRefused = useContext(RefusedContext);
  const [refused, setRefused] = useState(false);
  const [epoch, setEpoch] = useState(0);
  const text = (si: number | null) => (si === null ? "none" : formatQuantity(fromSi(si, unit, 4)));

  function refuse(now: boolean): void {
    setRefused(now);
    tellRefused(label, now);
  }
  function range(typed: Quantity): string | null {
    const si = toSi(typed, dimension);
    if (si >= least && si <= most) return null;
    const words = (end: number) => rangeText(end, dimension, unit);
    return `${formatQuantity(typed)} is out of range. Write ${words(least)} to ${words(most)}.`;
  }
  /** By the slider or the button: a text that was refused goes. */
  function take(si: number | null): void {
    refuse(false);
    setEpoch((present) => present + 1);
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
          key={epoch}
          check={range}
          onRefused={refuse}
          onChange={(typed) => onChange(typed ? toSi(typed, dimension) : null)}
        />
        <Button
          variant="quiet"
          size="icon"
          aria-label={`Put back to ${text(start)}: ${label}`}
          disabled={!changed && !refused}
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

/** An end of a range, in the prefix in which it is short: 10 kΩ, 1 µs. */
function rangeText(si: number, dimension: Dimension, unit: string): string {
  if (dimension === "resistance") return ohmsText(si);
  if (dimension === "length") return formatQuantity(fromSi(si, unit, 4));
  return si === 0
    ? `0 ${unit}`
    : quantityText(si, dimension === "time" ? "s" : "F").replace(/\.0+(?=\D)/, "");
}

function nearest(steps: readonly number[], value: number): number {
  let best = 0;
  steps.forEach((step, i) => {
    if (Math.abs(step - value) < Math.abs((steps[best] ?? 0) - value)) best = i;
  });
  return best;
}
