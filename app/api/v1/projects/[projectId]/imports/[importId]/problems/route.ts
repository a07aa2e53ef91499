import { route } from "@/lib/auth/route";
import { importProblemsCsv } from "@/lib/jobs/import-list";
import { importParams } from "@/lib/schemas/route-params";

/** The rows that are not taken, as CSV. */
export const GET = route({
  access: "project:read",
  params: importParams,
  handler: async ({ actor, params }) =>
    new Response(await importProblemsCsv(actor, params.projectId, params.importId), {
      headers: {
        "content-type": "text/csv; charset=utf-8",
        "content-disposition": 'attachment; filename="rows-not-taken.csv"',
        "cache-control": "private, no-store",
      },
    }),
});
