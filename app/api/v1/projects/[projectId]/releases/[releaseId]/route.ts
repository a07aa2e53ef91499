import { route } from "@/lib/auth/route";
import { getRelease } from "@/lib/db/release";
import { releaseParams } from "@/lib/schemas/route-params";

export const GET = route({
  access: "release:read",
  params: releaseParams,
  handler: async ({ actor, params }) => {
    const { release, recipients } = await getRelease(actor, params.projectId, params.releaseId);
    return { release, recipients: recipients.map(({ tokenHash: _hash, ...recipient }) => recipient) };
  },
});
