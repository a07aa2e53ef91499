import { deleteNetClass, putNetClass } from "@/lib/db/net-class";
import { route } from "@/lib/auth/route";
import { netClassUpdate } from "@/lib/schemas/net-class";
import { classParams, classRemoval } from "@/lib/schemas/project-query";

export const PUT = route({
  access: ["draft:edit", "limits:set"],
  params: classParams,
  body: netClassUpdate,
  handler: ({ actor, params, body }) =>
    putNetClass(actor, params.projectId, params.classId, body.version, body.netClass),
});

/** Refused while nets are in it, unless the body says where they go. */
export const DELETE = route({
  access: "draft:edit",
  params: classParams,
  body: classRemoval,
  handler: ({ actor, params, body }) =>
    deleteNetClass(actor, params.projectId, params.classId, body.version, body.reassignTo),
});
