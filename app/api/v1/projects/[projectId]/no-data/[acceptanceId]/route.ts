import { route } from "@/lib/auth/route";
import { withdrawAcceptance } from "@/lib/db/waiver";
import { acceptanceParams } from "@/lib/schemas/route-params";

export const DELETE = route({
  access: "review:waive",
  params: acceptanceParams,
  handler: ({ actor, params }) => withdrawAcceptance(actor, params.projectId, params.acceptanceId),
});
