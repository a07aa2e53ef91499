import { route } from "@/lib/auth/route";
import { getRun, getRunPath } from "@/lib/db/run";
import { thawInputs } from "@/lib/db/snapshot";
import { resolvePaths } from "@/lib/resolve/resolve-paths";
import { runPathParams } from "@/lib/schemas/route-params";

/** A path with its findings and, resolved from the run's frozen inputs, what the engine needs to draw it again. */
export const GET = route({
  access: "project:read",
  params: runPathParams,
  handler: async ({ actor, params }) => {
    const run = await getRun(actor, params.projectId, params.runId);
    const { result, problems, findings } = await getRunPath(
      actor,
      params.projectId,
      params.runId,
      params.pathId,
    );
    const inputs = await thawInputs(actor, run.inputChunks);
    // A controlled line has a result but no path to draw.
    const path = resolvePaths(inputs).paths.find((entry) => entry.id === params.pathId) ?? null;
    const { detail: _detail, ...row } = result;
    return {
      run: { id: run.id, number: run.number, corners: run.corners },
      result: row,
      problems,
      findings,
      path,
    };
  },
});
