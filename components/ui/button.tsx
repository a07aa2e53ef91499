import type { ComponentProps } from "react";
import { cn } from "./class-names";

const VARIANTS = {
  primary: "border-copper bg-copper text-sheet hover:bg-copper/90 dark:text-paper",
  secondary: "border-field-line bg-sheet text-ink hover:border-ink",
  quiet: "border-transparent bg-transparent text-ink hover:bg-rule-line/50",
  danger: "border-fail bg-sheet text-fail hover:bg-fail/10",
} as const;

const SIZES = {
  sm: "h-8 px-3 text-sm",
  md: "h-10 px-4 text-base",
  icon: "size-8 justify-center p-0",
} as const;

export interface ButtonLook {
  variant?: keyof typeof VARIANTS;
  size?: keyof typeof SIZES;
}

/** The classes of a button, shared with links that look like one. */
export function buttonClasses({ variant = "secondary", size = "sm" }: ButtonLook): string {
  return cn(
    "inline-flex shrink-0 items-center justify-center gap-2 rounded border font-medium whitespace-nowrap transition-colors",
    "disabled:opacity-50",
    VARIANTS[variant],
    SIZES[size],
  );
}

type Props = ComponentProps<"button"> & ButtonLook & { busy?: boolean };

/** A button; the label is a verb. `busy` keeps its width and place while the act is under way. */
export function Button({
  variant,
  size,
  busy = false,
  className,
  disabled,
  type = "button",
  ...rest
}: Props) {
  return (
    <button
      type={type}
      className={cn(buttonClasses({ variant, size }), className)}
      disabled={disabled || busy}
      aria-busy={busy || undefined}
      {...rest}
    />
  );
}
