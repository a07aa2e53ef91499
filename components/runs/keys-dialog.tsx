"use client";

import { Dialog } from "@/components/ui/dialog";

const KEYS: readonly [keys: string, does: string][] = [
  ["j, k", "next problem, the one before"],
  ["Enter", "open the net of the problem"],
  ["f", "flag it, or what is selected"],
  ["w", "waive it, or what is selected (reviewers)"],
  ["x", "select it, or take it out"],
  ["/", "search"],
  ["Esc", "close the panel"],
  ["?", "this list"],
];

/** The keys of the table of problems. */
export function KeysDialog({ open, onOpenChange }: { open: boolean; onOpenChange: (open: boolean) => void }) {
  return (
    <Dialog open={open} onOpenChange={onOpenChange} title="Keys">
      <dl className="grid grid-cols-[auto_1fr] gap-x-6 gap-y-2 text-sm">
        {KEYS.map(([keys, does]) => (
          <div key={keys} className="contents">
            <dt>
              <kbd className="border-field-line rounded border px-1.5 font-mono text-xs">{keys}</kbd>
            </dt>
            <dd>{does}</dd>
          </div>
        ))}
      </dl>
    </Dialog>
  );
}
