import { route } from "@/lib/auth/route";
import { downloadHeaders } from "@/lib/reports/download-headers";
import { ruleReport } from "@/lib/reports/rule-report";
import { releaseParams } from "@/lib/schemas/route-params";

/** The zip rule report. */
export const GET = route({
  access: "release:read",
  params: releaseParams,
  handler: async ({ actor, params }) => {
    const { release, zip } = await ruleReport(actor, params.projectId, params.releaseId);
    return new Response(zip, {
      headers: downloadHeaders(
        "application/zip",
        `${release.note.project} ${release.letter} rule report.zip`,
      ),
    });
  },
});
