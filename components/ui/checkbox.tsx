"use client";

import { Check, Minus } from "lucide-react";
import { Checkbox as Radix } from "radix-ui";
import { type ReactNode, useId } from "react";
import { cn } from "./class-names";

interface Props {
  label: ReactNode;
  checked: boolean | "indeterminate";
  onCheckedChange: (checked: boolean) => void;
  disabled?: boolean;
  labelHidden?: boolean;
  hint?: ReactNode;
}

/** A box that is on, off, or partly on. The whole label is its target. */
export function Checkbox({ label, checked, onCheckedChange, disabled, labelHidden = false, hint }: Props) {
  const id = useId();
  return (
    <div className="flex items-start gap-2">
      <Radix.Root
        id={id}
        checked={checked}
        disabled={disabled}
        onCheckedChange={(next) => onCheckedChange(next === true)}
        aria-describedby={hint ? `${id}-hint` : undefined}
        className={cn(
          "border-field-line bg-sheet mt-0.5 grid size-4 shrink-0 place-items-center rounded-[3px] border",
          "data-[state=checked]:border-copper data-[state=checked]:bg-copper data-[state=checked]:text-sheet",
          "dark:data-[state=checked]:text-paper disabled:opacity-50",
        )}
      >
        <Radix.Indicator>
          {checked === "indeterminate" ? <Minus size={12} /> : <Check size={12} strokeWidth={3} />}
        </Radix.Indicator>
      </Radix.Root>
      <span className={labelHidden ? "sr-only" : "flex flex-col text-sm"}>
        <label htmlFor={id}>{label}</label>
        {hint ? (
          <span id={`${id}-hint`} className="text-ink-soft text-xs">
            {hint}
          </span>
        ) : null}
      </span>
    </div>
  );
}
