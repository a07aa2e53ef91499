"use client";

import type { ReactNode } from "react";
import type { ZodType } from "zod";
import { FieldText, useStackupFields } from "@/components/stackup/stackup-fields";
import { useStackupUnits } from "@/components/stackup/stackup-units";
import { Select, type SelectOption } from "@/components/ui/select";
import type { Dimension, Quantity } from "@/lib/si/units";
import { readPercent, readQuantity, shownQuantity } from "./field-words";

interface Common {
  /** Unique within its editor. */
  address: string;
  label: string;
  labelHidden?: boolean;
  hint?: ReactNode;
  inTable?: boolean;
  alignRight?: boolean;
  placeholder?: string;
  className?: string;
}

interface QuantityProps extends Common {
  dimension: Dimension;
  /** of a bare number where the field is empty; lengths have the reader's */
  unit?: string;
  value: Quantity | null;
  schema?: ZodType<Quantity | null>;
  onChange: (value: Quantity | null) => void;
}

/** A quantity as text with its unit; read when the field is left, and refused with the reason. */
export function QuantityText({ dimension, unit, value, schema, onChange, ...look }: QuantityProps) {
  const { reader } = useStackupUnits();
  const shown = shownQuantity(value, dimension, reader);
  // A bare number means what it seems to: it has the unit that the field shows.
  const bare = dimension === "length" ? reader : (value?.unit ?? unit ?? reader);
  return (
    <FieldText
      {...look}
      typed={shown}
      shown={shown}
      commit={(text) => onChange(readQuantity(text, dimension, bare, schema))}
    />
  );
}

interface TextProps extends Common {
  value: string;
  suggestions?: readonly string[];
  /** Reads the text. @throws Error with the sentence to show */
  read: (text: string) => string;
  onChange: (value: string) => void;
}

/** A line of text, checked when the field is left. */
export function LineText({ value, read, onChange, ...look }: TextProps) {
  return <FieldText {...look} typed={value} shown={value} commit={(text) => onChange(read(text))} />;
}

interface PercentProps extends Common {
  value: string;
  schema?: ZodType<string>;
  onChange: (value: string) => void;
}

export function PercentText({ value, schema, onChange, ...look }: PercentProps) {
  return (
    <FieldText
      {...look}
      typed={value}
      shown={value === "" ? "" : `${value} %`}
      commit={(text) => {
        const read = readPercent(text, schema);
        if (read === "") throw new Error("Write a tolerance, such as 10 %.");
        onChange(read);
      }}
    />
  );
}

interface ChoiceProps {
  label: string;
  options: readonly SelectOption[];
  value: string;
  /** What an empty value means. */
  placeholder?: string;
  onChange: (value: string) => void;
}

/** One of a few; plain text where nothing is edited. */
export function Choice({ label, options, value, placeholder, onChange }: ChoiceProps) {
  const { readOnly } = useStackupFields();
  if (readOnly)
    return (
      <div className="flex min-w-0 flex-col gap-1 text-sm">
        <span className="font-medium">{label}</span>
        <span className="text-ink-soft">
          {options.find((option) => option.value === value)?.label ?? placeholder ?? "not given"}
        </span>
      </div>
    );
  return (
    <Select
      label={label}
      options={options}
      value={value}
      placeholder={placeholder}
      onChange={(event) => onChange(event.target.value)}
    />
  );
}
