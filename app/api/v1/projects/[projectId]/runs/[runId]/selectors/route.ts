import { route } from "@/lib/auth/route";
import { listSelectorRows } from "@/lib/db/run";
import { packRows } from "@/lib/schemas/problem-list";
import { runParams } from "@/lib/schemas/route-params";

/** What the selectors point at, packed; none of it counts as a failure. */
export const GET = route({
  access: "project:read",
  params: runParams,
  handler: async ({ actor, params }) =>
    packRows(await listSelectorRows(actor, params.projectId, params.runId)),
});
