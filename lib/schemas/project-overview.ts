import type { ReleaseBlocker } from "./release";
import type { RevisionSummary } from "./project";

export interface OverviewRun {
  id: string;
  number: number;
  state: "queued" | "running" | "done" | "cancelled" | "failed";
  done: number;
  total: number;
  finishedAt: number | null;
  /** paths by verdict */
  counts: Record<string, number> | null;
  /** whether it judged the revision as it is now */
  current: boolean;
}

export interface ProjectOverview {
  project: { id: string; name: string; description: string; archived: boolean; draftLetter: string | null };
  revision: RevisionSummary;
  /** nets by scope: they stand beside the verdicts, which are of paths in scope */
  scopes: { in: number; out: number; incomplete: number };
  openFlags: number;
  /** a check under way */
  running: OverviewRun | null;
  /** the newest finished check */
  run: OverviewRun | null;
  /** problems that a waiver covers */
  waived: number;
  /** what stands in the way of a release; null where it is released */
  blockers: ReleaseBlocker[] | null;
  edits: { id: string; at: number; actorName: string; summary: string; undone: boolean }[];
}
