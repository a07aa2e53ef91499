import { mechanismTitles } from "@/lib/si/rules";
import { ruleTitle } from "./rule-title";
import { NO_CLASS, type WorkedProblem } from "./problem-filter";

export const GROUPINGS = ["mechanism", "class", "driver", "layer", "rule", "missing input", "none"] as const;
export type Grouping = (typeof GROUPINGS)[number];

/** Problems that have something in common, with the member that is worst and the one in the middle. */
export interface ProblemGroup {
  key: string;
  title: string;
  count: number;
  fail: number;
  near: number;
  noData: number;
  worst: WorkedProblem | null;
  typical: WorkedProblem | null;
  /** margins in percent of their limits */
  margins: number[];
}

/** Beyond this a margin says no more than "far out", and would press the others of its picture together. */
const LEAST_PERCENT = -200;

/** What a problem is grouped by; null: it has no part in this grouping. */
export function groupOf(problem: WorkedProblem, by: Grouping): string | null {
  switch (by) {
    case "mechanism":
      return problem.mechanism;
    case "class":
      return problem.className ?? NO_CLASS;
    case "driver":
      return problem.driver ?? "no driver";
    case "layer":
      return problem.layers || "no layer";
    case "rule":
      return problem.rule;
    case "missing input":
      return problem.missing;
    case "none":
      return "";
  }
}

/** What a group is called on screen. */
function groupTitle(key: string, by: Grouping): string {
  if (by === "mechanism") return mechanismTitles[key] ?? key;
  return by === "rule" ? ruleTitle(key) : key;
}

/** Groups with failures first, by how many; then near, then no data. */
export function groupProblems(problems: readonly WorkedProblem[], by: Grouping): ProblemGroup[] {
  if (by === "none") return [];
  const members = new Map<string, WorkedProblem[]>();
  for (const problem of problems) {
    const key = groupOf(problem, by);
    if (key === null) continue;
    const list = members.get(key);
    if (list) list.push(problem);
    else members.set(key, [problem]);
  }
  return [...members]
    .map(([key, list]) => describe(key, groupTitle(key, by), list))
    .sort(
      (a, b) => b.fail - a.fail || b.near - a.near || b.count - a.count || a.title.localeCompare(b.title),
    );
}

function describe(key: string, title: string, list: WorkedProblem[]): ProblemGroup {
  const known = list
    .filter((problem) => problem.share !== null)
    .sort((a, b) => (a.share ?? 0) - (b.share ?? 0));
  const of = (verdict: WorkedProblem["verdict"]) =>
    list.filter((problem) => problem.verdict === verdict).length;
  return {
    key,
    title,
    count: list.length,
    fail: of("fail"),
    near: of("near"),
    noData: of("no data"),
    worst: known[0] ?? null,
    typical: known[Math.floor((known.length - 1) / 2)] ?? null,
    margins: known.map((problem) => Math.max(LEAST_PERCENT, 100 * (problem.share ?? 0))),
  };
}
