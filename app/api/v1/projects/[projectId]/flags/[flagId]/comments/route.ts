import { route } from "@/lib/auth/route";
import { commentOnFlag } from "@/lib/db/review";
import { flagComment } from "@/lib/schemas/review";
import { flagParams } from "@/lib/schemas/route-params";

export const POST = route({
  access: "review:comment",
  params: flagParams,
  body: flagComment,
  handler: async ({ actor, params, body }) => {
    await commentOnFlag(actor, params.projectId, params.flagId, body.comment);
    return new Response(null, { status: 201 });
  },
});
