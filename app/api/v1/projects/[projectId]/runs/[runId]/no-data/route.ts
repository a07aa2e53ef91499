import { route } from "@/lib/auth/route";
import { acceptNoData, listAcceptances, missingInputs } from "@/lib/db/waiver";
import { getRun } from "@/lib/db/run";
import { noDataAcceptanceInput } from "@/lib/schemas/review";
import { runParams } from "@/lib/schemas/route-params";

export const GET = route({
  access: "project:read",
  params: runParams,
  handler: async ({ actor, params }) => {
    const run = await getRun(actor, params.projectId, params.runId);
    const [missing, accepted] = await Promise.all([
      missingInputs(actor, run),
      listAcceptances(actor, run.revisionId),
    ]);
    return { missing, accepted };
  },
});

export const POST = route({
  access: "review:waive",
  params: runParams,
  body: noDataAcceptanceInput,
  handler: async ({ actor, params, body }) => {
    const ids = await acceptNoData(actor, params.projectId, { runId: params.runId, ...body });
    return Response.json({ id: ids[0], ids }, { status: 201 });
  },
});
