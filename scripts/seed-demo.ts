/**
 * Fills a new database with the demo team, through the functions that the app itself uses: a six-layer board
 * with a released revision A and a draft B that fails in several ways, and a large board from a seed.
 */
import { getAuth } from "@/lib/auth/auth";
import { baseUrl } from "@/lib/auth/environment";
import { closeDb } from "@/lib/db/client";
import { createProject } from "@/lib/db/project";
import { startDraft } from "@/lib/db/draft-copy";
import { getRun, listProblems } from "@/lib/db/run";
import { raiseFlag } from "@/lib/db/review";
import { acceptNoData, grantWaiver, missingInputs, signRun } from "@/lib/db/waiver";
import { sendNoteLinks } from "@/lib/email/note-links";
import { closeCheckPool } from "@/lib/jobs/check-pool";
import { makeRelease } from "@/lib/jobs/make-release";
import { runWorkerIdle } from "@/lib/jobs/run-worker";
import { startRun } from "@/lib/jobs/start-run";
import type { UserActor } from "@/lib/schemas/actor";
import { addClasses, nameLayers } from "./demo/board-setup";
import { importBoard } from "./demo/import-board";
import { largeBoard } from "./demo/large-board";
import { makeTeam, readAccounts } from "./demo/people";
import { addMaterials } from "./demo/team-materials";
import { tideGaugeBoard } from "./demo/tide-gauge-board";

const HALF_YEAR_MS = 182 * 86_400_000;
const LARGE_BOARD_NETS = Number(process.env.DEMO_LARGE_NETS ?? "10000");
const LARGE_BOARD_SEED = 20_260;

const accounts = readAccounts();
await getAuth();
const people = await makeTeam(accounts);
await addMaterials(people.designer);
await makeTideGauge(
  people.designer,
  people.reviewer,
  accounts.find((account) => account.role === "manufacturer"),
);
await makeLargeBoard(people.designer);
await closeCheckPool();
await closeDb();

async function makeTideGauge(
  designer: UserActor,
  reviewer: UserActor,
  maker: { name: string; email: string } | undefined,
): Promise<void> {
  const project = await createProject(designer, {
    name: "Tide gauge controller",
    description:
      "Logger and telemetry board of the tide gauge: controller, memory, Ethernet, pressure converter.",
    unit: "mm",
    template: "6-layers",
  });
  const stackup = await nameLayers(designer, project.id);
  const widths = await addClasses(designer, project.id, stackup);
  await importBoard(designer, project.id, tideGaugeBoard("A", widths), "Layout of revision A imported");
  const runA = await check(designer, project.id);
  await settle(reviewer, project.id, runA);
  await signRun(reviewer, project.id, runA, "Checked against the layout of revision A.");
  const { links, ...names } = await makeRelease(reviewer, project.id, {
    runId: runA,
    title: "Tide gauge controller, first build",
    remarks: "Impedance coupons on every panel; report foot widths after etching.",
    recipients: [
      {
        name: maker?.name ?? "Fabricator",
        email: maker?.email ?? "maker@saltmarsh.example",
        company: "Estuary Circuits",
      },
    ],
  });
  sendNoteLinks(links, { ...names, baseUrl: baseUrl() });
  await startDraft(designer, project.id);
  await importBoard(designer, project.id, tideGaugeBoard("B", widths), "Layout of draft B imported");
  const runB = await check(designer, project.id);
  const worst = (await listProblems(reviewer, project.id, runB)).find(
    (problem) => problem.verdict === "fail" && problem.pathName.includes("SVC_CLK"),
  );
  if (worst)
    await raiseFlag(reviewer, project.id, {
      subject: { kind: "problem", lineageId: worst.pathId, mechanism: worst.mechanism },
      title: `${worst.pathName}: ${worst.title}`,
      comment:
        "The service clock went straight to the header. Can it have the same 33 Ω as the memory clock?",
      assigneeUserId: designer.userId,
    });
}

async function makeLargeBoard(designer: UserActor): Promise<void> {
  if (LARGE_BOARD_NETS <= 0) return;
  const project = await createProject(designer, {
    name: "Estuary array backplane",
    description: `A large board made from a seed, ${LARGE_BOARD_NETS} nets: for trying out tables and speed.`,
    unit: "mm",
    template: "6-layers",
  });
  const stackup = await nameLayers(designer, project.id);
  const widths = await addClasses(designer, project.id, stackup);
  await importBoard(
    designer,
    project.id,
    largeBoard(LARGE_BOARD_NETS, LARGE_BOARD_SEED, widths),
    "Seeded layout imported",
  );
  await check(designer, project.id);
}

/** Runs the check to its end. */
async function check(actor: UserActor, projectId: string): Promise<string> {
  const { id } = await startRun(actor, projectId);
  await runWorkerIdle();
  const run = await getRun(actor, projectId, id);
  if (run.state !== "done")
    throw new Error(`The demo's run ended as ${run.state}: ${run.error ?? "no reason given."}`);
  return id;
}

/** What a reviewer does before signing: the deliberate failures waived with a reason, what is missing accepted. */
async function settle(reviewer: UserActor, projectId: string, runId: string): Promise<void> {
  const run = await getRun(reviewer, projectId, runId);
  for (const problem of (await listProblems(reviewer, projectId, runId)).filter(
    (entry) => entry.verdict === "fail",
  ))
    await grantWaiver(reviewer, projectId, {
      runId,
      pathId: problem.pathId,
      mechanism: problem.mechanism,
      reason: "Measured on the first prototype within the part's limits; to be cured with the next layout.",
      expiresAt: Date.now() + HALF_YEAR_MS,
    });
  for (const { missing } of await missingInputs(reviewer, run))
    await acceptNoData(reviewer, projectId, {
      runId,
      missing,
      reason: "Slow telemetry pair, checked by hand against the transceiver's application note.",
    });
}
