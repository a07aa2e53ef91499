"use client";

import { Progress as Radix } from "radix-ui";
import { Button } from "./button";

interface Props {
  /** What is under way: "Checking 5,000 paths". */
  label: string;
  done: number;
  /** How many in all; null while it is not known. */
  total: number | null;
  /** What is counted: "paths", "rows". */
  noun?: string;
  onCancel?: () => void;
  cancelling?: boolean;
}

/** How far long work has come, and the way to stop it. */
export function Progress({ label, done, total, noun = "", onCancel, cancelling = false }: Props) {
  const share = total && total > 0 ? Math.min(1, done / total) : 0;
  const said =
    total === null
      ? `${done.toLocaleString("en")} ${noun}`
      : `${done.toLocaleString("en")} of ${total.toLocaleString("en")} ${noun}`;
  return (
    <div className="flex items-center gap-4">
      <div className="min-w-0 flex-1">
        <div className="flex justify-between gap-4 text-sm">
          <span className="truncate">{label}</span>
          <span className="text-ink-soft shrink-0">{said.trim()}</span>
        </div>
        <Radix.Root
          value={total === null ? null : Math.round(share * 100)}
          aria-label={label}
          className="bg-rule-line mt-1 h-2 overflow-hidden rounded"
        >
          <Radix.Indicator
            className={`bg-copper block h-full origin-left ${total === null ? "w-1/3 animate-pulse" : ""}`}
            style={total === null ? undefined : { width: `${share * 100}%` }}
          />
        </Radix.Root>
      </div>
      {onCancel ? (
        <Button onClick={onCancel} busy={cancelling}>
          {cancelling ? "Stopping" : "Cancel"}
        </Button>
      ) : null}
    </div>
  );
}
