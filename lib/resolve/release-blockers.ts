import type { ReleaseBlocker } from "@/lib/schemas/release";

/** What is known of a draft and the run that a release would rest on. */
export interface ReleaseReadiness {
  run: { number: number; state: string; inputHash: string } | null;
  draftInputHash: string;
  /** paths of the run with a verdict other than no data */
  judgedPaths: number;
  /** problems of verdict fail that no waiver covers */
  failuresNotWaived: number;
  /** missing inputs that nobody accepted, each with the paths it holds back */
  missingNotAccepted: { missing: string; paths: number }[];
  /** lines that the fabricator cannot tell apart, each in words */
  lineConflicts: readonly string[];
  openFlags: number;
  signedOff: boolean;
  /** whether the person who would sign made an edit of this draft */
  signerEdited: boolean;
}

/** Everything that stands in the way of a release, each with its way out; empty when nothing does. */
export function releaseBlockers(facts: ReleaseReadiness): ReleaseBlocker[] {
  const { run } = facts;
  if (!run) return [{ kind: "no run", text: "The draft has not been checked. Start a run.", count: null }];
  if (run.state !== "done")
    return [
      {
        kind: "unfinished run",
        text:
          run.state === "failed"
            ? `Run ${run.number} failed. Start another.`
            : `Run ${run.number} is ${run.state}. Let it finish or start another.`,
        count: null,
      },
    ];
  const blockers: ReleaseBlocker[] = [];
  if (run.inputHash !== facts.draftInputHash)
    blockers.push({
      kind: "stale run",
      text: `The draft was edited after run ${run.number}. Run the check again.`,
      count: null,
    });
  if (facts.judgedPaths === 0)
    blockers.push({
      kind: "nothing judged",
      text: `Run ${run.number} judged no path: each has no data. Switch a rule on or fill in what is missing, then run the check again.`,
      count: null,
    });
  if (facts.failuresNotWaived > 0)
    blockers.push({
      kind: "failures",
      text: `${facts.failuresNotWaived} ${plural(facts.failuresNotWaived, "failing problem is", "failing problems are")} not waived. Cure or waive each.`,
      count: facts.failuresNotWaived,
    });
  if (facts.missingNotAccepted.length > 0) {
    const paths = facts.missingNotAccepted.reduce((sum, entry) => sum + entry.paths, 0);
    blockers.push({
      kind: "no data",
      text: `${paths} ${plural(paths, "path has", "paths have")} no data for ${facts.missingNotAccepted.length} ${plural(facts.missingNotAccepted.length, "reason", "reasons")} that nobody accepted. Fill the input or accept it with a reason.`,
      count: paths,
    });
  }
  if (facts.lineConflicts.length > 0) {
    const more = facts.lineConflicts.length - 1;
    blockers.push({
      kind: "lines",
      text: `The fabricator cannot tell lines apart: ${facts.lineConflicts[0]}${more > 0 ? `, and ${more} more` : ""}. Give them one target and tolerance, or widths that differ by 2.5 µm or more.`,
      count: facts.lineConflicts.length,
    });
  }
  if (facts.openFlags > 0)
    blockers.push({
      kind: "flags",
      text: `${facts.openFlags} ${plural(facts.openFlags, "flag is", "flags are")} open. Resolve each.`,
      count: facts.openFlags,
    });
  if (!facts.signedOff)
    blockers.push({
      kind: "editor signs",
      text: facts.signerEdited
        ? "Nobody has signed off this run. You edited this draft, so another reviewer signs."
        : "Nobody has signed off this run. A reviewer who made no edit of the draft signs.",
      count: null,
    });
  return blockers;
}

function plural(count: number, one: string, many: string): string {
  return count === 1 ? one : many;
}
