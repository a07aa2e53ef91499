import { z } from "zod";
import { listNeighbours } from "@/lib/db/neighbour";
import { findRevision } from "@/lib/db/revision";
import { route } from "@/lib/auth/route";
import { revisionQuery } from "@/lib/schemas/project-query";
import { projectParams } from "@/lib/schemas/route-params";

export const GET = route({
  access: "project:read",
  params: projectParams,
  query: revisionQuery.extend({ net: z.string().max(120).optional() }),
  handler: async ({ actor, params, query }) => ({
    neighbours: await listNeighbours(
      actor,
      await findRevision(actor, params.projectId, query.revision),
      query.net,
    ),
  }),
});
