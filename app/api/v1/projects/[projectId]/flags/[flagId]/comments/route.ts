import { route } from "@/lib/auth/route";
import { commentOnFlag } from "@/lib/db/review";
import { flagComment } from "@/lib/schemas/review";
import { flagParams } from "@/lib/schemas/route-params";

export const POST = route({
  access: "review:comment",
  params: flagParams,
  body: flagComment,
  handler: ({ actor, params, body }) => commentOnFlag(actor, params.projectId, params.flagId, body.comment),
});
