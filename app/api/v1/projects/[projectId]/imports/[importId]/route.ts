import { route } from "@/lib/auth/route";
import { cancelImport } from "@/lib/db/import-batch";
import { remapImport, showImport } from "@/lib/jobs/import-list";
import { importMappingUpdate } from "@/lib/schemas/import-list";
import { importParams } from "@/lib/schemas/route-params";

export const GET = route({
  access: "project:read",
  params: importParams,
  handler: ({ actor, params }) => showImport(actor, params.projectId, params.importId),
});

/** Reads the list another way, before it is confirmed. */
export const PUT = route({
  access: "draft:edit",
  params: importParams,
  body: importMappingUpdate,
  handler: ({ actor, params, body }) => remapImport(actor, params.projectId, params.importId, body.mapping),
});

/** Drops it; also while it is being applied, of which then nothing stays. */
export const DELETE = route({
  access: "draft:edit",
  params: importParams,
  handler: ({ actor, params }) => cancelImport(actor, params.projectId, params.importId),
});
