import { getMaterial, putMaterial, removeMaterial } from "@/lib/db/material";
import { route } from "@/lib/auth/route";
import { materialParams, materialUpdate } from "@/lib/schemas/material";
import { removal } from "@/lib/schemas/project-query";

export const GET = route({
  access: "material:read",
  params: materialParams,
  handler: ({ actor, params }) => getMaterial(actor, params.materialId),
});

export const PUT = route({
  access: "material:edit",
  params: materialParams,
  body: materialUpdate,
  handler: ({ actor, params, body }) => putMaterial(actor, params.materialId, body.version, body.material),
});

/** Takes it away; restore brings it back. */
export const DELETE = route({
  access: "material:edit",
  params: materialParams,
  body: removal,
  handler: ({ actor, params, body }) => removeMaterial(actor, params.materialId, body.version),
});
