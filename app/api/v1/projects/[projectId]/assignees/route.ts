import { route } from "@/lib/auth/route";
import { listAssignees } from "@/lib/db/review";
import { projectParams } from "@/lib/schemas/route-params";

export const GET = route({
  access: "project:read",
  params: projectParams,
  handler: async ({ actor, params }) => ({ people: await listAssignees(actor, params.projectId) }),
});
