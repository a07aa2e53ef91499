import { startDraft } from "@/lib/db/draft-copy";
import { listRevisions } from "@/lib/db/revision";
import { route } from "@/lib/auth/route";
import { projectParams } from "@/lib/schemas/route-params";

export const GET = route({
  access: "project:read",
  params: projectParams,
  handler: async ({ actor, params }) => ({ revisions: await listRevisions(actor, params.projectId) }),
});

/** Starts a new draft as a copy of the newest release. */
export const POST = route({
  access: "draft:edit",
  params: projectParams,
  handler: ({ actor, params }) => startDraft(actor, params.projectId),
});
