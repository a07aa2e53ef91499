"use client";

import { Tooltip as Radix } from "radix-ui";
import type { ReactNode } from "react";

interface Props {
  content: ReactNode;
  /** A single element that can hold the focus. */
  children: ReactNode;
}

/** A short remark on hover or focus. Never the only place where something is said. */
export function Tooltip({ content, children }: Props) {
  return (
    <Radix.Root>
      <Radix.Trigger asChild>{children}</Radix.Trigger>
      <Radix.Portal>
        <Radix.Content
          sideOffset={4}
          collisionPadding={8}
          className="bg-ink text-paper z-50 max-w-xs rounded px-2 py-1 text-xs"
        >
          {content}
        </Radix.Content>
      </Radix.Portal>
    </Radix.Root>
  );
}
