import { downloadHeaders } from "@/lib/reports/download-headers";
import { route } from "@/lib/auth/route";
import { getRelease } from "@/lib/db/release";
import { noteCsv } from "@/lib/reports/note-csv";
import { releaseParams } from "@/lib/schemas/route-params";

export const GET = route({
  access: "release:read",
  params: releaseParams,
  handler: async ({ actor, params }) => {
    const { release } = await getRelease(actor, params.projectId, params.releaseId);
    return new Response(noteCsv(release.note), {
      headers: downloadHeaders(
        "text/csv; charset=utf-8",
        `${release.note.project} ${release.letter} impedance note.csv`,
      ),
    });
  },
});
