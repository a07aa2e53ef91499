import { route } from "@/lib/auth/route";
import { listRuns } from "@/lib/db/run";
import { startRun } from "@/lib/jobs/start-run";
import { projectParams } from "@/lib/schemas/route-params";

export const GET = route({
  access: "project:read",
  params: projectParams,
  handler: async ({ actor, params }) => ({ runs: await listRuns(actor, params.projectId) }),
});

export const POST = route({
  access: "run:start",
  params: projectParams,
  handler: async ({ actor, params }) => {
    const { inputChunks: _chunks, ...run } = await startRun(actor, params.projectId);
    return Response.json({ run }, { status: 201 });
  },
});
