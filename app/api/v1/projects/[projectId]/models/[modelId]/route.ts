import { deleteModel, putModel } from "@/lib/db/model";
import { route } from "@/lib/auth/route";
import { modelUpdate } from "@/lib/schemas/model";
import { modelParams, removal } from "@/lib/schemas/project-query";

export const PUT = route({
  access: "draft:edit",
  params: modelParams,
  body: modelUpdate,
  handler: ({ actor, params, body }) =>
    putModel(actor, params.projectId, params.modelId, body.version, body.model),
});

export const DELETE = route({
  access: "draft:edit",
  params: modelParams,
  body: removal,
  handler: ({ actor, params, body }) => deleteModel(actor, params.projectId, params.modelId, body.version),
});
