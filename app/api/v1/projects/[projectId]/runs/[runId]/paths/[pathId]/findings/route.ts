import { route } from "@/lib/auth/route";
import { getRunPath } from "@/lib/db/run";
import { runPathParams } from "@/lib/schemas/route-params";

/** What was found on one path, without the path itself: for the panel beside the table. */
export const GET = route({
  access: "project:read",
  params: runPathParams,
  handler: async ({ actor, params }) => {
    const { problems, findings } = await getRunPath(actor, params.projectId, params.runId, params.pathId);
    return { problems, findings };
  },
});
