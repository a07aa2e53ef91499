import { createNetClass, listNetClasses } from "@/lib/db/net-class";
import { findRevision } from "@/lib/db/revision";
import { route } from "@/lib/auth/route";
import { netClassInput, revisionQuery } from "@/lib/schemas/project-query";
import { projectParams } from "@/lib/schemas/route-params";

export const GET = route({
  access: "project:read",
  params: projectParams,
  query: revisionQuery,
  handler: async ({ actor, params, query }) => ({
    classes: await listNetClasses(actor, await findRevision(actor, params.projectId, query.revision)),
  }),
});

export const POST = route({
  access: "draft:edit",
  params: projectParams,
  body: netClassInput,
  handler: ({ actor, params, body }) => createNetClass(actor, params.projectId, body.netClass),
});
