import { findRevision } from "@/lib/db/revision";
import { getStackup, putStackup } from "@/lib/db/stackup";
import { route } from "@/lib/auth/route";
import { revisionQuery } from "@/lib/schemas/project-query";
import { projectParams } from "@/lib/schemas/route-params";
import { stackupUpdate } from "@/lib/schemas/stackup";

export const GET = route({
  access: "project:read",
  params: projectParams,
  query: revisionQuery,
  handler: async ({ actor, params, query }) =>
    getStackup(actor, await findRevision(actor, params.projectId, query.revision)),
});

export const PUT = route({
  access: "draft:edit",
  params: projectParams,
  body: stackupUpdate,
  handler: ({ actor, params, body }) => putStackup(actor, params.projectId, body.version, body.stackup),
});
