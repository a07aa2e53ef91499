import type { WidthPoint } from "@/lib/resolve/width-points";
import type { ResolvedPath } from "@/lib/si/path/types";
import type { PathResult, RuleDefinition, Verdict } from "@/lib/si/rules/types";

/** What the page of a net is made of; read on the server, all of one run or all of the draft as it is. */
export interface NetFacts {
  projectId: string;
  revision: { letter: string; state: "draft" | "released" };
  path: ResolvedPath;
  /** every rule, passes included, by this engine */
  result: PathResult;
  rules: RuleSummary[];
  /** null: the revision as it is now */
  run: RunFacts | null;
  /** widths of the main line's layer and what they give */
  widths: WidthPoint[];
  problems: ProblemFacts[];
  /** flags of the path as a whole */
  pathFlags: FlagFacts[];
  people: { userId: string; name: string }[];
  may: { flag: boolean; comment: boolean; waive: boolean };
  around: Around | null;
}

export type RuleSummary = Pick<RuleDefinition, "id" | "title" | "measures" | "direction">;

export interface RunFacts {
  id: string;
  number: number;
  /** the inputs were edited since */
  outdated: boolean;
  /** it was judged by another engine than the one that draws */
  otherEngine: string | null;
}

export interface ProblemFacts {
  id: string;
  mechanism: string;
  title: string;
  verdict: Exclude<Verdict, "pass">;
  worstRule: string;
  cause: string | null;
  missing: string | null;
  flags: FlagFacts[];
  waiver: WaiverFacts | null;
}

export interface FlagFacts {
  id: string;
  state: "open" | "resolved";
  version: number;
  assigneeUserId: string | null;
  assigneeName: string | null;
  entries: { id: string; at: number; comment: string; authorName: string | null }[];
}

export interface WaiverFacts {
  id: string;
  state: string;
  covers: boolean;
  reason: string;
  /** what changed since it was granted */
  remark: string;
  authorName: string | null;
  expiresAt: number;
}

/** The paths with problems before and after this one in the run's list. */
export interface Around {
  position: number;
  total: number;
  previous: { href: string; name: string } | null;
  next: { href: string; name: string } | null;
  back: string;
}
