import type { ReactNode } from "react";
import { cn } from "./class-names";

/** The classes shared by everything one types or picks in. */
export const controlClasses = cn(
  "h-8 w-full min-w-0 rounded border border-field-line bg-sheet px-2 text-sm text-ink",
  "placeholder:text-ink-soft disabled:opacity-60 [&[readonly]]:border-rule-line",
  "aria-invalid:border-fail",
);

/** Ids and attributes that tie a control to its hint and its error. */
export function describedBy(id: string, hint: unknown, error: unknown) {
  const ids = [error ? `${id}-error` : null, hint ? `${id}-hint` : null].filter(Boolean).join(" ");
  return { "aria-invalid": error ? (true as const) : undefined, "aria-describedby": ids || undefined };
}

interface Props {
  id: string;
  label: ReactNode;
  hint?: ReactNode;
  error?: string | null;
  /** Keeps the label for screen readers only, where a table header already says it. */
  labelHidden?: boolean;
  className?: string;
  children: ReactNode;
}

/** A labelled control with its hint and its error; the error names the reason and the way out. */
export function Field({ id, label, hint, error, labelHidden = false, className, children }: Props) {
  return (
    <div className={cn("flex min-w-0 flex-col gap-1", className)}>
      <label htmlFor={id} className={labelHidden ? "sr-only" : "text-sm font-medium"}>
        {label}
      </label>
      {children}
      {error ? (
        <p id={`${id}-error`} role="alert" className="text-fail text-xs">
          {error}
        </p>
      ) : null}
      {hint ? (
        <p id={`${id}-hint`} className="text-ink-soft text-xs">
          {hint}
        </p>
      ) : null}
    </div>
  );
}
