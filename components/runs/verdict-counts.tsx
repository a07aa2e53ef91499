import { VerdictBar } from "@/components/charts/verdict-bar";
import type { VerdictCounts } from "@/lib/drawings/verdict-bar.geometry";

/** Paths by verdict, in the names that the drawings use; zero where a run has not counted yet. */
export function verdictCounts(counts: Record<string, number> | null): VerdictCounts {
  return {
    fail: counts?.fail ?? 0,
    near: counts?.near ?? 0,
    "no data": counts?.["no data"] ?? 0,
    pass: counts?.pass ?? 0,
  };
}

export function RunCounts({
  counts,
  width,
  bare,
}: {
  counts: Record<string, number> | null;
  width: number;
  bare?: boolean;
}) {
  return (
    <VerdictBar
      counts={verdictCounts(counts)}
      width={width}
      bare={bare}
      noun="paths"
      title="Paths by verdict"
    />
  );
}
