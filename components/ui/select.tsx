import { ChevronDown } from "lucide-react";
import { type ComponentProps, type ReactNode, useId } from "react";
import { cn } from "./class-names";
import { controlClasses, describedBy, Field } from "./field";

export interface SelectOption {
  value: string;
  label: string;
  disabled?: boolean;
}

interface Props extends ComponentProps<"select"> {
  label: ReactNode;
  options: readonly SelectOption[];
  hint?: ReactNode;
  error?: string | null;
  labelHidden?: boolean;
  fieldClassName?: string;
  /** Shown first, with an empty value, when nothing need be picked yet. */
  placeholder?: string;
}

/** A choice from a short list: the browser's own control, for its keyboard and its touch behaviour. */
export function Select({
  label,
  options,
  hint,
  error,
  labelHidden,
  fieldClassName,
  placeholder,
  className,
  id: given,
  ...rest
}: Props) {
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
      <span className="relative block min-w-0">
        <select
          id={id}
          className={cn(controlClasses, "appearance-none pr-7", className)}
          {...describedBy(id, hint, error)}
          {...rest}
        >
          {placeholder !== undefined ? <option value="">{placeholder}</option> : null}
          {options.map((option) => (
            <option key={option.value} value={option.value} disabled={option.disabled}>
              {option.label}
            </option>
          ))}
        </select>
        <ChevronDown
          size={14}
          aria-hidden="true"
          className="text-ink-soft pointer-events-none absolute top-1/2 right-2 -translate-y-1/2"
        />
      </span>
    </Field>
  );
}
