import { route } from "@/lib/auth/route";
import { confirmProposals, proposeForDraft } from "@/lib/jobs/name-proposals";
import { confirmedProposals } from "@/lib/schemas/name-proposals";
import { projectParams } from "@/lib/schemas/route-params";

/** What the names of the nets suggest, to be confirmed by a person. */
export const GET = route({
  access: "draft:edit",
  params: projectParams,
  handler: ({ actor, params }) => proposeForDraft(actor, params.projectId),
});

export const POST = route({
  access: "draft:edit",
  params: projectParams,
  body: confirmedProposals,
  maxBodyBytes: 8_388_608,
  handler: async ({ actor, params, body }) => ({
    changed: await confirmProposals(actor, params.projectId, body),
  }),
});
