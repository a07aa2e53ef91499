import { z } from "zod";
import { route } from "@/lib/auth/route";
import { listFindings } from "@/lib/db/run";
import { runParams } from "@/lib/schemas/route-params";

export const GET = route({
  access: "project:read",
  params: runParams,
  query: z.object({ rule: z.string().max(60).optional() }),
  handler: async ({ actor, params, query }) => ({
    findings: await listFindings(actor, params.projectId, params.runId, query.rule),
  }),
});
