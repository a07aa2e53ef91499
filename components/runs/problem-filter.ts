import { type ProblemEntry, problemKey, type ProblemReview } from "@/lib/schemas/problem-list";

/** A problem with its flag, its waiver and its acceptance. */
export interface WorkedProblem extends ProblemEntry, ProblemReview {
  key: string;
}

export interface ProblemFilter {
  verdict: "fail" | "near" | "no data" | null;
  className: string | null;
  rule: string | null;
  severity: "error" | "warning" | "info" | null;
  waived: "yes" | "no" | null;
  flagged: "yes" | "no" | null;
  mine: boolean;
  nominal: "nominal" | "corner" | null;
  missing: string | null;
  text: string;
}

export const NO_FILTER: ProblemFilter = {
  verdict: null,
  className: null,
  rule: null,
  severity: null,
  waived: null,
  flagged: null,
  mine: false,
  nominal: null,
  missing: null,
  text: "",
};

/** The class of nets that have none. */
export const NO_CLASS = "no class";

interface FlagOf {
  id: string;
  version: number;
  state: "open" | "resolved";
  subjectKind: string;
  subjectLineageId: string;
  mechanism: string | null;
  assigneeUserId: string | null;
  assigneeName: string | null;
}
interface WaiverOf {
  id: string;
  pathLineageId: string;
  mechanism: string;
  createdAt: number;
  judged: {
    state: "active" | "carried" | "look again" | "void" | "expired" | "revoked";
    covers: boolean;
    reason: string;
  };
}

/** Joins what a run found with what people said of it; a flag on a whole path counts for each of its problems. */
export function joinReview(
  problems: readonly ProblemEntry[],
  flags: readonly FlagOf[],
  waivers: readonly WaiverOf[],
  accepted: readonly { missing: string; reason: string }[],
): WorkedProblem[] {
  const flagOf = new Map<string, FlagOf>();
  for (const flag of flags)
    if (flag.state === "open") flagOf.set(`${flag.subjectLineageId} ${flag.mechanism ?? ""}`, flag);
  const waiverOf = new Map<string, WaiverOf>();
  // The newest waiver speaks, but one that covers outranks any that does not.
  for (const waiver of [...waivers].sort((a, b) => a.createdAt - b.createdAt)) {
    const key = `${waiver.pathLineageId} ${waiver.mechanism}`;
    if (waiver.judged.covers || !waiverOf.get(key)?.judged.covers) waiverOf.set(key, waiver);
  }
  const reasonOf = new Map(accepted.map((entry) => [entry.missing, entry.reason]));
  return problems.map((problem) => {
    const key = problemKey(problem);
    const waiver = waiverOf.get(key);
    return {
      ...problem,
      key,
      flag: flagOf.get(key) ?? flagOf.get(`${problem.pathId} `) ?? null,
      waiver: waiver && waiver.judged.state !== "revoked" ? { id: waiver.id, ...waiver.judged } : null,
      accepted: problem.missing === null ? null : (reasonOf.get(problem.missing) ?? null),
    };
  });
}

/** The problems that a filter leaves, in their order. */
export function filterProblems(
  problems: readonly WorkedProblem[],
  filter: ProblemFilter,
  userId: string,
): WorkedProblem[] {
  const words = filter.text.toLowerCase().split(/\s+/).filter(Boolean);
  return problems.filter(
    (problem) =>
      (filter.verdict === null || problem.verdict === filter.verdict) &&
      (filter.className === null || (problem.className ?? NO_CLASS) === filter.className) &&
      (filter.rule === null || rulesOf(problem).includes(filter.rule)) &&
      (filter.severity === null || problem.severity === filter.severity) &&
      (filter.waived === null || isExcused(problem) === (filter.waived === "yes")) &&
      (filter.flagged === null || (problem.flag !== null) === (filter.flagged === "yes")) &&
      (!filter.mine || problem.flag?.assigneeUserId === userId) &&
      (filter.nominal === null || (filter.nominal === "nominal") === problem.failsAtNominal) &&
      (filter.missing === null || problem.missing === filter.missing) &&
      (words.length === 0 || words.every((word) => textOf(problem).includes(word))),
  );
}

/** Every rule that a problem touches, its worst one among them. */
export const rulesOf = (problem: Pick<ProblemEntry, "rules" | "rule">): string[] =>
  problem.rules === "" ? [problem.rule] : problem.rules.split(",");

/** Excused: waived, or its missing input accepted. */
export function isExcused(problem: WorkedProblem): boolean {
  return problem.waiver?.covers === true || problem.accepted !== null;
}

function textOf(problem: WorkedProblem): string {
  return `${problem.path} ${problem.className ?? ""} ${problem.title} ${problem.rule} ${problem.driver ?? ""} ${problem.layers} ${problem.missing ?? ""}`.toLowerCase();
}
