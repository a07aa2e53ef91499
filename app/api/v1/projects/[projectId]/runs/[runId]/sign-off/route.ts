import { z } from "zod";
import { route } from "@/lib/auth/route";
import { getRun } from "@/lib/db/run";
import { listSignatures, signRun } from "@/lib/db/waiver";
import { runParams } from "@/lib/schemas/route-params";

export const GET = route({
  access: "project:read",
  params: runParams,
  handler: async ({ actor, params }) => {
    const run = await getRun(actor, params.projectId, params.runId);
    return { signatures: await listSignatures(actor, run.revisionId) };
  },
});

export const POST = route({
  access: "review:sign",
  params: runParams,
  body: z.object({ remark: z.string().trim().max(2000).default("") }),
  handler: async ({ actor, params, body }) =>
    Response.json({ id: await signRun(actor, params.projectId, params.runId, body.remark) }, { status: 201 }),
});
