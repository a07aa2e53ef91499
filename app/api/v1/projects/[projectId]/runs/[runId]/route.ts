import { route } from "@/lib/auth/route";
import { getRun } from "@/lib/db/run";
import { runParams } from "@/lib/schemas/route-params";

export const GET = route({
  access: "project:read",
  params: runParams,
  handler: async ({ actor, params }) => {
    const { inputChunks: _chunks, ...run } = await getRun(actor, params.projectId, params.runId);
    return { run };
  },
});
