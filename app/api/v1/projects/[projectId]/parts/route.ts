import { listParts } from "@/lib/db/part";
import { findRevision } from "@/lib/db/revision";
import { route } from "@/lib/auth/route";
import { revisionQuery } from "@/lib/schemas/project-query";
import { projectParams } from "@/lib/schemas/route-params";

export const GET = route({
  access: "project:read",
  params: projectParams,
  query: revisionQuery,
  handler: async ({ actor, params, query }) => ({
    parts: await listParts(actor, await findRevision(actor, params.projectId, query.revision)),
  }),
});
