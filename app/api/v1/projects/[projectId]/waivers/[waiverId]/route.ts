import { route } from "@/lib/auth/route";
import { revokeWaiver } from "@/lib/db/waiver";
import { waiverParams } from "@/lib/schemas/route-params";

export const DELETE = route({
  access: "review:waive",
  params: waiverParams,
  handler: ({ actor, params }) => revokeWaiver(actor, params.projectId, params.waiverId),
});
