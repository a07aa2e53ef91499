import { route } from "@/lib/auth/route";
import { releaseReadiness } from "@/lib/db/release";
import { getDraft } from "@/lib/db/revision";
import { currentInputHash } from "@/lib/db/snapshot";
import { projectParams } from "@/lib/schemas/route-params";

/** What stands between the draft and its release. */
export const GET = route({
  access: "project:read",
  params: projectParams,
  handler: async ({ actor, params }) => {
    const draft = await getDraft(actor, params.projectId, "project:read");
    const readiness = await releaseReadiness(
      actor,
      params.projectId,
      draft.id,
      await currentInputHash(actor, draft.id),
    );
    const run = readiness.run && {
      id: readiness.run.id,
      number: readiness.run.number,
      state: readiness.run.state,
      counts: readiness.run.counts,
    };
    return { draft: { id: draft.id, letter: draft.letter }, ...readiness, run };
  },
});
