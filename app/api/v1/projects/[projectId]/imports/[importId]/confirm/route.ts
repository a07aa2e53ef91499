import { route } from "@/lib/auth/route";
import { confirmImport } from "@/lib/jobs/import-list";
import { importConfirm } from "@/lib/schemas/import-list";
import { importParams } from "@/lib/schemas/route-params";

export const POST = route({
  access: "draft:edit",
  params: importParams,
  body: importConfirm,
  handler: async ({ actor, params, body }) =>
    Response.json(
      { import: await confirmImport(actor, params.projectId, params.importId, body.mode) },
      { status: 202 },
    ),
});
