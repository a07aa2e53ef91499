import { mechanismTitles } from "./catalogue";
import type { Finding, Problem, Verdict } from "./types";

const rank: Record<Verdict, number> = { fail: 0, "no data": 1, near: 2, pass: 3 };

/** The verdict of a path: fail before no data before near before pass, over the findings that count. */
export function pathVerdict(findings: readonly Finding[]): Verdict {
  const counted = findings.filter((finding) => finding.counts);
  // A path of which nothing could be judged never passes.
  if (counted.length === 0) return "no data";
  return counted.reduce<Verdict>(
    (worst, { verdict }) => (rank[verdict] < rank[worst] ? verdict : worst),
    "pass",
  );
}

/**
 * The findings that are no pass and count, grouped by mechanism: what is listed, flagged and waived as one. Selectors
 * of a simulated path make no problem of their own.
 */
export function groupProblems(findings: readonly Finding[]): Problem[] {
  const groups = new Map<string, number[]>();
  findings.forEach((finding, index) => {
    if (finding.verdict === "pass" || !finding.counts) return;
    const list = groups.get(finding.mechanism);
    if (list) list.push(index);
    else groups.set(finding.mechanism, [index]);
  });
  const problems: Problem[] = [];
  for (const [mechanism, indexes] of groups) {
    indexes.sort((a, b) => compare(findings[a], findings[b]) || a - b);
    const worst = findings[indexes[0] ?? -1];
    if (!worst || worst.verdict === "pass") continue;
    const title =
      mechanism === "missing input" && worst.missing
        ? `Missing: ${worst.missing}`
        : (mechanismTitles[mechanism] ?? mechanism);
    problems.push({ mechanism, title, verdict: worst.verdict, findings: indexes, cause: worst.cause });
  }
  return problems.sort((a, b) => rank[a.verdict] - rank[b.verdict]);
}

const severities = { error: 0, warning: 1, info: 2 };

function compare(a: Finding | undefined, b: Finding | undefined): number {
  if (!a || !b) return 0;
  return (
    rank[a.verdict] - rank[b.verdict] ||
    severities[a.severity] - severities[b.severity] ||
    b.failsAt - a.failsAt ||
    relative(a) - relative(b)
  );
}

/** Margin as a share of the limit, so that volts and percent compare. */
function relative({ margin, limit }: Finding): number {
  return margin === null ? -Infinity : margin / Math.max(Math.abs(limit ?? 1), 1e-9);
}
