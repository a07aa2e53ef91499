import { route } from "@/lib/auth/route";
import { getProject } from "@/lib/db/project";
import { getRun, listFindings, listPathResults } from "@/lib/db/run";
import { downloadHeaders } from "@/lib/reports/download-headers";
import { findingsCsv } from "@/lib/reports/findings-csv";
import { runParams } from "@/lib/schemas/route-params";

/** Every finding of a run as a file for a spreadsheet. */
export const GET = route({
  access: "project:read",
  params: runParams,
  handler: async ({ actor, params: { projectId, runId } }) => {
    const [project, run, findings, paths] = await Promise.all([
      getProject(actor, projectId),
      getRun(actor, projectId, runId),
      listFindings(actor, projectId, runId),
      listPathResults(actor, projectId, runId),
    ]);
    return new Response(findingsCsv(findings, paths), {
      headers: downloadHeaders("text/csv; charset=utf-8", `${project.name} run ${run.number} findings.csv`),
    });
  },
});
