import { route } from "@/lib/auth/route";
import { releaseReadiness } from "@/lib/db/release";
import { getDraft } from "@/lib/db/revision";
import { currentInputHash } from "@/lib/db/snapshot";
import type { Actor } from "@/lib/schemas/actor";
import { RefusedError } from "@/lib/schemas/errors";
import { projectParams } from "@/lib/schemas/route-params";

/** What stands between the draft and its release; where there is no draft, why. */
export const GET = route({
  access: "project:read",
  params: projectParams,
  handler: async ({ actor, params }) => {
    const draft = await draftOrWhy(actor, params.projectId);
    if (typeof draft === "string") return { draft: null, why: draft };
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

/** That a project has no draft is a state of it and no fault of the one who asks. */
async function draftOrWhy(actor: Actor, projectId: string) {
  try {
    return await getDraft(actor, projectId, "project:read");
  } catch (error) {
    if (error instanceof RefusedError) return error.message;
    throw error;
  }
}
