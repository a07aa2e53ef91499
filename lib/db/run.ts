import "server-only";
import { and, asc, desc, eq, inArray, lt, ne, notInArray, notLike, or, sql } from "drizzle-orm";
import { can, type Actor } from "@/lib/schemas/actor";
import { NotFoundError, RefusedError } from "@/lib/schemas/errors";
import type { ProblemEntry, SelectorEntry } from "@/lib/schemas/problem-list";
import { recordAudit } from "./audit";
import { getDb } from "./client";
import { now } from "./clock";
import { newId } from "./ids";
import { finding, net, pathResult, problem, project, release, revision, run, user } from "./schema";

/** How long a process may be silent before another takes its run over. */
export const LEASE_MS = 15_000;

/** Results of controlled lines stand beside those of paths, and are not counted as paths. */
const LINE_PATTERN = "line %";

export type RunRow = typeof run.$inferSelect;
export type PathResultRow = typeof pathResult.$inferSelect;
export type ProblemRow = typeof problem.$inferSelect;
export type FindingRow = typeof finding.$inferSelect;
export type NewPathResult = typeof pathResult.$inferInsert;
export type NewProblem = typeof problem.$inferInsert;
export type NewFinding = typeof finding.$inferInsert;

export interface NewRun {
  projectId: string;
  revisionId: string;
  inputHash: string;
  inputChunks: { name: string; sha256: string }[];
  engineVersion: string;
  runtimeVersion: string;
  corners: string[];
  total: number;
}

/** Queues a run of a draft; its number is the next of the project. */
export async function createRun(actor: Actor, input: NewRun): Promise<RunRow> {
  if (!can(actor, "run:start")) throw new NotFoundError("The project");
  const db = await getDb();
  const id = newId();
  const at = now();
  const inserted = await db.all<{ id: string }>(sql`
    INSERT INTO ${run} (id, team_id, project_id, revision_id, number, state, input_hash, input_chunks, engine_version,
      runtime_version, corners, total, done, created_by, created_at)
    SELECT ${id}, ${project.teamId}, ${project.id}, ${revision.id},
      (SELECT coalesce(max(number), 0) + 1 FROM ${run} WHERE project_id = ${input.projectId}),
      'queued', ${input.inputHash}, ${JSON.stringify(input.inputChunks)}, ${input.engineVersion},
      ${input.runtimeVersion}, ${JSON.stringify(input.corners)}, ${input.total}, 0, ${actor.userId}, ${at}
    FROM ${project} JOIN ${revision} ON ${revision.projectId} = ${project.id}
    WHERE ${project.id} = ${input.projectId} AND ${project.teamId} = ${actor.teamId}
      AND ${revision.id} = ${input.revisionId} AND ${revision.state} = 'draft'
    RETURNING id`);
  if (inserted.length === 0) throw new NotFoundError("The draft");
  const row = await getRun(actor, input.projectId, id);
  await recordAudit(actor, {
    action: "run.start",
    subjectKind: "run",
    subjectId: id,
    projectId: input.projectId,
    detail: { number: row.number },
  });
  return row;
}

export async function getRun(actor: Actor, projectId: string, runId: string): Promise<RunRow> {
  if (!can(actor, "project:read")) throw new NotFoundError("The run");
  const db = await getDb();
  const [row] = await db
    .select()
    .from(run)
    .where(and(eq(run.id, runId), eq(run.projectId, projectId), eq(run.teamId, actor.teamId)));
  if (!row) throw new NotFoundError("The run");
  return row;
}

/** Newest first. */
export async function listRuns(
  actor: Actor,
  projectId: string,
): Promise<(Omit<RunRow, "inputChunks"> & { letter: string; startedByName: string | null })[]> {
  if (!can(actor, "project:read")) throw new NotFoundError("The project");
  const db = await getDb();
  const rows = await db
    .select({
      run,
      letter: revision.letter,
      startedByName: sql<string | null>`(SELECT name FROM ${user} WHERE id = ${run.createdBy})`,
    })
    .from(run)
    .innerJoin(revision, eq(revision.id, run.revisionId))
    .where(and(eq(run.projectId, projectId), eq(run.teamId, actor.teamId)))
    .orderBy(desc(run.number));
  return rows.map(({ run: { inputChunks: _chunks, ...row }, ...more }) => ({ ...row, ...more }));
}

/** The newest run of a revision that nobody cancelled, or null: a cancelled one says nothing about the board. */
export async function latestRun(actor: Actor, revisionId: string): Promise<RunRow | null> {
  if (!can(actor, "project:read")) throw new NotFoundError("The revision");
  const db = await getDb();
  const [row] = await db
    .select()
    .from(run)
    .where(and(eq(run.revisionId, revisionId), eq(run.teamId, actor.teamId), ne(run.state, "cancelled")))
    .orderBy(desc(run.number))
    .limit(1);
  return row ?? null;
}

/** The newest finished run of a revision, or null. */
export async function latestDoneRun(actor: Actor, revisionId: string): Promise<RunRow | null> {
  if (!can(actor, "project:read")) throw new NotFoundError("The revision");
  const db = await getDb();
  const [row] = await db
    .select()
    .from(run)
    .where(and(eq(run.revisionId, revisionId), eq(run.teamId, actor.teamId), eq(run.state, "done")))
    .orderBy(desc(run.number))
    .limit(1);
  return row ?? null;
}

export async function cancelRun(actor: Actor, projectId: string, runId: string): Promise<void> {
  if (!can(actor, "run:cancel")) throw new NotFoundError("The run");
  const current = await getRun(actor, projectId, runId);
  const db = await getDb();
  const changed = await db
    .update(run)
    .set({ state: "cancelled", finishedAt: now(), leaseUntil: null })
    .where(and(eq(run.id, runId), eq(run.teamId, actor.teamId), inArray(run.state, ["queued", "running"])))
    .returning({ id: run.id });
  if (changed.length === 0)
    throw new RefusedError(`Run ${current.number} is ${current.state} already.`, "run-ended");
  await recordAudit(actor, {
    action: "run.cancel",
    subjectKind: "run",
    subjectId: runId,
    projectId,
    detail: { number: current.number },
  });
}

/** Takes the oldest run that waits, or whose worker fell silent; null when there is none. Atomic. */
export async function claimRun(): Promise<RunRow | null> {
  const db = await getDb();
  const at = now();
  const [claimed] = await db
    .update(run)
    .set({ state: "running", startedAt: sql`coalesce(${run.startedAt}, ${at})`, leaseUntil: at + LEASE_MS })
    .where(
      eq(
        run.id,
        db
          .select({ id: run.id })
          .from(run)
          .where(or(eq(run.state, "queued"), and(eq(run.state, "running"), lt(run.leaseUntil, at))))
          .orderBy(asc(run.createdAt))
          .limit(1),
      ),
    )
    .returning();
  return claimed ?? null;
}

/** A process that starts takes over at once what the one before it left: one process serves a file. */
export async function expireLeases(): Promise<number> {
  const db = await getDb();
  const rows = await db
    .update(run)
    .set({ leaseUntil: 0 })
    .where(eq(run.state, "running"))
    .returning({ id: run.id });
  return rows.length;
}

/** Path ids that a run has results for; a resumed run leaves them out. */
export async function checkedPathIds(runId: string): Promise<Set<string>> {
  const db = await getDb();
  const rows = await db
    .select({ pathId: pathResult.pathId })
    .from(pathResult)
    .where(eq(pathResult.runId, runId));
  return new Set(rows.map((row) => row.pathId));
}

export interface CheckedBatch {
  results: NewPathResult[];
  problems: NewProblem[];
  findings: NewFinding[];
}

/**
 * Writes one batch of results and the progress in one unit.
 * @returns false when the run was cancelled meanwhile: the caller stops
 */
export async function saveBatch(runId: string, batch: CheckedBatch): Promise<boolean> {
  const db = await getDb();
  const progress = db
    .update(run)
    .set({
      done: sql`(SELECT count(*) FROM ${pathResult} WHERE run_id = ${runId} AND path_id NOT LIKE ${LINE_PATTERN})`,
      leaseUntil: now() + LEASE_MS,
    })
    .where(and(eq(run.id, runId), eq(run.state, "running")))
    .returning({ id: run.id });
  const ofRun = batch.results.map((row) => row.pathId);
  // A path that is judged twice, by a process that was thought dead and by its successor, is held once.
  const cleared = slices(ofRun, 500).flatMap((ids) => [
    db.delete(finding).where(and(eq(finding.runId, runId), inArray(finding.pathId, ids))),
    db.delete(problem).where(and(eq(problem.runId, runId), inArray(problem.pathId, ids))),
  ]);
  const inserts = [
    ...cleared,
    ...slices(batch.results, 200).map((rows) => db.insert(pathResult).values(rows).onConflictDoNothing()),
    ...slices(batch.problems, 200).map((rows) => db.insert(problem).values(rows).onConflictDoNothing()),
    ...slices(batch.findings, 200).map((rows) => db.insert(finding).values(rows)),
  ];
  const answers = await db.batch([progress, ...inserts, progress] as [
    typeof progress,
    ...typeof inserts,
    typeof progress,
  ]);
  return (answers[0] as unknown[]).length > 0;
}

/** Ends a run and stores its counts by verdict. */
export async function finishRun(runId: string, counts: Record<string, number>): Promise<void> {
  const db = await getDb();
  await db
    .update(run)
    .set({ state: "done", finishedAt: now(), leaseUntil: null, counts })
    .where(and(eq(run.id, runId), eq(run.state, "running")));
}

export async function failRun(runId: string, message: string): Promise<void> {
  const db = await getDb();
  await db
    .update(run)
    .set({ state: "failed", finishedAt: now(), leaseUntil: null, error: message })
    .where(and(eq(run.id, runId), inArray(run.state, ["queued", "running"])));
}

/** Paths by verdict, counted in the database. */
export async function countVerdicts(runId: string): Promise<Record<string, number>> {
  const db = await getDb();
  const rows = await db
    .select({ verdict: pathResult.verdict, count: sql<number>`count(*)` })
    .from(pathResult)
    .where(and(eq(pathResult.runId, runId), notLike(pathResult.pathId, LINE_PATTERN)))
    .groupBy(pathResult.verdict);
  return Object.fromEntries(rows.map((row) => [row.verdict, row.count]));
}

/** Every problem of a run: the table that is worked. */
export async function listProblems(actor: Actor, projectId: string, runId: string): Promise<ProblemRow[]> {
  await getRun(actor, projectId, runId);
  const db = await getDb();
  return db
    .select()
    .from(problem)
    .where(and(eq(problem.runId, runId), eq(problem.teamId, actor.teamId)))
    .orderBy(asc(problem.verdict), asc(problem.worstShare), asc(problem.pathName));
}

/** The failing problems of a run, by the keys that waivers carry. */
export async function listFailing(
  actor: Actor,
  runId: string,
): Promise<{ pathId: string; mechanism: string }[]> {
  if (!can(actor, "project:read")) throw new NotFoundError("The run");
  const db = await getDb();
  return db
    .select({ pathId: problem.pathId, mechanism: problem.mechanism })
    .from(problem)
    .where(and(eq(problem.runId, runId), eq(problem.teamId, actor.teamId), eq(problem.verdict, "fail")));
}

/** What the table of problems shows of one: with its path's driver and layers, and the worst finding's numbers. */
export async function listProblemRows(
  actor: Actor,
  projectId: string,
  runId: string,
): Promise<ProblemEntry[]> {
  await getRun(actor, projectId, runId);
  const db = await getDb();
  return db
    .select({
      pathId: problem.pathId,
      path: problem.pathName,
      className: problem.className,
      driver: pathResult.driver,
      layers: pathResult.layers,
      mechanism: problem.mechanism,
      title: problem.title,
      verdict: problem.verdict,
      severity: problem.severity,
      rule: problem.worstRule,
      value: finding.value,
      limit: finding.limit,
      unit: finding.unit,
      margin: problem.worstMargin,
      share: problem.worstShare,
      corner: problem.worstCorner,
      failsAt: problem.failsAt,
      ofCorners: problem.ofCorners,
      failsAtNominal: problem.failsAtNominal,
      missing: problem.missing,
      assumed: problem.restsOnAssumed,
      rules: sql<string>`coalesce((SELECT group_concat(DISTINCT f.rule) FROM ${finding} AS f INDEXED BY finding_run_path
        WHERE f.run_id = ${problem.runId} AND f.path_id = ${problem.pathId} AND f.mechanism = ${problem.mechanism}
        AND f.counts), '')`,
    })
    .from(problem)
    .innerJoin(pathResult, and(eq(pathResult.runId, problem.runId), eq(pathResult.pathId, problem.pathId)))
    .leftJoin(
      finding,
      // Left to choose, SQLite takes the index by rule and reads every finding of the rule for each problem.
      sql`${finding.id} = (SELECT f.id FROM ${finding} AS f INDEXED BY finding_run_path WHERE f.run_id = ${problem.runId} AND f.path_id = ${problem.pathId}
        AND f.mechanism = ${problem.mechanism} AND f.rule = ${problem.worstRule} AND f.counts AND f.margin IS NOT NULL
        ORDER BY f.margin LIMIT 1)`,
    )
    .where(and(eq(problem.runId, runId), eq(problem.teamId, actor.teamId)))
    .orderBy(asc(problem.verdict), asc(problem.worstShare), asc(problem.pathName));
}

/** Findings of selectors, which choose what to look at and count for nothing once simulation has judged the path. */
export async function listSelectorRows(
  actor: Actor,
  projectId: string,
  runId: string,
): Promise<SelectorEntry[]> {
  await getRun(actor, projectId, runId);
  const db = await getDb();
  return db
    .select({
      pathId: finding.pathId,
      path: pathResult.name,
      className: pathResult.className,
      rule: finding.rule,
      verdict: finding.verdict,
      value: finding.value,
      limit: finding.limit,
      unit: finding.unit,
      margin: finding.margin,
      missing: finding.missing,
    })
    .from(finding)
    .innerJoin(pathResult, and(eq(pathResult.runId, finding.runId), eq(pathResult.pathId, finding.pathId)))
    .where(and(eq(finding.runId, runId), eq(finding.teamId, actor.teamId), eq(finding.counts, false)))
    .orderBy(asc(finding.verdict), asc(finding.margin));
}

export interface RunPath {
  result: PathResultRow;
  problems: ProblemRow[];
  findings: FindingRow[];
}

export async function getRunPath(
  actor: Actor,
  projectId: string,
  runId: string,
  pathId: string,
): Promise<RunPath> {
  await getRun(actor, projectId, runId);
  const db = await getDb();
  const mine = {
    result: and(
      eq(pathResult.runId, runId),
      eq(pathResult.pathId, pathId),
      eq(pathResult.teamId, actor.teamId),
    ),
  };
  const [[result], problems, findings] = await db.batch([
    db.select().from(pathResult).where(mine.result),
    db
      .select()
      .from(problem)
      .where(and(eq(problem.runId, runId), eq(problem.pathId, pathId), eq(problem.teamId, actor.teamId))),
    db
      .select()
      .from(finding)
      .where(and(eq(finding.runId, runId), eq(finding.pathId, pathId), eq(finding.teamId, actor.teamId))),
  ]);
  if (!result) throw new NotFoundError("The path");
  return { result, problems, findings };
}

/** Findings of a run, all of them or of one rule. */
export async function listFindings(
  actor: Actor,
  projectId: string,
  runId: string,
  rule?: string,
): Promise<FindingRow[]> {
  await getRun(actor, projectId, runId);
  const db = await getDb();
  return db
    .select()
    .from(finding)
    .where(
      and(
        eq(finding.runId, runId),
        eq(finding.teamId, actor.teamId),
        rule ? eq(finding.rule, rule) : undefined,
      ),
    )
    .orderBy(asc(finding.pathId), asc(finding.rule));
}

export async function listPathResults(
  actor: Actor,
  projectId: string,
  runId: string,
): Promise<Omit<PathResultRow, "detail">[]> {
  await getRun(actor, projectId, runId);
  const db = await getDb();
  const { detail: _detail, ...columns } = pathResultColumns;
  return db
    .select(columns)
    .from(pathResult)
    .where(and(eq(pathResult.runId, runId), eq(pathResult.teamId, actor.teamId)))
    .orderBy(asc(pathResult.name));
}

const pathResultColumns = {
  runId: pathResult.runId,
  teamId: pathResult.teamId,
  pathId: pathResult.pathId,
  name: pathResult.name,
  className: pathResult.className,
  classLineageId: pathResult.classLineageId,
  driver: pathResult.driver,
  layers: pathResult.layers,
  verdict: pathResult.verdict,
  worstRule: pathResult.worstRule,
  worstMargin: pathResult.worstMargin,
  inputHash: pathResult.inputHash,
  detail: pathResult.detail,
};

/** Class × rule: paths failing, near and without data, and the worst share of the limit. */
export async function classByRule(actor: Actor, projectId: string, runId: string) {
  await getRun(actor, projectId, runId);
  const db = await getDb();
  return db
    .select({
      className: pathResult.className,
      rule: finding.rule,
      fail: pathsOf("fail"),
      near: pathsOf("near"),
      noData: pathsOf("no data"),
      worstMargin: sql<number | null>`min(${finding.margin})`,
      unit: sql<string>`max(${finding.unit})`,
    })
    .from(finding)
    .innerJoin(pathResult, and(eq(pathResult.runId, finding.runId), eq(pathResult.pathId, finding.pathId)))
    .where(and(eq(finding.runId, runId), eq(finding.teamId, actor.teamId), eq(finding.counts, true)))
    .groupBy(pathResult.className, finding.rule);
}

/** A path that fails a rule at two pins fails it once. */
const pathsOf = (verdict: FindingRow["verdict"]) =>
  sql<number>`count(DISTINCT CASE WHEN ${finding.verdict} = ${verdict} THEN ${finding.pathId} END)`;

/** How many nets stand in and out of scope or unfinished; always shown beside the verdicts. */
export async function countScopes(actor: Actor, revisionId: string): Promise<Record<string, number>> {
  if (!can(actor, "project:read")) throw new NotFoundError("The revision");
  const db = await getDb();
  const rows = await db
    .select({ scope: net.scope, count: sql<number>`count(*)` })
    .from(net)
    .where(and(eq(net.revisionId, revisionId), eq(net.teamId, actor.teamId)))
    .groupBy(net.scope);
  return Object.fromEntries(rows.map((row) => [row.scope, row.count]));
}

/** Corner values are kept for the last three runs and for released ones; of older runs only what was found stays. */
export async function thinOldRuns(projectId: string): Promise<void> {
  const db = await getDb();
  const runs = db.select({ id: run.id }).from(run).where(eq(run.projectId, projectId));
  const recent = runs.orderBy(desc(run.number)).limit(3);
  const released = db.select({ id: release.runId }).from(release).where(eq(release.projectId, projectId));
  await db
    .update(pathResult)
    .set({ detail: Buffer.alloc(0) })
    .where(
      and(
        inArray(pathResult.runId, db.select({ id: run.id }).from(run).where(eq(run.projectId, projectId))),
        notInArray(pathResult.runId, recent),
        notInArray(pathResult.runId, released),
        sql`length(${pathResult.detail}) > 0`,
      ),
    );
}

function slices<T>(rows: T[], size: number): T[][] {
  const result: T[][] = [];
  for (let start = 0; start < rows.length; start += size) result.push(rows.slice(start, start + size));
  return result;
}
