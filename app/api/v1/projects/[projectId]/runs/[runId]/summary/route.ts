import { route } from "@/lib/auth/route";
import { classByRule, countScopes, getRun } from "@/lib/db/run";
import { missingInputs } from "@/lib/db/waiver";
import { runParams } from "@/lib/schemas/route-params";

/** Class × rule, what is missing with the paths it holds back, and the nets in and out of scope. */
export const GET = route({
  access: "project:read",
  params: runParams,
  handler: async ({ actor, params }) => {
    const run = await getRun(actor, params.projectId, params.runId);
    const [matrix, missing, scopes] = await Promise.all([
      classByRule(actor, params.projectId, params.runId),
      missingInputs(actor, run),
      countScopes(actor, run.revisionId),
    ]);
    return { matrix, missing, scopes, counts: run.counts };
  },
});
