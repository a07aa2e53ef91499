"use client";

import { Check, Copy } from "lucide-react";
import { useEffect, useState } from "react";
import { Button, type ButtonLook } from "./button";
import { toast } from "./toast";

interface Props extends ButtonLook {
  /** The text, or how to make it when asked. */
  text: string | (() => string);
  label?: string;
}

/** Puts text on the clipboard and says so. */
export function CopyButton({ text, label = "Copy", ...look }: Props) {
  const [copied, setCopied] = useState(false);
  useEffect(() => {
    if (!copied) return;
    const timer = setTimeout(() => setCopied(false), 2000);
    return () => clearTimeout(timer);
  }, [copied]);

  async function copy() {
    try {
      await navigator.clipboard.writeText(typeof text === "function" ? text() : text);
      setCopied(true);
    } catch {
      toast.error("The browser did not allow copying. Select the text and copy it with the keyboard.");
    }
  }

  return (
    <Button {...look} onClick={() => void copy()}>
      {copied ? <Check size={14} aria-hidden="true" /> : <Copy size={14} aria-hidden="true" />}
      <span aria-live="polite">{copied ? "Copied" : label}</span>
    </Button>
  );
}
