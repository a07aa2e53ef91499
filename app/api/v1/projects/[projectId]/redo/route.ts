import { redo } from "@/lib/db/undo";
import { route } from "@/lib/auth/route";
import { projectParams } from "@/lib/schemas/route-params";

export const POST = route({
  access: ["draft:edit", "limits:set"],
  params: projectParams,
  handler: ({ actor, params }) => redo(actor, params.projectId),
});
