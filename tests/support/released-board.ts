import { createProject } from "@/lib/db/project";
import { getRelease } from "@/lib/db/release";
import { getRun, listProblems } from "@/lib/db/run";
import { acceptNoData, grantWaiver, missingInputs, signRun } from "@/lib/db/waiver";
import { makeRelease } from "@/lib/jobs/make-release";
import { runWorkerIdle } from "@/lib/jobs/run-worker";
import { startRun } from "@/lib/jobs/start-run";
import { addClasses, nameLayers } from "../../scripts/demo/board-setup";
import { importBoard } from "../../scripts/demo/import-board";
import { tideGaugeBoard, type DemoRevision } from "../../scripts/demo/tide-gauge-board";
import type { TestTeam } from "./database";

/** The demo board with its layout in the draft. */
export async function draftBoard(
  team: TestTeam,
  revision: DemoRevision = "A",
  name = "Tide gauge controller",
) {
  const { designer } = team.actors;
  const project = await createProject(designer, { name, unit: "mm", template: "6-layers" });
  const stackup = await nameLayers(designer, project.id);
  const widths = await addClasses(designer, project.id, stackup);
  await importBoard(designer, project.id, tideGaugeBoard(revision, widths), "Layout imported");
  return { project, widths };
}

/** A run through real worker threads, to its end. */
export async function runToEnd(team: TestTeam, projectId: string) {
  const { id } = await startRun(team.actors.designer, projectId);
  await runWorkerIdle();
  return getRun(team.actors.designer, projectId, id);
}

/** Waives and accepts whatever stands in the way, signs and releases, as the reviewer. */
export async function releaseBoard(
  team: TestTeam,
  projectId: string,
  runId: string,
  recipients = [{ name: "Maker", email: "maker@estuary.example", company: "" }],
) {
  const { reviewer } = team.actors;
  const run = await getRun(reviewer, projectId, runId);
  const expiresAt = Date.now() + 30 * 86_400_000;
  for (const problem of await listProblems(reviewer, projectId, runId))
    if (problem.verdict === "fail")
      await grantWaiver(reviewer, projectId, {
        runId,
        pathId: problem.pathId,
        mechanism: problem.mechanism,
        reason: "Waived so that it can be released.",
        expiresAt,
      });
  for (const { missing } of await missingInputs(reviewer, run))
    await acceptNoData(reviewer, projectId, {
      runId,
      missing,
      reason: "Accepted so that it can be released.",
    });
  await signRun(reviewer, projectId, runId, "");
  const { releaseId } = await makeRelease(reviewer, projectId, {
    runId,
    title: "First build",
    remarks: "",
    recipients,
  });
  return getRelease(reviewer, projectId, releaseId);
}
