import Link from "next/link";
import type { ComponentProps } from "react";
import { type ButtonLook, buttonClasses } from "./button";
import { cn } from "./class-names";

/** A link that leads somewhere and looks like a button. */
export function LinkButton({ variant, size, className, ...rest }: ComponentProps<typeof Link> & ButtonLook) {
  return <Link className={cn(buttonClasses({ variant, size }), className)} {...rest} />;
}
