import { route } from "@/lib/auth/route";
import { getProject } from "@/lib/db/project";
import { listFlags, raiseFlag, subjectTitle } from "@/lib/db/review";
import { flagInput } from "@/lib/schemas/review";
import { projectParams } from "@/lib/schemas/route-params";
import { notifyAssignee } from "./notify-assignee";

export const GET = route({
  access: "project:read",
  params: projectParams,
  handler: async ({ actor, params }) => {
    await getProject(actor, params.projectId);
    return { flags: await listFlags(actor, params.projectId) };
  },
});

export const POST = route({
  access: "review:flag",
  params: projectParams,
  body: flagInput,
  handler: async ({ actor, params, body }) => {
    const title = (await subjectTitle(actor, params.projectId, body.subject)) ?? "a layer of the stackup";
    const id = await raiseFlag(actor, params.projectId, { ...body, title });
    if (body.assigneeUserId)
      await notifyAssignee(actor, params.projectId, {
        id,
        assigneeUserId: body.assigneeUserId,
        title,
        comment: body.comment,
      });
    return Response.json({ id }, { status: 201 });
  },
});
