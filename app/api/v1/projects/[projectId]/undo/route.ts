import { getDraft } from "@/lib/db/revision";
import { undo, undoState } from "@/lib/db/undo";
import { route } from "@/lib/auth/route";
import { projectParams } from "@/lib/schemas/route-params";

/** What undo and redo would do now. */
export const GET = route({
  access: "project:read",
  params: projectParams,
  handler: async ({ actor, params }) =>
    undoState(actor, await getDraft(actor, params.projectId, "project:read")),
});

export const POST = route({
  access: ["draft:edit", "limits:set"],
  params: projectParams,
  handler: ({ actor, params }) => undo(actor, params.projectId),
});
