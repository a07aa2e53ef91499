import { Flag } from "lucide-react";
import type { DataColumn } from "@/components/ui/data-table";
import { VerdictMark } from "@/components/ui/verdict-mark";
import { measure, shareText } from "./measure";
import { isExcused, type WorkedProblem } from "./problem-filter";
import { ruleTitle } from "./rule-title";

/** Worst first: failures by their margin as a share of the limit, then near, then no data. */
const RANK = { fail: 0, near: 1, "no data": 2 } as const;
export function severityOrder(problem: WorkedProblem): number {
  return RANK[problem.verdict] * 1e6 + Math.max(-1e5, Math.min(1e5, problem.share ?? 0));
}

const verdict: DataColumn<WorkedProblem> = {
  id: "verdict",
  header: "Verdict",
  width: 92,
  sortValue: severityOrder,
  explanation: "Sorts worst first: by verdict, then by margin as a share of the limit.",
  cell: (problem) => <VerdictMark verdict={problem.verdict} />,
};
const path: DataColumn<WorkedProblem> = {
  id: "path",
  header: "Path",
  width: 150,
  kind: "mono",
  sortValue: (problem) => problem.path,
  cell: (problem) => <span title={problem.path}>{problem.path}</span>,
};
const title: DataColumn<WorkedProblem> = {
  id: "problem",
  header: "Problem",
  sortValue: (problem) => problem.title,
  cell: (problem) => <span title={problem.title}>{problem.title}</span>,
};
const rule: DataColumn<WorkedProblem> = {
  id: "rule",
  header: "Worst rule",
  width: 140,
  sortValue: (problem) => ruleTitle(problem.rule),
  cell: (problem) => (problem.verdict === "no data" ? <Absent /> : ruleTitle(problem.rule)),
};
const value: DataColumn<WorkedProblem> = {
  id: "value",
  header: "Value",
  kind: "number",
  width: 132,
  number: (problem) => measure(problem.value, problem.unit),
};
const margin: DataColumn<WorkedProblem> = {
  id: "margin",
  header: "Margin",
  kind: "number",
  width: 136,
  sortValue: (problem) => problem.share,
  explanation: "Signed; negative is over the limit. Sorts by its share of the limit.",
  number: (problem) => measure(problem.margin, problem.unit, { signed: true }),
};
const share: DataColumn<WorkedProblem> = {
  id: "share",
  header: "Of limit",
  kind: "number",
  width: 84,
  sortValue: (problem) => problem.share,
  number: (problem) =>
    problem.share === null ? null : { text: shareText(problem.share).slice(0, -2), unit: "%" },
};
const corner: DataColumn<WorkedProblem> = {
  id: "corner",
  header: "Worst corner",
  width: 128,
  sortValue: (problem) => problem.corner,
  explanation: "Driver speed, then the side of the impedance's tolerance.",
  cell: (problem) => problem.corner ?? <Absent />,
};
const failsAt: DataColumn<WorkedProblem> = {
  id: "fails",
  header: "Fails at",
  width: 164,
  sortValue: (problem) => (problem.failsAtNominal ? 1000 : 0) + problem.failsAt,
  explanation: "How many of the corners fail, and whether the nominal one is among them.",
  cell: (problem) => failsText(problem) ?? <Absent />,
};
const className: DataColumn<WorkedProblem> = {
  id: "class",
  header: "Class",
  width: 100,
  sortValue: (problem) => problem.className,
  cell: (problem) => problem.className ?? <Absent />,
};
const flag: DataColumn<WorkedProblem> = {
  id: "flag",
  header: "Flag",
  width: 116,
  sortValue: (problem) => (problem.flag ? (problem.flag.assigneeName ?? "~") : null),
  cell: (problem) =>
    problem.flag ? (
      <span className="text-copper inline-flex max-w-full items-center gap-1.5">
        <Flag size={13} aria-hidden="true" className="shrink-0" />
        <span className="truncate">{problem.flag.assigneeName ?? "nobody’s yet"}</span>
      </span>
    ) : (
      <Absent />
    ),
};
const waiver: DataColumn<WorkedProblem> = {
  id: "waiver",
  header: "Waiver",
  width: 104,
  sortValue: (problem) => problem.waiver?.state ?? (problem.accepted ? "accepted" : null),
  cell: (problem) => <WaiverCell problem={problem} />,
};

export const problemColumns: readonly DataColumn<WorkedProblem>[] = [
  verdict,
  path,
  title,
  rule,
  value,
  margin,
  share,
  corner,
  failsAt,
  className,
  flag,
  waiver,
];

/** Beside an open panel, which tells the rest. */
export const narrowColumns: readonly DataColumn<WorkedProblem>[] = [
  { ...verdict, width: 84 },
  path,
  { ...rule, width: 130 },
  { ...margin, width: 132 },
  { ...failsAt, width: 150 },
  { ...flag, width: 100 },
];

/** "fails at 3 of 9, corner only"; null where nothing was judged. */
export function failsText(
  problem: Pick<WorkedProblem, "failsAt" | "ofCorners" | "failsAtNominal" | "verdict">,
) {
  if (problem.ofCorners === 0 || problem.verdict !== "fail") return null;
  const where = problem.failsAtNominal ? "at nominal" : "corner only";
  return problem.ofCorners === 1 ? where : `${problem.failsAt} of ${problem.ofCorners}, ${where}`;
}

function WaiverCell({ problem }: { problem: WorkedProblem }) {
  if (problem.waiver?.covers) return <VerdictMark verdict="waived" />;
  if (problem.waiver) return <span className="text-near">{problem.waiver.state}</span>;
  return problem.accepted ? <span className="text-waived">accepted</span> : <Absent />;
}

function Absent() {
  return <span className="text-ink-soft">–</span>;
}

/** Excused rows are hatched, never hidden. */
export const problemRowClass = (problem: WorkedProblem) => (isExcused(problem) ? "hatched" : undefined);
