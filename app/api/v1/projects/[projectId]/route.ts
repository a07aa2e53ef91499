import { archiveProject, getProject, updateProject } from "@/lib/db/project";
import { route } from "@/lib/auth/route";
import { projectUpdate } from "@/lib/schemas/project";
import { projectParams } from "@/lib/schemas/route-params";

export const GET = route({
  access: "project:read",
  params: projectParams,
  handler: ({ actor, params }) => getProject(actor, params.projectId),
});

export const PATCH = route({
  access: "project:update",
  params: projectParams,
  body: projectUpdate,
  handler: ({ actor, params, body }) => updateProject(actor, params.projectId, body),
});

/** Archives: nothing is lost, and restore brings it back. */
export const DELETE = route({
  access: "project:update",
  params: projectParams,
  handler: ({ actor, params }) => archiveProject(actor, params.projectId),
});
