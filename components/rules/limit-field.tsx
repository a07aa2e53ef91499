"use client";

import { useState } from "react";
import { unitText } from "@/components/runs/measure";
import { controlClasses } from "@/components/ui/field";
import { cn } from "@/components/ui/class-names";
import { errorMessage } from "@/lib/client/api";
import type { RuleDefinition } from "@/lib/si/rules";
import { readLimit } from "./limit-text";

interface Props {
  rule: RuleDefinition;
  limit: string | null;
  disabled: boolean;
  onChange: (limit: string | null) => void;
}

/** A limit in its rule's own unit; left empty, the class or the part sets it. */
export function LimitField({ rule, limit, disabled, onChange }: Props) {
  const [text, setText] = useState<string | null>(null);
  const [wrong, setWrong] = useState<string | null>(null);

  function settle(): void {
    if (text === null) return;
    try {
      const next = readLimit(text, rule.unit);
      setText(null);
      setWrong(null);
      if (next !== limit) onChange(next);
    } catch (error) {
      setWrong(errorMessage(error));
    }
  }

  return (
    <span className="flex flex-col">
      <span className="flex items-center gap-1.5">
        <span className="text-ink-soft w-3 text-right" aria-hidden="true">
          {rule.direction === "max" ? "≤" : "≥"}
        </span>
        <span className="w-20 shrink-0">
          <input
            aria-label={`Limit of ${rule.title}, ${rule.direction === "max" ? "at most" : "at least"}, in ${unitText(rule.unit)}`}
            aria-invalid={wrong ? true : undefined}
            aria-describedby={wrong ? `limit-${rule.id}` : undefined}
            className={cn(controlClasses, "text-right tabular-nums")}
            placeholder="none"
            disabled={disabled}
            value={text ?? limit ?? ""}
            onFocus={(event) => event.currentTarget.select()}
            onChange={(event) => setText(event.target.value)}
            onBlur={settle}
            onKeyDown={(event) => {
              if (event.key === "Enter") settle();
              if (event.key === "Escape") {
                setText(null);
                setWrong(null);
              }
            }}
          />
        </span>
        <span className="text-ink-soft whitespace-nowrap">{unitText(rule.unit)}</span>
      </span>
      {wrong ? (
        <span id={`limit-${rule.id}`} role="alert" className="text-fail max-w-56 pl-4 text-xs">
          {wrong}
        </span>
      ) : null}
    </span>
  );
}
