"use client";

import { X } from "lucide-react";
import { Dialog as Radix } from "radix-ui";
import type { ReactNode } from "react";
import { Button } from "./button";

interface Props {
  open: boolean;
  onOpenChange: (open: boolean) => void;
  title: string;
  /** One sentence: what this does, what it freezes. */
  description?: ReactNode;
  children?: ReactNode;
  /** Buttons, the main act last. */
  footer?: ReactNode;
  wide?: boolean;
}

/** A question that must be answered before going on. What can be beside the page is a SidePanel instead. */
export function Dialog({ open, onOpenChange, title, description, children, footer, wide = false }: Props) {
  return (
    <Radix.Root open={open} onOpenChange={onOpenChange}>
      <Radix.Portal>
        <Radix.Overlay className="bg-ink/40 dark:bg-paper/70 fixed inset-0 z-40" />
        <Radix.Content
          {...(description ? {} : { "aria-describedby": undefined })}
          className={`border-field-line bg-sheet fixed top-1/2 left-1/2 z-50 flex max-h-[90dvh] w-[calc(100vw-2rem)] -translate-x-1/2 -translate-y-1/2 flex-col gap-4 overflow-y-auto rounded border p-6 ${wide ? "max-w-3xl" : "max-w-lg"}`}
        >
          <div className="flex items-start justify-between gap-4">
            <Radix.Title className="text-lg font-semibold">{title}</Radix.Title>
            <Radix.Close asChild>
              <Button variant="quiet" size="icon" aria-label="Close">
                <X size={16} aria-hidden="true" />
              </Button>
            </Radix.Close>
          </div>
          {description ? (
            <Radix.Description className="text-ink-soft text-sm">{description}</Radix.Description>
          ) : null}
          {children}
          {footer ? <div className="flex flex-wrap justify-end gap-2">{footer}</div> : null}
        </Radix.Content>
      </Radix.Portal>
    </Radix.Root>
  );
}
