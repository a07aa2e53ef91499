import { type ComponentProps, type ReactNode, useId } from "react";
import { cn } from "./class-names";
import { controlClasses, describedBy, Field } from "./field";

interface Labelled {
  label: ReactNode;
  hint?: ReactNode;
  error?: string | null;
  labelHidden?: boolean;
  fieldClassName?: string;
}

/** One line of text with its label, hint and error. Takes what `register()` of a form gives. */
export function Input({
  label,
  hint,
  error,
  labelHidden,
  fieldClassName,
  className,
  id: given,
  ...rest
}: ComponentProps<"input"> & Labelled) {
  const made = useId();
  const id = given ?? made;
  return (
    <Field
      id={id}
      label={label}
      hint={hint}
      error={error}
      labelHidden={labelHidden}
      className={fieldClassName}
    >
      <input id={id} className={cn(controlClasses, className)} {...describedBy(id, hint, error)} {...rest} />
    </Field>
  );
}

/** Several lines of text with their label, hint and error. */
export function TextArea({
  label,
  hint,
  error,
  labelHidden,
  fieldClassName,
  className,
  id: given,
  rows = 3,
  ...rest
}: ComponentProps<"textarea"> & Labelled) {
  const made = useId();
  const id = given ?? made;
  return (
    <Field
      id={id}
      label={label}
      hint={hint}
      error={error}
      labelHidden={labelHidden}
      className={fieldClassName}
    >
      <textarea
        id={id}
        rows={rows}
        className={cn(controlClasses, "h-auto py-1", className)}
        {...describedBy(id, hint, error)}
        {...rest}
      />
    </Field>
  );
}
