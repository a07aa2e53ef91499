import { type ShownVerdict, VERDICT_INK, verdictMark } from "@/lib/drawings/verdict-mark";
import { Hatches, Marks } from "./mark";

/** A verdict's shape with its word: never one without the other. `quiet` keeps the word for readers of the page only. */
export function VerdictIcon({ verdict, quiet = false }: { verdict: ShownVerdict; quiet?: boolean }) {
  const scope = `v${verdict.replace(" ", "")}`;
  return (
    <span
      className="inline-flex items-center gap-1.5 whitespace-nowrap"
      style={{ color: `var(--${VERDICT_INK[verdict]})` }}
    >
      <svg width={16} height={16} viewBox="0 0 16 16" aria-hidden className="shrink-0">
        {verdict === "waived" ? (
          <defs>
            <Hatches scope={scope} />
          </defs>
        ) : null}
        <Marks marks={verdictMark(verdict, 8, 8)} scope={scope} />
      </svg>
      <span className={quiet ? "sr-only" : undefined}>{verdict}</span>
    </span>
  );
}
