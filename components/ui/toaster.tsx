"use client";

import { useEffect } from "react";
import { Toaster as Sonner } from "sonner";

interface Props {
  /** Called once messages are shown. */
  onReady: () => void;
}

/** Draws the messages; a chunk of its own, since no page begins with one. */
export default function Toaster({ onReady }: Props) {
  useEffect(onReady, [onReady]);
  return (
    <Sonner
      position="bottom-right"
      // Each stands free of the others, so that its button can be reached.
      expand
      toastOptions={{
        unstyled: true,
        classNames: {
          toast:
            "flex w-full items-start gap-3 font-sans rounded border border-field-line bg-sheet px-4 py-3 text-sm text-ink",
          description: "text-ink-soft",
          error: "border-fail",
          success: "border-pass",
          actionButton: "ml-auto min-h-6 shrink-0 font-medium text-violet underline underline-offset-2",
          closeButton: "text-ink-soft",
        },
      }}
    />
  );
}
