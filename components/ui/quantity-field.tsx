"use client";

import { type ReactNode, type Ref, useId, useState } from "react";
import {
  convert,
  type Dimension,
  Decimal,
  formatQuantity,
  parseQuantity,
  type Quantity,
} from "@/lib/si/units";
import { cn } from "./class-names";
import { controlClasses, describedBy, Field } from "./field";

interface Props {
  label: ReactNode;
  dimension: Dimension;
  /** The unit of a bare number, and the one in which the value is shown while nobody types. */
  unit: string;
  value: Quantity | null;
  onChange: (value: Quantity | null) => void;
  /** Why a value is not taken although it could be read; null where it is. */
  check?: (value: Quantity) => string | null;
  /** A text was refused, or no longer is. */
  onRefused?: (refused: boolean) => void;
  /** What is wrong beyond the reading itself: from the form's schema or from the server. */
  error?: string | null;
  hint?: ReactNode;
  /** True where the field may be left empty. */
  optional?: boolean;
  labelHidden?: boolean;
  disabled?: boolean;
  readOnly?: boolean;
  className?: string;
  /** Right-aligned, for columns. */
  alignRight?: boolean;
  id?: string;
  name?: string;
  ref?: Ref<HTMLInputElement>;
  onBlur?: () => void;
}

/**
 * A number with its unit, typed as people write it: "5 mil", "0,127mm", "1/2 oz", "120ps". The text stays text
 * until the field is left or Enter is pressed; then it is read exactly, or says what is wrong with it.
 */
export function QuantityField(props: Props) {
  const { label, dimension, unit, value, onChange, hint, optional = false, labelHidden, className } = props;
  const made = useId();
  const id = props.id ?? made;
  /** What is being typed, or was typed and could not be read; null while the value itself is shown. */
  const [text, setText] = useState<string | null>(null);
  const [refusal, setRefusal] = useState<string | null>(null);
  const error = refusal ?? props.error ?? null;

  function read(typed: string): void {
    if (typed.trim() === "" && optional) return settle(null);
    if (value && typed === formatQuantity(value)) return settle(value, false);
    try {
      const next = parseQuantity(typed, dimension, unit);
      const wrong = props.check?.(next) ?? null;
      if (wrong) refuse(typed, wrong);
      else settle(next);
    } catch (reason) {
      refuse(
        typed,
        reason instanceof Error ? reason.message : "This could not be read as a number with a unit.",
      );
    }
  }

  function refuse(typed: string, reason: string): void {
    setText(typed);
    setRefusal(reason);
    props.onRefused?.(true);
  }

  function settle(next: Quantity | null, changed = true): void {
    setText(null);
    setRefusal(null);
    if (refusal !== null) props.onRefused?.(false);
    if (changed) onChange(next);
  }

  return (
    <Field id={id} label={label} hint={hint} error={error} labelHidden={labelHidden} className={className}>
      <input
        id={id}
        ref={props.ref}
        name={props.name}
        type="text"
        autoComplete="off"
        spellCheck={false}
        disabled={props.disabled}
        readOnly={props.readOnly}
        className={cn(controlClasses, props.alignRight && "text-right")}
        value={text ?? (value ? shown(value, unit) : "")}
        // Ctrl+Z is the text's own while it is being typed.
        data-typing={text !== null && text !== (value ? formatQuantity(value) : "") ? "" : undefined}
        onFocus={(event) => {
          const entered = value ? formatQuantity(value) : "";
          if (text === null && !props.readOnly) setText(entered);
          const input = event.currentTarget;
          // Whoever types before the frame is drawn must not lose what they typed.
          requestAnimationFrame(() => {
            if (input.value === entered) input.select();
          });
        }}
        onChange={(event) => setText(event.target.value)}
        onBlur={() => {
          if (text !== null) read(text);
          props.onBlur?.();
        }}
        onKeyDown={(event) => {
          if (event.key === "Enter" && text !== null) read(text);
          if (event.key === "Escape" && text !== null) {
            event.preventDefault();
            settle(value, false);
          }
        }}
        {...describedBy(id, hint, error)}
      />
    </Field>
  );
}

/** A value in the unit of the reader: exact where it is short, else to five digits, as typed where it cannot be. */
function shown(value: Quantity, unit: string): string {
  if (value.unit === unit) return formatQuantity(value);
  try {
    const converted = convert(value, unit);
    return formatQuantity({
      value: new Decimal(converted.value).toSignificantDigits(5).toString(),
      unit: converted.unit,
    });
  } catch {
    return formatQuantity(value);
  }
}
