import { route } from "@/lib/auth/route";
import { listImports } from "@/lib/db/import-batch";
import { getProject } from "@/lib/db/project";
import { receiveList, viewOf } from "@/lib/jobs/import-list";
import { importUpload } from "@/lib/schemas/import-list";
import { projectParams } from "@/lib/schemas/route-params";

export const GET = route({
  access: "project:read",
  params: projectParams,
  handler: async ({ actor, params }) => {
    await getProject(actor, params.projectId);
    return { imports: (await listImports(actor, params.projectId)).map(viewOf) };
  },
});

/** The body is the file itself, or the pasted text, as it is. */
export const POST = route({
  access: "draft:edit",
  params: projectParams,
  query: importUpload,
  body: "bytes",
  maxBodyBytes: 52_428_800,
  handler: async ({ actor, params, query, body }) =>
    Response.json(
      await receiveList(actor, params.projectId, { bytes: body, fileName: query.name, kind: query.kind }),
      {
        status: 201,
      },
    ),
});
