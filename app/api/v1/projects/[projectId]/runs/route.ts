import { route } from "@/lib/auth/route";
import { listRevisions } from "@/lib/db/revision";
import { listRuns } from "@/lib/db/run";
import { currentInputHash } from "@/lib/db/snapshot";
import { startRun } from "@/lib/jobs/start-run";
import { projectParams } from "@/lib/schemas/route-params";

export const GET = route({
  access: "project:read",
  params: projectParams,
  handler: async ({ actor, params }) => {
    const [runs, revisions] = await Promise.all([
      listRuns(actor, params.projectId),
      listRevisions(actor, params.projectId),
    ]);
    const draft = revisions.find((revision) => revision.state === "draft");
    return {
      runs,
      draft: draft ? { letter: draft.letter, inputHash: await currentInputHash(actor, draft.id) } : null,
    };
  },
});

export const POST = route({
  access: "run:start",
  params: projectParams,
  handler: async ({ actor, params }) => {
    const { inputChunks: _chunks, ...run } = await startRun(actor, params.projectId);
    return Response.json({ run }, { status: 201 });
  },
});
