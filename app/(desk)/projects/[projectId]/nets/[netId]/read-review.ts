import type { Around, FlagFacts, NetFacts, ProblemFacts, WaiverFacts } from "@/components/net-page/facts";
import { getFlag, listFlags } from "@/lib/db/review";
import { getRunPath, listProblems, type RunRow } from "@/lib/db/run";
import { listWaivers, type WaiverView } from "@/lib/db/waiver";
import type { Actor } from "@/lib/schemas/actor";

type Review = Pick<NetFacts, "problems" | "pathFlags" | "around">;

/** What a run found on a path, with the flags and waivers on it, and where it stands in the run's list. */
export async function readReview(
  actor: Actor,
  projectId: string,
  run: RunRow | null,
  pathId: string,
): Promise<Review> {
  const flags = (await listFlags(actor, projectId)).filter((flag) => flag.subjectLineageId === pathId);
  const threads = await Promise.all(
    flags.map(async (flag) => ({
      mechanism: flag.mechanism,
      facts: await thread(actor, projectId, flag.id),
    })),
  );
  const of = (mechanism: string | null) =>
    threads.filter((entry) => entry.mechanism === mechanism).map((entry) => entry.facts);
  if (!run) return { problems: [], pathFlags: threads.map((entry) => entry.facts), around: null };
  const [{ problems }, waivers, all] = await Promise.all([
    getRunPath(actor, projectId, run.id, pathId),
    listWaivers(actor, projectId, run),
    listProblems(actor, projectId, run.id),
  ]);
  const known = new Set(problems.map((problem) => problem.mechanism));
  return {
    problems: problems.map((problem): ProblemFacts => ({
      id: problem.id,
      mechanism: problem.mechanism,
      title: problem.title,
      verdict: problem.verdict,
      worstRule: problem.worstRule,
      cause: problem.cause,
      missing: problem.missing,
      flags: of(problem.mechanism),
      waiver: waiverFacts(waivers, pathId, problem.mechanism),
    })),
    // A flag on what is no longer a problem is not lost: it stands with those of the path.
    pathFlags: threads
      .filter(({ mechanism }) => mechanism === null || !known.has(mechanism))
      .map((entry) => entry.facts),
    around: aroundOf(projectId, run.id, all, pathId),
  };
}

async function thread(actor: Actor, projectId: string, flagId: string): Promise<FlagFacts> {
  const { flag, entries } = await getFlag(actor, projectId, flagId);
  return {
    id: flag.id,
    state: flag.state,
    version: flag.version,
    assigneeUserId: flag.assigneeUserId,
    assigneeName: flag.assigneeName,
    entries: entries.map(({ id, at, comment, authorName }) => ({ id, at, comment, authorName })),
  };
}

/** The newest that still counts, else the newest. */
function waiverFacts(waivers: readonly WaiverView[], pathId: string, mechanism: string): WaiverFacts | null {
  const own = waivers.filter((waiver) => waiver.pathLineageId === pathId && waiver.mechanism === mechanism);
  const found = own.find((waiver) => waiver.judged.covers) ?? own[0];
  if (!found) return null;
  return {
    id: found.id,
    state: found.judged.state,
    covers: found.judged.covers,
    reason: found.reason,
    remark: found.judged.reason,
    authorName: found.authorName,
    expiresAt: found.expiresAt,
  };
}

function aroundOf(
  projectId: string,
  runId: string,
  problems: readonly { id: string; pathId: string; pathName: string }[],
  pathId: string,
): Around | null {
  const paths = [...new Map(problems.map((problem) => [problem.pathId, problem])).values()].filter(
    // A controlled line is drawn on the impedance page.
    (problem) => !problem.pathId.startsWith("line "),
  );
  const at = paths.findIndex((problem) => problem.pathId === pathId);
  const here = paths[at];
  if (!here) return null;
  const step = (to: (typeof paths)[number] | undefined) =>
    to ? { href: `/projects/${projectId}/nets/${to.pathId}?run=${runId}`, name: to.pathName } : null;
  return {
    position: at + 1,
    total: paths.length,
    previous: step(paths[at - 1]),
    next: step(paths[at + 1]),
    back: `/projects/${projectId}/runs/${runId}?at=${here.id}`,
  };
}
