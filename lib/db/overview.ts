import "server-only";
import type { Actor } from "@/lib/schemas/actor";
import type { ProjectOverview } from "@/lib/schemas/project-overview";
import { listEdits } from "./edit";
import { countScopes } from "./net";
import { getProject } from "./project";
import { releaseReadiness } from "./release";
import { countOpenFlags } from "./review";
import { findRevision } from "./revision";
import { latestDoneRun, latestRun } from "./run";
import { currentInputHash } from "./snapshot";
import { coveredProblems } from "./waiver";

const EDITS_SHOWN = 8;

/** What one sees first of a project: what was judged and how, what was not, and what keeps it from release. */
export async function readOverview(
  actor: Actor,
  projectId: string,
  letter?: string,
): Promise<ProjectOverview> {
  const [project, revision] = await Promise.all([
    getProject(actor, projectId),
    findRevision(actor, projectId, letter),
  ]);
  const [scopes, openFlags, newest, judged, edits, inputHash] = await Promise.all([
    countScopes(actor, revision),
    countOpenFlags(actor, projectId),
    latestRun(actor, revision.id),
    latestDoneRun(actor, revision.id),
    listEdits(actor, revision.id, EDITS_SHOWN),
    currentInputHash(actor, revision.id),
  ]);
  const readiness =
    revision.state === "draft" ? await releaseReadiness(actor, projectId, revision.id, inputHash) : null;
  return {
    project: {
      id: project.id,
      name: project.name,
      description: project.description,
      archived: revision.archived,
      draftLetter: project.draftLetter,
    },
    revision: {
      id: revision.id,
      letter: revision.letter,
      state: revision.state,
      createdAt: revision.createdAt,
      releasedAt: revision.releasedAt,
    },
    scopes,
    openFlags,
    running:
      newest && (newest.state === "queued" || newest.state === "running")
        ? runFacts(newest, inputHash)
        : null,
    run: judged ? runFacts(judged, inputHash) : null,
    waived: readiness
      ? readiness.waived
      : judged
        ? (await coveredProblems(actor, projectId, judged)).size
        : 0,
    blockers: readiness?.blockers ?? null,
    edits: edits.map(({ id, at, actorName, summary, undoneAt }) => ({
      id,
      at,
      actorName,
      summary,
      undone: undoneAt !== null,
    })),
  };
}

function runFacts(run: NonNullable<Awaited<ReturnType<typeof latestRun>>>, inputHash: string) {
  return {
    id: run.id,
    number: run.number,
    state: run.state,
    done: run.done,
    total: run.total,
    finishedAt: run.finishedAt,
    counts: run.counts,
    current: run.inputHash === inputHash,
  };
}
