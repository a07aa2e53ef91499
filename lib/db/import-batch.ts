import "server-only";
import { promisify } from "node:util";
import { gunzip, gzip } from "node:zlib";
import { and, desc, eq, inArray, sql, type SQL } from "drizzle-orm";
import type { Actor, UserActor } from "@/lib/schemas/actor";
import { NotFoundError, RefusedError } from "@/lib/schemas/errors";
import { importSettings, type ImportReport, type ImportSettings } from "@/lib/schemas/import-list";
import { requirePermission, within } from "./access";
import { getDb } from "./client";
import { now } from "./clock";
import { newId } from "./ids";
import { readRole } from "./membership";
import type { RevisionRef } from "./revision";
import { importBatch, revision, user } from "./schema";
import { guard, type Statement } from "./unit";

const zip = promisify(gzip);
const unzip = promisify(gunzip);

/** An import without its text. */
export type ImportRow = Omit<typeof importBatch.$inferSelect, "source" | "mapping" | "report"> & {
  settings: ImportSettings;
  report: ImportReport | null;
};

/** Dropped and old imports of a draft leave no text behind; so many stay to be looked at. */
const LISTED = 50;

const columns = {
  id: importBatch.id,
  teamId: importBatch.teamId,
  revisionId: importBatch.revisionId,
  kind: importBatch.kind,
  fileName: importBatch.fileName,
  state: importBatch.state,
  mapping: importBatch.mapping,
  report: importBatch.report,
  total: importBatch.total,
  done: importBatch.done,
  createdBy: importBatch.createdBy,
  createdAt: importBatch.createdAt,
  finishedAt: importBatch.finishedAt,
  error: importBatch.error,
};

/** Keeps a list that was read, until somebody confirms or drops it. The draft was got with the right to edit. */
export async function createImport(
  actor: Actor,
  draft: RevisionRef,
  list: { fileName: string; text: string; total: number; settings: ImportSettings },
): Promise<string> {
  const db = await getDb();
  const id = newId();
  await db.insert(importBatch).values({
    id,
    teamId: draft.teamId,
    revisionId: draft.id,
    kind: list.settings.mapping.kind,
    fileName: list.fileName,
    state: "parsed",
    mapping: list.settings,
    source: await zip(list.text),
    total: list.total,
    createdBy: actor.userId,
    createdAt: now(),
  });
  return id;
}

/** @throws NotFoundError */
export async function getImport(actor: Actor, projectId: string, importId: string): Promise<ImportRow> {
  const db = await getDb();
  const [row] = await db
    .select(columns)
    .from(importBatch)
    .where(own(actor, projectId, importId));
  if (!row) throw new NotFoundError("This import");
  return readRow(row);
}

/** The latest imports into a project, the newest first. */
export async function listImports(actor: Actor, projectId: string): Promise<ImportRow[]> {
  const db = await getDb();
  const rows = await db
    .select(columns)
    .from(importBatch)
    .where(own(actor, projectId))
    .orderBy(desc(importBatch.createdAt), desc(importBatch.id))
    .limit(LISTED);
  return rows.map(readRow);
}

/** The text as it came, decoded. @throws NotFoundError where it was dropped */
export async function readImportText(actor: Actor, projectId: string, importId: string): Promise<string> {
  const db = await getDb();
  const [row] = await db
    .select({ source: importBatch.source })
    .from(importBatch)
    .where(own(actor, projectId, importId));
  if (!row?.source) throw new NotFoundError("The text of this import");
  return (await unzip(row.source)).toString("utf8");
}

/** Reads the list another way. @throws RefusedError once it is confirmed */
export async function saveImportSettings(
  actor: Actor,
  projectId: string,
  importId: string,
  settings: ImportSettings,
  total: number,
): Promise<void> {
  await change(actor, projectId, importId, ["parsed", "failed"], {
    mapping: settings,
    kind: settings.mapping.kind,
    total,
    state: "parsed",
    error: null,
  });
}

/** Confirmed: from here it is applied, whatever happens to this process. */
export async function beginImport(
  actor: Actor,
  projectId: string,
  importId: string,
  settings: ImportSettings,
): Promise<void> {
  await change(actor, projectId, importId, ["parsed", "failed"], {
    mapping: { ...settings, confirmedBy: actor.userId },
    state: "applying",
    error: null,
  });
}

/** Drops a list that is not applied yet, also one that is being applied: nothing of it then stays. */
export async function cancelImport(actor: Actor, projectId: string, importId: string): Promise<void> {
  await change(actor, projectId, importId, ["parsed", "failed", "applying"], {
    state: "cancelled",
    source: null,
    finishedAt: now(),
  });
}

/** Written with the rows themselves: either both stand or neither. Refuses the unit where it was cancelled. */
export async function appliedStatements(importId: string, report: ImportReport): Promise<Statement[]> {
  const db = await getDb();
  const applying = sql`exists (select 1 from ${importBatch} where ${importBatch.id} = ${importId} and ${importBatch.state} = 'applying')`;
  return [
    guard(db, applying),
    db
      .update(importBatch)
      .set({ state: "applied", report, done: report.total, finishedAt: now() })
      .where(eq(importBatch.id, importId)),
  ];
}

/** For the worker: notes why it could not be applied, unless it was cancelled meanwhile. */
export async function failImport(importId: string, message: string): Promise<void> {
  const db = await getDb();
  await db
    .update(importBatch)
    .set({ state: "failed", error: message.slice(0, 500) })
    .where(and(eq(importBatch.id, importId), eq(importBatch.state, "applying")));
}

export interface ClaimedImport {
  row: ImportRow;
  projectId: string;
  /** Who confirmed it, in the role they have now; null: they may no longer. */
  actor: UserActor | null;
}

/** For the worker: the oldest import that was confirmed and is not applied yet. */
export async function nextConfirmedImport(): Promise<ClaimedImport | null> {
  const db = await getDb();
  const [found] = await db
    .select({ ...columns, projectId: revision.projectId })
    .from(importBatch)
    .innerJoin(revision, eq(revision.id, importBatch.revisionId))
    .where(eq(importBatch.state, "applying"))
    .orderBy(importBatch.createdAt, importBatch.id)
    .limit(1);
  if (!found) return null;
  const { projectId, ...columnsOfRow } = found;
  const row = readRow(columnsOfRow);
  return { row, projectId, actor: await confirmer(row) };
}

async function confirmer(row: ImportRow): Promise<UserActor | null> {
  const userId = row.settings.confirmedBy ?? row.createdBy;
  const role = await readRole(userId, row.teamId);
  if (!role) return null;
  const db = await getDb();
  const [person] = await db
    .select({ name: user.name, email: user.email })
    .from(user)
    .where(eq(user.id, userId));
  return person ? { kind: "user", userId, teamId: row.teamId, role, ...person } : null;
}

async function change(
  actor: Actor,
  projectId: string,
  importId: string,
  from: ImportRow["state"][],
  set: Partial<typeof importBatch.$inferInsert>,
): Promise<void> {
  const db = await getDb();
  const changed = await db
    .update(importBatch)
    .set(set)
    .where(and(own(actor, projectId, importId, true), inArray(importBatch.state, from)))
    .returning({ id: importBatch.id });
  if (changed.length > 0) return;
  requirePermission(actor, "draft:edit", "This import");
  const row = await getImport(actor, projectId, importId);
  throw new RefusedError(
    row.state === "applied"
      ? "This list is in already. Import another, or the former one again."
      : row.state === "cancelled"
        ? "This import was dropped. Choose the file again."
        : "This list is being read in. Wait until it is done, or cancel it.",
    "import-state",
  );
}

function own(actor: Actor, projectId: string, importId?: string, toEdit = false): SQL | undefined {
  return and(
    within(actor, toEdit ? "draft:edit" : "project:read", importBatch.teamId),
    importId === undefined ? undefined : eq(importBatch.id, importId),
    sql`${importBatch.revisionId} in (select ${revision.id} from ${revision}
      where ${revision.projectId} = ${projectId} and ${revision.teamId} = ${actor.teamId})`,
  );
}

function readRow(
  row: { mapping: unknown; report: unknown } & Omit<ImportRow, "settings" | "report">,
): ImportRow {
  const { mapping, report, ...rest } = row;
  return {
    ...rest,
    settings: importSettings.parse(mapping),
    report: (report as ImportReport | null) ?? null,
  };
}
