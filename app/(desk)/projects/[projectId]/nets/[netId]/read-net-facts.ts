import type { NetFacts } from "@/components/net-page/facts";
import { getNet } from "@/lib/db/net";
import { boardOfRevision, boardOfRun, type BoardOfInputs } from "@/lib/db/resolved-board";
import { listAssignees } from "@/lib/db/review";
import { findRevision, getRevision, type RevisionRef } from "@/lib/db/revision";
import { getRun, latestDoneRun, type RunRow } from "@/lib/db/run";
import { currentInputHash } from "@/lib/db/snapshot";
import { widthTable } from "@/lib/resolve/width-table";
import { whatIfStart } from "@/lib/resolve/what-if";
import { can, type Actor } from "@/lib/schemas/actor";
import { id } from "@/lib/schemas/common";
import { NotFoundError } from "@/lib/schemas/errors";
import type { ResolvedPath } from "@/lib/si/path/types";
import { checkPath } from "@/lib/si/rules/check-path";
import { allCorners } from "@/lib/si/rules/corners";
import { ruleCatalogue } from "@/lib/si/rules/catalogue";
import { engineVersion } from "@/lib/si/version";
import { readReview } from "./read-review";

/** The run that an address asks for, "now" for the revision as it is, null for the newest finished one. */
export interface Asked {
  run: string | null;
  revision: string | null;
}

/** A net that is not judged, or a path with all that its page shows. */
export type NetRead =
  { kind: "path"; facts: NetFacts } | { kind: "out of scope"; name: string; reason: string; scope: string };

/** @throws NotFoundError where project, run or net are not there, or not the actor's to see */
export async function readNetFacts(
  actor: Actor,
  projectId: string,
  netId: string,
  asked: Asked,
): Promise<NetRead> {
  if (!id.safeParse(netId).success) throw new NotFoundError("This net");
  const { revision, run } = await chooseRun(actor, projectId, asked);
  const seen = run ? await boardOfRun(actor, run) : await boardOfRevision(actor, revision);
  const lineageId = await lineageOf(actor, revision, seen, netId);
  const path = seen.board.paths.find((entry) => holds(entry, lineageId));
  if (!path) {
    const out = seen.board.outOfScope.find((entry) => entry.lineageId === lineageId);
    if (!out) throw new NotFoundError("This net");
    return { kind: "out of scope", name: out.name, reason: out.reason, scope: out.kind };
  }
  const [review, people, outdated] = await Promise.all([
    readReview(actor, projectId, run, path.id),
    listAssignees(actor, projectId),
    run && revision.state === "draft"
      ? currentInputHash(actor, revision.id).then((hash) => hash !== run.inputHash)
      : false,
  ]);
  return {
    kind: "path",
    facts: {
      projectId,
      revision: { letter: revision.letter, state: revision.state },
      path,
      result: checkPath(path, { corners: [...allCorners] }),
      rules: ruleCatalogue.map(({ id, title, measures, direction }) => ({ id, title, measures, direction })),
      run: run && {
        id: run.id,
        number: run.number,
        outdated,
        otherEngine: run.engineVersion === engineVersion ? null : run.engineVersion,
      },
      widths: widthsOf(path, seen),
      people: people.map(({ userId, name }) => ({ userId, name })),
      may: {
        flag: run !== null && can(actor, "review:flag"),
        comment: can(actor, "review:comment"),
        waive: run !== null && can(actor, "review:waive"),
      },
      ...review,
    },
  };
}

async function chooseRun(
  actor: Actor,
  projectId: string,
  asked: Asked,
): Promise<{ revision: RevisionRef; run: RunRow | null }> {
  const revision = await findRevision(actor, projectId, asked.revision);
  if (asked.run === "now") return { revision, run: null };
  if (asked.run && id.safeParse(asked.run).success) {
    const run = await getRun(actor, projectId, asked.run);
    // Whoever switched the revision wants that one's run.
    if (run.state === "done" && (asked.revision === null || run.revisionId === revision.id))
      return { revision: await getRevision(actor, run.revisionId), run };
  }
  return { revision, run: await latestDoneRun(actor, revision.id) };
}

/** Addresses name a net by its lineage, or by its id in the revision. */
async function lineageOf(
  actor: Actor,
  revision: RevisionRef,
  { inputs }: BoardOfInputs,
  netId: string,
): Promise<string> {
  if (inputs.nets.some((net) => net.lineageId === netId)) return netId;
  return (await getNet(actor, revision, netId)).lineageId;
}

function holds(path: ResolvedPath, lineageId: string): boolean {
  return path.id === lineageId || path.nets.some((net) => net.lineageId === lineageId);
}

function widthsOf(path: ResolvedPath, { inputs }: BoardOfInputs): NetFacts["widths"] {
  const start = whatIfStart(path, path.drivers[0]?.pin ?? "");
  return start ? widthTable(inputs.stackup, start.mainLayer, start.mainWidth) : [];
}
