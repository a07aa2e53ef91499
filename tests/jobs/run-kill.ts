import { and, count, countDistinct, eq } from "drizzle-orm";
import { expect } from "vitest";
import { createProject } from "@/lib/db/project";
import { createRun, getRun, listFindings, listPathResults } from "@/lib/db/run";
import { getDraft } from "@/lib/db/revision";
import { finding, pathResult } from "@/lib/db/schema";
import { freezeInputs, readInputs } from "@/lib/db/snapshot";
import { resolvePaths } from "@/lib/resolve/resolve-paths";
import type { UserActor } from "@/lib/schemas/actor";
import { allCorners, cornerName } from "@/lib/si/rules/corners";
import { engineVersion } from "@/lib/si/version";
import { addClasses, nameLayers } from "../../scripts/demo/board-setup";
import { importBoard } from "../../scripts/demo/import-board";
import { largeBoard } from "../../scripts/demo/large-board";
import { createTestDatabase, type TestDatabase } from "../support/database";
import { workAndKill } from "../support/work-and-kill";

const NETS = 240;

/**
 * Queues a run over a seeded board, has a process of its own work it, and kills that process after each of the
 * waits. After every kill: the database is sound, what was acknowledged is still there, nothing is there twice. A
 * process that is left alone ends the run with the findings of a run that nobody disturbed.
 *
 * @returns how many kills came before the run's end
 */
export async function killDuringRun(waits: readonly number[]): Promise<number> {
  const data = await createTestDatabase();
  try {
    const { designer } = data.own.actors;
    const projectId = await seededBoard(designer);
    const whole = await queueRun(designer, projectId);
    await workAndKill("run-child", data.file, null);
    const killed = await queueRun(designer, projectId);
    let early = 0;
    let before = 0;
    for (const wait of waits) {
      await workAndKill("run-child", data.file, wait);
      const [check] = (await data.open.client.execute("PRAGMA integrity_check")).rows;
      expect(check?.integrity_check).toBe("ok");
      const run = await getRun(designer, projectId, killed);
      expect(run.done).toBeGreaterThanOrEqual(before);
      before = run.done;
      await expectNothingTwice(data, killed);
      if (run.state === "done") break;
      expect(run.state).toBe("running");
      early++;
    }
    await workAndKill("run-child", data.file, null);
    const ended = await getRun(designer, projectId, killed);
    expect([ended.state, ended.done]).toEqual(["done", ended.total]);
    await expectNothingTwice(data, killed);
    expect(await outcome(designer, projectId, killed)).toEqual(await outcome(designer, projectId, whole));
    return early;
  } finally {
    await data.close();
  }
}

async function seededBoard(designer: UserActor): Promise<string> {
  const { id } = await createProject(designer, { name: "Estuary array backplane", template: "6-layers" });
  const widths = await addClasses(designer, id, await nameLayers(designer, id));
  await importBoard(designer, id, largeBoard(NETS, 7, widths), "Seeded layout imported");
  return id;
}

/** As startRun queues it, without waking this process's own worker. */
async function queueRun(designer: UserActor, projectId: string): Promise<string> {
  const draft = await getDraft(designer, projectId);
  const inputs = await readInputs(designer, draft.id);
  const { chunks, inputHash } = await freezeInputs(designer, inputs);
  const row = await createRun(designer, {
    projectId,
    revisionId: draft.id,
    inputHash,
    inputChunks: chunks,
    engineVersion,
    runtimeVersion: `Node ${process.versions.node}`,
    corners: allCorners.map(cornerName),
    total: resolvePaths(inputs).paths.length,
  });
  return row.id;
}

async function expectNothingTwice(data: TestDatabase, runId: string): Promise<void> {
  const [results] = await data.open.db
    .select({ all: count(), distinct: countDistinct(pathResult.pathId) })
    .from(pathResult)
    .where(eq(pathResult.runId, runId));
  expect(results?.all).toBe(results?.distinct);
  const twice = await data.open.db
    .select({ pathId: finding.pathId, rule: finding.rule, times: count() })
    .from(finding)
    .where(and(eq(finding.runId, runId)))
    .groupBy(finding.pathId, finding.rule);
  expect(twice.filter((row) => row.times > 1)).toEqual([]);
}

/** What a run found, without the ids and the run's own name. */
async function outcome(designer: UserActor, projectId: string, runId: string) {
  const results = await listPathResults(designer, projectId, runId);
  const findings = await listFindings(designer, projectId, runId);
  return {
    results: results.map(({ runId: _run, ...row }) => row),
    findings: findings.map(({ id: _id, runId: _run, ...row }) => row),
  };
}
