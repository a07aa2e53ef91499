import { getBindings } from "@/lib/db/binding";
import { findRevision } from "@/lib/db/revision";
import { readInputs } from "@/lib/db/snapshot";
import { route } from "@/lib/auth/route";
import { matchBindings } from "@/lib/resolve/binding-matches";
import type { CountedBindings } from "@/lib/schemas/binding-matches";
import { revisionQuery } from "@/lib/schemas/project-query";
import { projectParams } from "@/lib/schemas/route-params";

/** How many pins each binding reaches on the board, and the pins that lack a role or a model. */
export const GET = route({
  access: "project:read",
  params: projectParams,
  query: revisionQuery,
  handler: async ({ actor, params, query }): Promise<CountedBindings> => {
    const revision = await findRevision(actor, params.projectId, query.revision);
    const { version } = await getBindings(actor, revision);
    return { version, ...matchBindings(await readInputs(actor, revision.id)) };
  },
});
