import "server-only";
import { getDraft } from "@/lib/db/revision";
import { createRun, type RunRow } from "@/lib/db/run";
import { freezeInputs, readInputs } from "@/lib/db/snapshot";
import { resolvePaths } from "@/lib/resolve/resolve-paths";
import { can, type Actor } from "@/lib/schemas/actor";
import { NotFoundError, RefusedError } from "@/lib/schemas/errors";
import { allCorners, cornerName, engineVersion } from "@/lib/si";
import { wakeRunWorker } from "./run-worker";

/** Freezes the draft's inputs and queues a check of every path in scope. */
export async function startRun(actor: Actor, projectId: string): Promise<RunRow> {
  if (!can(actor, "run:start")) throw new NotFoundError("The project");
  const draft = await getDraft(actor, projectId, "run:start");
  const inputs = await readInputs(actor, draft.id);
  const { paths } = resolvePaths(inputs);
  if (paths.length === 0)
    throw new RefusedError(
      "There is no net in scope to check. Import a net list or a section list first.",
      "no-paths",
    );
  const { chunks, inputHash } = await freezeInputs(actor, inputs);
  const row = await createRun(actor, {
    projectId,
    revisionId: draft.id,
    inputHash,
    inputChunks: chunks,
    engineVersion,
    runtimeVersion: `Node ${process.versions.node}`,
    corners: allCorners.map(cornerName),
    total: paths.length,
  });
  wakeRunWorker();
  return row;
}
