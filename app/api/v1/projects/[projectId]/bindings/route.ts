import { getBindings, putBindings } from "@/lib/db/binding";
import { findRevision } from "@/lib/db/revision";
import { route } from "@/lib/auth/route";
import { bindingsUpdate } from "@/lib/schemas/model";
import { revisionQuery } from "@/lib/schemas/project-query";
import { projectParams } from "@/lib/schemas/route-params";

export const GET = route({
  access: "project:read",
  params: projectParams,
  query: revisionQuery,
  handler: async ({ actor, params, query }) =>
    getBindings(actor, await findRevision(actor, params.projectId, query.revision)),
});

export const PUT = route({
  access: "draft:edit",
  params: projectParams,
  body: bindingsUpdate,
  handler: ({ actor, params, body }) => putBindings(actor, params.projectId, body.version, body.bindings),
});
