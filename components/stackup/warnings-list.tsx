"use client";

import { VerdictShape } from "@/components/ui/verdict-mark";
import type { StackupWarning } from "@/lib/si/stackup";

interface Props {
  warnings: readonly StackupWarning[];
  /** Chooses the layer that a warning is about. */
  onPick: (index: number) => void;
}

const ORDER = { error: 0, warning: 1, info: 2 } as const;
const LOOK = {
  error: { word: "error", className: "text-fail", shape: "fail" },
  warning: { word: "warning", className: "text-near", shape: "near" },
  info: { word: "remark", className: "text-ink-soft", shape: "no data" },
} as const;

/** What is missing, harmful or unusual in the stackup; each leads to its layer. */
export function WarningsList({ warnings, onPick }: Props) {
  const sorted = [...warnings].sort((a, b) => ORDER[a.severity] - ORDER[b.severity]);
  return (
    <section aria-label="Remarks on the stackup" className="mt-6">
      <h2 className="mb-1 text-base font-semibold">Remarks</h2>
      {sorted.length === 0 ? (
        <p className="text-ink-soft text-sm">Nothing is missing, and the build is symmetric.</p>
      ) : (
        <ul className="border-rule-line border-t text-sm">
          {sorted.map((warning) => {
            const look = LOOK[warning.severity];
            const { layer } = warning;
            const words = (
              <>
                <svg
                  width="12"
                  height="12"
                  viewBox="0 0 12 12"
                  aria-hidden="true"
                  className={`mt-1 shrink-0 ${look.className}`}
                >
                  <VerdictShape verdict={look.shape} />
                </svg>
                <span className="sr-only">{look.word}: </span>
                <span>{warning.message}</span>
              </>
            );
            return (
              <li
                key={`${warning.code} ${layer} ${warning.message}`}
                className="border-rule-line/60 border-b"
              >
                {layer === null ? (
                  <span className="flex gap-2 px-2 py-1.5">{words}</span>
                ) : (
                  <button
                    type="button"
                    onClick={() => onPick(layer)}
                    className="hover:bg-rule-line/30 flex w-full gap-2 px-2 py-1.5 text-left -outline-offset-2"
                  >
                    {words}
                  </button>
                )}
              </li>
            );
          })}
        </ul>
      )}
    </section>
  );
}
