"use client";

import type { ReactNode } from "react";
import type { ZodType } from "zod";
import { FieldText } from "@/components/stackup/stackup-fields";
import { useStackupUnits } from "@/components/stackup/stackup-units";
import type { Dimension, Quantity } from "@/lib/si/units";
import { readPercent, readQuantity, shownQuantity, typedQuantity } from "./field-words";

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
  /** of a bare number; of lengths the project's unit */
  unit?: string;
  value: Quantity | null;
  schema?: ZodType<Quantity | null>;
  onChange: (value: Quantity | null) => void;
}

/** A quantity as text with its unit; read when the field is left, and refused with the reason. */
export function QuantityText({ dimension, unit, value, schema, onChange, ...look }: QuantityProps) {
  const { reader, project } = useStackupUnits();
  return (
    <FieldText
      {...look}
      typed={typedQuantity(value, dimension)}
      shown={shownQuantity(value, dimension, reader)}
      commit={(text) => onChange(readQuantity(text, dimension, unit ?? project, schema))}
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
