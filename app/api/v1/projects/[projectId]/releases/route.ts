import { route } from "@/lib/auth/route";
import { getProject } from "@/lib/db/project";
import { listReleases } from "@/lib/db/release";
import { makeRelease } from "@/lib/jobs/make-release";
import { releaseInput } from "@/lib/schemas/release";
import { projectParams } from "@/lib/schemas/route-params";

export const GET = route({
  access: "release:read",
  params: projectParams,
  handler: async ({ actor, params }) => {
    await getProject(actor, params.projectId);
    return { releases: await listReleases(actor, params.projectId) };
  },
});

export const POST = route({
  access: "release:create",
  params: projectParams,
  body: releaseInput,
  handler: async ({ actor, params, body }) => Response.json({ id: await makeRelease(actor, params.projectId, body) }, { status: 201 }),
});
