import { route } from "@/lib/auth/route";
import { cancelRun } from "@/lib/db/run";
import { abortRun } from "@/lib/jobs/run-worker";
import { runParams } from "@/lib/schemas/route-params";

export const POST = route({
  access: "run:cancel",
  params: runParams,
  handler: async ({ actor, params }) => {
    await cancelRun(actor, params.projectId, params.runId);
    abortRun(params.runId);
  },
});
