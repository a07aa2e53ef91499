import { getNet } from "@/lib/db/net";
import { findRevision } from "@/lib/db/revision";
import { route } from "@/lib/auth/route";
import { netParams, revisionQuery } from "@/lib/schemas/project-query";

/** By the id of the net, or by its lineage, which is the same in every revision. */
export const GET = route({
  access: "project:read",
  params: netParams,
  query: revisionQuery,
  handler: async ({ actor, params, query }) =>
    getNet(actor, await findRevision(actor, params.projectId, query.revision), params.netId),
});
