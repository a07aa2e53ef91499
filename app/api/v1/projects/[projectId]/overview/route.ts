import { readOverview } from "@/lib/db/overview";
import { route } from "@/lib/auth/route";
import { revisionQuery } from "@/lib/schemas/project-query";
import { projectParams } from "@/lib/schemas/route-params";

export const GET = route({
  access: "project:read",
  params: projectParams,
  query: revisionQuery,
  handler: ({ actor, params, query }) => readOverview(actor, params.projectId, query.revision),
});
