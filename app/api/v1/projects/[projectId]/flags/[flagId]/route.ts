import { route } from "@/lib/auth/route";
import { getFlag, updateFlag } from "@/lib/db/review";
import { flagUpdate } from "@/lib/schemas/review";
import { flagParams } from "@/lib/schemas/route-params";
import { notifyAssignee } from "../notify-assignee";

export const GET = route({
  access: "project:read",
  params: flagParams,
  handler: ({ actor, params }) => getFlag(actor, params.projectId, params.flagId),
});

export const PATCH = route({
  access: "review:flag",
  params: flagParams,
  body: flagUpdate,
  handler: async ({ actor, params, body }) => {
    await updateFlag(actor, params.projectId, params.flagId, body);
    const { flag, entries } = await getFlag(actor, params.projectId, params.flagId);
    if (body.assigneeUserId)
      await notifyAssignee(actor, params.projectId, {
        id: flag.id,
        assigneeUserId: body.assigneeUserId,
        title: flag.title,
        comment: entries[0]?.comment ?? "",
      });
    return { flag };
  },
});
