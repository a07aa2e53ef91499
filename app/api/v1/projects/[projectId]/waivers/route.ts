import { z } from "zod";
import { route } from "@/lib/auth/route";
import { getProject } from "@/lib/db/project";
import { getRun } from "@/lib/db/run";
import { grantWaiver, listWaivers } from "@/lib/db/waiver";
import { id } from "@/lib/schemas/common";
import { waiverInput } from "@/lib/schemas/review";
import { projectParams } from "@/lib/schemas/route-params";

export const GET = route({
  access: "project:read",
  params: projectParams,
  query: z.object({ run: id.optional() }),
  handler: async ({ actor, params, query }) => {
    await getProject(actor, params.projectId);
    const run = query.run ? await getRun(actor, params.projectId, query.run) : null;
    return { waivers: await listWaivers(actor, params.projectId, run) };
  },
});

export const POST = route({
  access: "review:waive",
  params: projectParams,
  body: waiverInput.extend({ runId: id }),
  handler: async ({ actor, params, body }) =>
    Response.json(
      {
        id: await grantWaiver(actor, params.projectId, {
          runId: body.runId,
          pathId: body.subject.lineageId,
          mechanism: body.subject.mechanism ?? "",
          reason: body.reason,
          expiresAt: body.expiresAt,
        }),
      },
      { status: 201 },
    ),
});
