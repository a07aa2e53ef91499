import { route } from "@/lib/auth/route";
import { listFlags } from "@/lib/db/review";
import { getRun, listProblems } from "@/lib/db/run";
import { listAcceptances, listWaivers } from "@/lib/db/waiver";
import { runParams } from "@/lib/schemas/route-params";

/** The table that is worked: each problem with its flag and its waiver. */
export const GET = route({
  access: "project:read",
  params: runParams,
  handler: async ({ actor, params }) => {
    const run = await getRun(actor, params.projectId, params.runId);
    const [problems, flags, waivers, acceptances] = await Promise.all([
      listProblems(actor, params.projectId, params.runId),
      listFlags(actor, params.projectId),
      listWaivers(actor, params.projectId, run),
      listAcceptances(actor, run.revisionId),
    ]);
    const flagOf = new Map<string, (typeof flags)[number]>(
      flags.filter((flag) => flag.state === "open").map((flag) => [`${flag.subjectLineageId} ${flag.mechanism ?? ""}`, flag]),
    );
    const waiverOf = new Map<string, (typeof waivers)[number]>(waivers.map((waiver) => [`${waiver.pathLineageId} ${waiver.mechanism}`, waiver] as const).reverse());
    const accepted = new Map(acceptances.map((entry) => [entry.missing, entry]));
    return {
      problems: problems.map((problem) => {
        const key = `${problem.pathId} ${problem.mechanism}`;
        const flag = flagOf.get(key) ?? flagOf.get(`${problem.pathId} `);
        const waiver = waiverOf.get(key);
        return {
          ...problem,
          flag: flag ? { id: flag.id, assigneeName: flag.assigneeName } : null,
          waiver: waiver ? { id: waiver.id, state: waiver.judged.state, covers: waiver.judged.covers, reason: waiver.reason } : null,
          accepted: problem.missing ? (accepted.get(problem.missing)?.reason ?? null) : null,
        };
      }),
    };
  },
});
