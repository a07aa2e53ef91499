import { baseUrl } from "@/lib/auth/environment";
import { route } from "@/lib/auth/route";
import { getProject } from "@/lib/db/project";
import { listReleases } from "@/lib/db/release";
import { sendNoteLinks } from "@/lib/email/note-links";
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
  handler: async ({ actor, params, body }) => {
    const { releaseId, links, ...names } = await makeRelease(actor, params.projectId, body);
    sendNoteLinks(links, { ...names, baseUrl: baseUrl() });
    return Response.json({ id: releaseId }, { status: 201 });
  },
});
