import { createModel, listModels } from "@/lib/db/model";
import { findRevision } from "@/lib/db/revision";
import { route } from "@/lib/auth/route";
import { modelInput, revisionQuery } from "@/lib/schemas/project-query";
import { projectParams } from "@/lib/schemas/route-params";

export const GET = route({
  access: "project:read",
  params: projectParams,
  query: revisionQuery,
  handler: async ({ actor, params, query }) => ({
    models: await listModels(actor, await findRevision(actor, params.projectId, query.revision)),
  }),
});

export const POST = route({
  access: "draft:edit",
  params: projectParams,
  body: modelInput,
  handler: ({ actor, params, body }) => createModel(actor, params.projectId, body.model),
});
