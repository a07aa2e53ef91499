import type { Route } from "next";
import Link from "next/link";
import type { ProjectOverview } from "@/lib/schemas/project-overview";

const ROWS = [
  { scope: "in", label: "In scope", meaning: "judged by the next run" },
  { scope: "out", label: "Out of scope", meaning: "power, ground, static or test" },
  { scope: "incomplete", label: "Incomplete route", meaning: "islands, loops or one pin: not judged" },
] as const;

/** Nets by scope: they stand beside the verdicts, so that nobody takes a judged part for the whole board. */
export function ScopeCounts({ scopes, base }: { scopes: ProjectOverview["scopes"]; base: string }) {
  return (
    <section aria-labelledby="scopes">
      <h2 id="scopes" className="mb-2 text-lg font-semibold">
        Nets
      </h2>
      <ul className="border-rule-line bg-sheet border-y text-sm">
        {ROWS.map(({ scope, label, meaning }) => (
          <li
            key={scope}
            className="border-rule-line/60 flex min-h-8 flex-wrap items-center gap-x-3 border-b px-3 py-1 last:border-b-0"
          >
            <span className="w-16 text-right tabular-nums">{scopes[scope].toLocaleString("en")}</span>
            <Link href={`${base}/nets?scope=${scope}` as Route} className="font-medium hover:underline">
              {label}
            </Link>
            <span className="text-ink-soft">{meaning}</span>
          </li>
        ))}
      </ul>
    </section>
  );
}
