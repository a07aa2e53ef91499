import { getProject, restoreProject } from "@/lib/db/project";
import { route } from "@/lib/auth/route";
import { projectParams } from "@/lib/schemas/route-params";

export const POST = route({
  access: "project:update",
  params: projectParams,
  handler: async ({ actor, params }) => {
    await restoreProject(actor, params.projectId);
    return getProject(actor, params.projectId);
  },
});
