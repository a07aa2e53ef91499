import "server-only";
import { and, desc, eq, inArray, isNull, notExists, sql } from "drizzle-orm";
import { missingKind } from "@/lib/resolve/missing-kind";
import { judgeWaiver, type JudgedWaiver } from "@/lib/resolve/waiver-state";
import { can, type Actor } from "@/lib/schemas/actor";
import { NotFoundError, RefusedError } from "@/lib/schemas/errors";
import { maxWaiverMs, noRuleJudges } from "@/lib/schemas/review";
import { commitAudited } from "./audit";
import { getDb } from "./client";
import { now } from "./clock";
import { hasEdited } from "./edit";
import { newId } from "./ids";
import { getRun, getRunPath, type RunRow } from "./run";
import { finding, noDataAcceptance, pathResult, problem, run, signOff, user, waiver } from "./schema";

export type WaiverRow = typeof waiver.$inferSelect;

export interface WaiverView extends WaiverRow {
  authorName: string | null;
  judged: JudgedWaiver;
  /** what the run it is held against found of the same path and problem */
  current: FoundNow[];
}

type FoundNow = Pick<typeof finding.$inferSelect, "rule" | "verdict" | "value" | "unit" | "margin">;

/**
 * Excuses one problem of a finished run, bound to the values it had there. Not by somebody who edited the
 * draft, and never a problem without data.
 */
export async function grantWaiver(
  actor: Actor,
  projectId: string,
  input: { runId: string; pathId: string; mechanism: string; reason: string; expiresAt: number },
): Promise<string> {
  if (!can(actor, "review:waive")) throw new NotFoundError("The problem");
  const row = await getRun(actor, projectId, input.runId);
  await requireNotEditor(actor, row, "waive a problem of it");
  const at = now();
  if (input.expiresAt <= at)
    throw new RefusedError("The waiver would already have expired. Choose a later day.", "expiry", {
      expiresAt: "Choose a later day.",
    });
  if (input.expiresAt > at + maxWaiverMs)
    throw new RefusedError("A waiver lasts two years at most. Choose an earlier day.", "expiry", {
      expiresAt: "Two years at most.",
    });
  const { findings, problems } = await getRunPath(actor, projectId, input.runId, input.pathId);
  const found = problems.find((entry) => entry.mechanism === input.mechanism);
  if (!found) throw new NotFoundError("The problem");
  if (found.verdict === "no data")
    throw new RefusedError(
      "There is no value to waive: the problem has no data. Accept the missing input with a reason instead.",
      "no-data",
    );
  const waived = findings
    .filter((entry) => entry.mechanism === input.mechanism && entry.verdict === "fail")
    .flatMap((entry) =>
      entry.value === null || entry.limit === null || entry.margin === null
        ? []
        : [
            {
              rule: entry.rule,
              value: entry.value,
              limit: entry.limit,
              unit: entry.unit,
              margin: entry.margin,
              corner: entry.corner,
            },
          ],
    );
  if (waived.length === 0)
    throw new RefusedError("Nothing of this problem fails, so there is nothing to waive.", "nothing-fails");
  const db = await getDb();
  const id = newId();
  await commitAudited(
    actor,
    [
      db.insert(waiver).values({
        id,
        teamId: actor.teamId,
        projectId,
        pathLineageId: input.pathId,
        pathName: found.pathName,
        mechanism: input.mechanism,
        runId: input.runId,
        waived,
        worstMargin: found.worstMargin,
        reason: input.reason,
        expiresAt: input.expiresAt,
        createdBy: actor.userId,
        createdAt: at,
      }),
    ],
    {
      action: "waiver.grant",
      subjectKind: "waiver",
      subjectId: id,
      projectId,
      detail: {
        path: found.pathName,
        problem: found.title,
        reason: input.reason,
        expiresAt: input.expiresAt,
      },
    },
  );
  return id;
}

export async function revokeWaiver(actor: Actor, projectId: string, waiverId: string): Promise<void> {
  if (!can(actor, "review:waive")) throw new NotFoundError("The waiver");
  const db = await getDb();
  const [current] = await db
    .select()
    .from(waiver)
    .where(and(eq(waiver.id, waiverId), eq(waiver.projectId, projectId), eq(waiver.teamId, actor.teamId)));
  if (!current) throw new NotFoundError("The waiver");
  if (current.revokedAt !== null) throw new RefusedError("This waiver was revoked already.", "revoked");
  await commitAudited(
    actor,
    [
      db
        .update(waiver)
        .set({ revokedAt: now(), revokedBy: actor.userId })
        .where(and(eq(waiver.id, waiverId), eq(waiver.teamId, actor.teamId), isNull(waiver.revokedAt))),
    ],
    {
      action: "waiver.revoke",
      subjectKind: "waiver",
      subjectId: waiverId,
      projectId,
      detail: { path: current.pathName },
    },
  );
}

/** Every waiver of the project, newest first, held against a run; without a run against itself. */
export async function listWaivers(
  actor: Actor,
  projectId: string,
  row: RunRow | null,
): Promise<WaiverView[]> {
  if (!can(actor, "project:read")) throw new NotFoundError("The project");
  const db = await getDb();
  const rows = await db
    .select({
      waiver,
      authorName: sql<string | null>`(SELECT name FROM ${user} WHERE id = ${waiver.createdBy})`,
    })
    .from(waiver)
    .where(and(eq(waiver.projectId, projectId), eq(waiver.teamId, actor.teamId)))
    .orderBy(desc(waiver.createdAt));
  const at = now();
  const found = row
    ? await valuesNow(
        actor,
        row.id,
        rows.map((entry) => entry.waiver),
      )
    : null;
  return rows.map(({ waiver: granted, authorName }) => {
    const current = found?.findings.get(`${granted.pathLineageId} ${granted.mechanism}`) ?? [];
    const sameInputs =
      !found ||
      found.hash(granted.runId, granted.pathLineageId) === found.hash(row?.id ?? "", granted.pathLineageId);
    return { ...granted, authorName, judged: judgeWaiver(granted, current, sameInputs, at), current };
  });
}

/** Paths asked for in one statement. */
const SLICE = 400;

/** What a run found on the waived paths, and what each of them rested on then and now. */
async function valuesNow(actor: Actor, runId: string, granted: readonly WaiverRow[]) {
  const db = await getDb();
  const findings = new Map<string, FoundNow[]>();
  const hashes = new Map<string, string>();
  const paths = [...new Set(granted.map((entry) => entry.pathLineageId))];
  const runs = [...new Set([runId, ...granted.map((entry) => entry.runId)])];
  for (let start = 0; start < paths.length; start += SLICE) {
    const slice = paths.slice(start, start + SLICE);
    const [found, rested] = await db.batch([
      db
        .select({
          pathId: finding.pathId,
          mechanism: finding.mechanism,
          rule: finding.rule,
          verdict: finding.verdict,
          value: finding.value,
          unit: finding.unit,
          margin: finding.margin,
        })
        .from(finding)
        .where(
          and(
            eq(finding.runId, runId),
            inArray(finding.pathId, slice),
            eq(finding.counts, true),
            eq(finding.teamId, actor.teamId),
          ),
        ),
      db
        .select({ runId: pathResult.runId, pathId: pathResult.pathId, inputHash: pathResult.inputHash })
        .from(pathResult)
        .where(
          and(
            inArray(pathResult.runId, runs),
            inArray(pathResult.pathId, slice),
            eq(pathResult.teamId, actor.teamId),
          ),
        ),
    ]);
    for (const { pathId, mechanism, ...values } of found) {
      const key = `${pathId} ${mechanism}`;
      findings.set(key, [...(findings.get(key) ?? []), values]);
    }
    for (const entry of rested) hashes.set(`${entry.runId} ${entry.pathId}`, entry.inputHash);
  }
  return { findings, hash: (run: string, pathId: string) => hashes.get(`${run} ${pathId}`) };
}

/** Keys of problems whose failures a waiver covers in this run: path lineage and mechanism. */
export async function coveredProblems(
  actor: Actor,
  projectId: string,
  row: RunRow,
): Promise<Map<string, WaiverView>> {
  const covered = new Map<string, WaiverView>();
  for (const view of await listWaivers(actor, projectId, row))
    if (view.judged.covers) covered.set(`${view.pathLineageId} ${view.mechanism}`, view);
  return covered;
}

/** Takes missing inputs as they are, one or many with one reason, for the revision of the run. @returns their ids */
export async function acceptNoData(
  actor: Actor,
  projectId: string,
  input: { runId: string; missing: string | readonly string[]; reason: string },
): Promise<string[]> {
  if (!can(actor, "review:waive")) throw new NotFoundError("The run");
  const row = await getRun(actor, projectId, input.runId);
  await requireNotEditor(actor, row, "accept what is missing in it");
  const asked = [...new Set(typeof input.missing === "string" ? [input.missing] : input.missing)];
  const known = new Set((await missingInputs(actor, row)).map((group) => group.missing));
  if (asked.length === 0 || !asked.every((missing) => known.has(missing)))
    throw new NotFoundError("The missing input");
  const db = await getDb();
  const accepted = new Set((await listAcceptances(actor, row.revisionId)).map((entry) => entry.missing));
  const twice = asked.find((missing) => accepted.has(missing));
  if (twice !== undefined)
    throw new RefusedError(
      asked.length === 1
        ? "This missing input is accepted already."
        : `"${twice}" is accepted already. Read the list anew.`,
      "accepted",
    );
  const at = now();
  const rows = asked.map((missing) => ({
    id: newId(),
    teamId: actor.teamId,
    projectId,
    revisionId: row.revisionId,
    missing,
    reason: input.reason,
    createdBy: actor.userId,
    createdAt: at,
  }));
  await commitAudited(actor, [db.insert(noDataAcceptance).values(rows)], {
    action: "no-data.accept",
    subjectKind: "run",
    subjectId: row.id,
    projectId,
    detail: { missing: listed(asked), reason: input.reason },
  });
  return rows.map(({ id }) => id);
}

/** What the audit log names of many; each stands in the list of what was accepted. */
function listed(missing: readonly string[]): string {
  const named = missing.slice(0, 20).join(", ");
  return missing.length > 20 ? `${named} and ${missing.length - 20} more` : named;
}

export async function withdrawAcceptance(
  actor: Actor,
  projectId: string,
  acceptanceId: string,
): Promise<void> {
  if (!can(actor, "review:waive")) throw new NotFoundError("The acceptance");
  const db = await getDb();
  const [current] = await db
    .select()
    .from(noDataAcceptance)
    .where(
      and(
        eq(noDataAcceptance.id, acceptanceId),
        eq(noDataAcceptance.projectId, projectId),
        eq(noDataAcceptance.teamId, actor.teamId),
        isNull(noDataAcceptance.revokedAt),
      ),
    );
  if (!current) throw new NotFoundError("The acceptance");
  await commitAudited(
    actor,
    [
      db
        .update(noDataAcceptance)
        .set({ revokedAt: now() })
        .where(and(eq(noDataAcceptance.id, acceptanceId), eq(noDataAcceptance.teamId, actor.teamId))),
    ],
    {
      action: "no-data.withdraw",
      subjectKind: "revision",
      subjectId: current.revisionId,
      projectId,
      detail: { missing: current.missing },
    },
  );
}

export async function listAcceptances(actor: Actor, revisionId: string) {
  if (!can(actor, "project:read")) throw new NotFoundError("The revision");
  const db = await getDb();
  return db
    .select({
      id: noDataAcceptance.id,
      missing: noDataAcceptance.missing,
      reason: noDataAcceptance.reason,
      createdAt: noDataAcceptance.createdAt,
      authorName: sql<string | null>`(SELECT name FROM ${user} WHERE id = ${noDataAcceptance.createdBy})`,
    })
    .from(noDataAcceptance)
    .where(
      and(
        eq(noDataAcceptance.revisionId, revisionId),
        eq(noDataAcceptance.teamId, actor.teamId),
        isNull(noDataAcceptance.revokedAt),
      ),
    );
}

/**
 * What is missing in a run, by the input that would fill it, with the paths that filling it would free. A path that no
 * rule judged has no problem to name its lack; it stands under `noRuleJudges`.
 */
export async function missingInputs(
  actor: Actor,
  row: RunRow,
): Promise<{ missing: string; paths: number; kind: string }[]> {
  if (!can(actor, "project:read")) throw new NotFoundError("The run");
  const db = await getDb();
  const named = db
    .select({
      missing: sql<string>`${problem.missing}`,
      paths: sql<number>`count(DISTINCT ${problem.pathId})`,
      cause: sql<string | null>`min(${problem.cause})`,
    })
    .from(problem)
    .where(
      and(
        eq(problem.runId, row.id),
        eq(problem.teamId, actor.teamId),
        eq(problem.verdict, "no data"),
        sql`${problem.missing} IS NOT NULL`,
      ),
    )
    .groupBy(problem.missing)
    .orderBy(sql`2 DESC`, problem.missing);
  const unnamed = db
    .select({ paths: sql<number>`count(*)` })
    .from(pathResult)
    .where(
      and(
        eq(pathResult.runId, row.id),
        eq(pathResult.teamId, actor.teamId),
        eq(pathResult.verdict, "no data"),
        notExists(
          db
            .select({ one: sql`1` })
            .from(problem)
            .where(
              and(
                eq(problem.runId, pathResult.runId),
                eq(problem.pathId, pathResult.pathId),
                eq(problem.verdict, "no data"),
                sql`${problem.missing} IS NOT NULL`,
              ),
            ),
        ),
      ),
    );
  const [rows, [without]] = await db.batch([named, unnamed]);
  const groups = rows.map(({ missing, paths, cause }) => ({
    missing,
    paths,
    kind: missingKind(missing, cause),
  }));
  return without && without.paths > 0
    ? [{ missing: noRuleJudges, paths: without.paths, kind: missingKind(noRuleJudges, null) }, ...groups]
    : groups;
}

/** A reviewer's signature on a finished run of the draft; not by somebody who edited it. */
export async function signRun(
  actor: Actor,
  projectId: string,
  runId: string,
  remark: string,
): Promise<string> {
  if (!can(actor, "review:sign")) throw new NotFoundError("The run");
  const row = await getRun(actor, projectId, runId);
  if (row.state !== "done")
    throw new RefusedError(
      `Run ${row.number} is ${row.state}. Only a finished run can be signed.`,
      "unfinished",
    );
  await requireNotEditor(actor, row, "sign it off");
  const db = await getDb();
  const id = newId();
  await commitAudited(
    actor,
    [
      db.insert(signOff).values({
        id,
        teamId: actor.teamId,
        projectId,
        revisionId: row.revisionId,
        runId,
        inputHash: row.inputHash,
        signedBy: actor.userId,
        signedAt: now(),
        remark,
      }),
    ],
    {
      action: "run.sign",
      subjectKind: "run",
      subjectId: runId,
      projectId,
      detail: { number: row.number, remark },
    },
  );
  return id;
}

export async function withdrawSignature(actor: Actor, projectId: string, signOffId: string): Promise<void> {
  if (!can(actor, "review:sign")) throw new NotFoundError("The signature");
  const db = await getDb();
  const [current] = await db
    .select()
    .from(signOff)
    .where(
      and(
        eq(signOff.id, signOffId),
        eq(signOff.projectId, projectId),
        eq(signOff.teamId, actor.teamId),
        eq(signOff.signedBy, actor.userId),
        isNull(signOff.withdrawnAt),
      ),
    );
  if (!current) throw new NotFoundError("The signature");
  await commitAudited(
    actor,
    [
      db
        .update(signOff)
        .set({ withdrawnAt: now() })
        .where(and(eq(signOff.id, signOffId), eq(signOff.teamId, actor.teamId))),
    ],
    { action: "run.unsign", subjectKind: "run", subjectId: current.runId, projectId },
  );
}

export async function listSignatures(actor: Actor, revisionId: string) {
  if (!can(actor, "project:read")) throw new NotFoundError("The revision");
  const db = await getDb();
  return db
    .select({
      id: signOff.id,
      runId: signOff.runId,
      runNumber: run.number,
      inputHash: signOff.inputHash,
      signedBy: signOff.signedBy,
      signerName: sql<string | null>`(SELECT name FROM ${user} WHERE id = ${signOff.signedBy})`,
      signedAt: signOff.signedAt,
      remark: signOff.remark,
    })
    .from(signOff)
    .innerJoin(run, eq(run.id, signOff.runId))
    .where(
      and(eq(signOff.revisionId, revisionId), eq(signOff.teamId, actor.teamId), isNull(signOff.withdrawnAt)),
    )
    .orderBy(desc(signOff.signedAt));
}

async function requireNotEditor(actor: Actor, row: RunRow, act: string): Promise<void> {
  if (await hasEdited(actor, row.revisionId))
    throw new RefusedError(`You edited this draft, so another reviewer must ${act}.`, "editor");
}
