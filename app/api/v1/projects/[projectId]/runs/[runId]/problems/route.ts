import { route } from "@/lib/auth/route";
import { listProblemRows } from "@/lib/db/run";
import { packRows } from "@/lib/schemas/problem-list";
import { runParams } from "@/lib/schemas/route-params";

/** The table that is worked, packed: ten thousand problems stay under two megabytes. */
export const GET = route({
  access: "project:read",
  params: runParams,
  handler: async ({ actor, params }) =>
    packRows(await listProblemRows(actor, params.projectId, params.runId)),
});
