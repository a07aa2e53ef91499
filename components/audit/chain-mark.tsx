import { ShieldAlert, ShieldCheck } from "lucide-react";
import type { AuditAnswer } from "@/lib/client/audit";

/** Whether each entry still follows from the one before, as just recomputed. */
export function ChainMark({ chain }: { chain: AuditAnswer["chain"] }) {
  if (!chain.intact)
    return (
      <p role="alert" className="text-fail flex items-center gap-2 text-sm">
        <ShieldAlert size={16} aria-hidden="true" />
        The chain breaks at entry {chain.brokenAt}: it, or one before it, was altered outside Ringfence.
        Compare with a backup.
      </p>
    );
  return (
    <p className="text-pass flex flex-wrap items-center gap-2 text-sm">
      <ShieldCheck size={16} aria-hidden="true" />
      Chain verified: {chain.entries.toLocaleString("en")} {chain.entries === 1 ? "entry" : "entries"}.
      <span className="text-ink-soft">
        Last hash <span className="font-mono text-xs">{chain.lastHash.slice(0, 16)}</span>
      </span>
    </p>
  );
}
