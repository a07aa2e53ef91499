import { route } from "@/lib/auth/route";
import { withdrawSignature } from "@/lib/db/waiver";
import { signOffParams } from "@/lib/schemas/route-params";

export const DELETE = route({
  access: "review:sign",
  params: signOffParams,
  handler: ({ actor, params }) => withdrawSignature(actor, params.projectId, params.signOffId),
});
