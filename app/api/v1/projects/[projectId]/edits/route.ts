import { listEditors, listEdits } from "@/lib/db/edit";
import { findRevision } from "@/lib/db/revision";
import { undoState } from "@/lib/db/undo";
import { route } from "@/lib/auth/route";
import { revisionQuery } from "@/lib/schemas/project-query";
import { projectParams } from "@/lib/schemas/route-params";

export const GET = route({
  access: "project:read",
  params: projectParams,
  query: revisionQuery,
  handler: async ({ actor, params, query }) => {
    const revision = await findRevision(actor, params.projectId, query.revision);
    const [edits, editors, moves] = await Promise.all([
      listEdits(actor, revision.id),
      listEditors(actor, revision.id),
      revision.state === "draft" ? undoState(actor, revision) : { undo: null, redo: null },
    ]);
    return { edits, editors, ...moves };
  },
});
