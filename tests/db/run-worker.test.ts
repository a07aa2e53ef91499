import { asc, eq, sql } from "drizzle-orm";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { findRevision } from "@/lib/db/revision";
import {
  cancelRun,
  classByRule,
  createRun,
  expireLeases,
  getRun,
  listFindings,
  listPathResults,
  listProblemRows,
  listProblems,
  listSelectorRows,
  saveBatch,
} from "@/lib/db/run";
import { finding, pathResult, problem, run } from "@/lib/db/schema";
import { freezeInputs, readInputs } from "@/lib/db/snapshot";
import { checkInWorker, closeCheckPool } from "@/lib/jobs/check-pool";
import { resultRows } from "@/lib/jobs/result-rows";
import { abortRun, runWorkerIdle, wakeRunWorker } from "@/lib/jobs/run-worker";
import { startRun } from "@/lib/jobs/start-run";
import { resolvePaths } from "@/lib/resolve/resolve-paths";
import { packRows, unpackRows } from "@/lib/schemas/problem-list";
import { allCorners, cornerName, engineVersion } from "@/lib/si";
import { createTestDatabase, type TestDatabase } from "../support/database";
import { draftBoard, runToEnd } from "../support/released-board";

let data: TestDatabase;
let projectId: string;
let whole: Awaited<ReturnType<typeof runToEnd>>;

beforeAll(async () => {
  data = await createTestDatabase();
  projectId = (await draftBoard(data.own, "B")).project.id;
  whole = await runToEnd(data.own, projectId);
});
afterAll(async () => {
  await runWorkerIdle();
  await closeCheckPool();
  await data.close();
});

/** What a run found, without what differs from run to run by its nature: ids. */
async function found(runId: string) {
  const { db } = data;
  const findings = await db
    .select()
    .from(finding)
    .where(eq(finding.runId, runId))
    .orderBy(
      asc(finding.pathId),
      asc(finding.rule),
      asc(finding.pin),
      asc(finding.edge),
      asc(finding.corner),
    );
  const problems = await db
    .select()
    .from(problem)
    .where(eq(problem.runId, runId))
    .orderBy(asc(problem.pathId), asc(problem.mechanism));
  const results = await db
    .select()
    .from(pathResult)
    .where(eq(pathResult.runId, runId))
    .orderBy(asc(pathResult.pathId));
  const bare = (row: object) => ({ ...row, id: "", runId: "" });
  return { findings: findings.map(bare), problems: problems.map(bare), results: results.map(bare) };
}

async function rowsOf(runId: string) {
  const count = sql<number>`count(*)`;
  const [[results], [problems], [findings]] = await data.db.batch([
    data.db.select({ count }).from(pathResult).where(eq(pathResult.runId, runId)),
    data.db.select({ count }).from(problem).where(eq(problem.runId, runId)),
    data.db.select({ count }).from(finding).where(eq(finding.runId, runId)),
  ]);
  return [results?.count, problems?.count, findings?.count];
}

/** A run as a process leaves it that dies: claimed, a part of it written, its lease over. */
async function interrupted(part: number): Promise<string> {
  const { designer } = data.own.actors;
  const draft = await findRevision(designer, projectId);
  const inputs = await readInputs(designer, draft.id);
  const { chunks, inputHash } = await freezeInputs(designer, inputs);
  const { paths } = resolvePaths(inputs);
  const { id } = await createRun(designer, {
    projectId,
    revisionId: draft.id,
    inputHash,
    inputChunks: chunks,
    engineVersion,
    runtimeVersion: "test",
    corners: allCorners.map(cornerName),
    total: paths.length,
  });
  await data.db.update(run).set({ state: "running", startedAt: 1, leaseUntil: 1 }).where(eq(run.id, id));
  const batch = { paths: paths.slice(0, part), corners: allCorners };
  const checked = await checkInWorker(batch, new AbortController().signal);
  await saveBatch(id, resultRows(id, designer.teamId, checked));
  return id;
}

describe("a run over the demo board, through real worker threads", () => {
  it("ends done, and its counts by verdict add up to its paths", async () => {
    expect(whole).toMatchObject({ state: "done", done: whole.total, error: null });
    const counts = Object.values(whole.counts ?? {});
    expect(counts.reduce((sum, count) => sum + count, 0)).toBe(whole.total);
    // Controlled lines have results of their own and are no paths.
    const results = (await listPathResults(data.own.actors.reviewer, projectId, whole.id)).filter(
      ({ pathId }) => !pathId.startsWith("line "),
    );
    expect(results).toHaveLength(whole.total);
    expect(results.filter(({ verdict }) => verdict === "fail")).toHaveLength(whole.counts?.fail ?? 0);
  });

  it("lists each problem with its worst finding's value, limit and unit, worst share of the limit first", async () => {
    const { reviewer } = data.own.actors;
    const rows = await listProblemRows(reviewer, projectId, whole.id);
    expect(rows).toHaveLength((await listProblems(reviewer, projectId, whole.id)).length);
    const failing = rows.filter(({ verdict }) => verdict === "fail");
    expect(failing.length).toBeGreaterThan(0);
    for (const row of failing) {
      expect(row.unit).not.toBeNull();
      expect(row.limit).not.toBeNull();
      expect(row.rules.split(",")).toContain(row.rule);
      expect(row.margin).toBeLessThan(0);
    }
    const shares = failing.map(({ share }) => share ?? 0);
    expect(shares).toEqual([...shares].sort((a, b) => a - b));
    for (const row of rows.filter(({ verdict }) => verdict === "no data")) expect(row.missing).not.toBeNull();
  });

  it("counts a class and rule's failing paths as many as have a failing finding, each once", async () => {
    const { reviewer } = data.own.actors;
    const findings = await listFindings(reviewer, projectId, whole.id);
    for (const cell of await classByRule(reviewer, projectId, whole.id)) {
      const paths = new Set(
        findings
          .filter((entry) => entry.rule === cell.rule && entry.verdict === "fail" && entry.counts)
          .map((entry) => entry.pathId),
      );
      expect(cell.fail).toBeLessThanOrEqual(paths.size);
    }
  });

  it("keeps selectors apart: none of their findings counts", async () => {
    const { reviewer } = data.own.actors;
    const selected = await listSelectorRows(reviewer, projectId, whole.id);
    const findings = await listFindings(reviewer, projectId, whole.id);
    expect(selected).toHaveLength(findings.filter(({ counts }) => !counts).length);
  });

  it("packs its list and unpacks it to the same rows, numbers to six digits", async () => {
    const rows = await listProblemRows(data.own.actors.reviewer, projectId, whole.id);
    const back = unpackRows<(typeof rows)[number]>(structuredClone(packRows(rows)));
    const round = (value: unknown): unknown =>
      typeof value === "number" ? Number(value.toPrecision(6)) : value;
    expect(back).toEqual(
      rows.map((row) => Object.fromEntries(Object.entries(row).map(([name, value]) => [name, round(value)]))),
    );
    expect(packRows([])).toEqual({ columns: [], words: [], rows: [] });
  });
});

describe("a run that is stopped", () => {
  it("stays cancelled, and nothing more of it is written once its worker has let go", async () => {
    const { designer } = data.own.actors;
    const { id } = await startRun(designer, projectId);
    await cancelRun(designer, projectId, id);
    abortRun(id);
    await runWorkerIdle();
    const after = await getRun(designer, projectId, id);
    expect(after).toMatchObject({ state: "cancelled", counts: null });
    expect(after.done).toBeLessThanOrEqual(after.total);
    const rows = await rowsOf(id);
    wakeRunWorker();
    await runWorkerIdle();
    expect(await rowsOf(id)).toEqual(rows);
    expect(await getRun(designer, projectId, id)).toMatchObject({ state: "cancelled" });
  });

  it("whose lease is over resumes, and ends with the findings of an uninterrupted one", async () => {
    const id = await interrupted(20);
    expect(await getRun(data.own.actors.designer, projectId, id)).toMatchObject({
      state: "running",
      done: 20,
    });
    await expireLeases();
    wakeRunWorker();
    await runWorkerIdle();
    const resumed = await getRun(data.own.actors.designer, projectId, id);
    expect(resumed).toMatchObject({ state: "done", counts: whole.counts, done: whole.total });
    expect(await found(id)).toEqual(await found(whole.id));
  });

  it("holds a batch once that is written twice, by a process thought dead and by its successor", async () => {
    const id = await interrupted(20);
    const once = await rowsOf(id);
    const { designer } = data.own.actors;
    const { inputChunks: _chunks, ...row } = await getRun(designer, projectId, id);
    const { paths } = resolvePaths(await readInputs(designer, row.revisionId));
    const checked = await checkInWorker(
      { paths: paths.slice(0, 20), corners: allCorners },
      new AbortController().signal,
    );
    await saveBatch(id, resultRows(id, designer.teamId, checked));
    expect(await rowsOf(id)).toEqual(once);
    await cancelRun(designer, projectId, id);
  });
});
