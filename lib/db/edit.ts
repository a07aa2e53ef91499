import "server-only";
import { and, asc, count, desc, eq, gte, isNull, sql, type SQL } from "drizzle-orm";
import type { Actor } from "@/lib/schemas/actor";
import { ConflictError, RefusedError } from "@/lib/schemas/errors";
import { within } from "./access";
import { commitAudited } from "./audit";
import { getDb, type Database } from "./client";
import { now } from "./clock";
import { newId } from "./ids";
import { stillDraft, type RevisionRef } from "./revision";
import { edit, project, revision, user } from "./schema";
import { guard, GuardError, type Statement } from "./unit";

export type EditEntity =
  "stackup" | "class" | "model" | "bindings" | "rules" | "nets" | "parts" | "import" | "neighbours";

/** What the `before` and `after` of an edit hold: the thing's whole state, null where there was none. */
export interface EditSide {
  state: unknown;
  version: number;
}

export interface DraftChange {
  entity: EditEntity;
  entityId: string | null;
  /** What was done, in a few words: "Class DDR data: target impedance". */
  summary: string;
  /** null: cannot be undone */
  before: EditSide | null;
  after: EditSide | null;
  statements: readonly Statement[];
  /** Hold only while the thing is as it was read. */
  unchanged: readonly SQL[];
  /** What to throw when one of these no longer holds. */
  stale: () => Promise<Error>;
  /** An edit that this one takes back or brings back, instead of being recorded itself. */
  moves?: { editId: string; undone: boolean };
}

/**
 * Writes a change of a draft as one unit: the change, the edit that records it, the draft's edit count, the
 * audit entry; all of it only while the revision is a draft and the thing is as it was read.
 */
export async function commitDraftChange(
  actor: Actor,
  draft: RevisionRef,
  change: DraftChange,
): Promise<void> {
  const db = await getDb();
  const at = now();
  const guards = [stillDraft(actor, draft.id), ...change.unchanged];
  const record = change.moves
    ? db
        .update(edit)
        .set({ undoneAt: change.moves.undone ? at : null })
        .where(and(eq(edit.id, change.moves.editId), eq(edit.teamId, actor.teamId)))
    : db.insert(edit).values({
        id: newId(),
        teamId: actor.teamId,
        revisionId: draft.id,
        actorId: actor.userId,
        at,
        entity: change.entity,
        entityId: change.entityId,
        summary: change.summary,
        before: change.before,
        after: change.after,
      });
  try {
    await commitAudited(
      actor,
      [
        ...guards.map((condition) => guard(db, condition)),
        ...change.statements,
        record,
        ...touch(db, actor, draft, at),
      ],
      {
        action: change.moves ? (change.moves.undone ? "draft.undo" : "draft.redo") : "draft.edit",
        subjectKind: change.entity,
        subjectId: change.entityId,
        projectId: draft.projectId,
        detail: { revision: draft.letter, summary: change.summary },
      },
    );
  } catch (error) {
    if (!(error instanceof GuardError)) throw error;
    if (error.index === 0)
      throw new RefusedError(
        `Revision ${draft.letter} was released, or its project archived, before this change was saved. Start a new draft and make it there.`,
        "no-draft",
      );
    throw await change.stale();
  }
}

export interface EditRow {
  id: string;
  at: number;
  actorId: string;
  actorName: string;
  entity: string;
  entityId: string | null;
  summary: string;
  undoneAt: number | null;
  /** false: an import, which is not taken back */
  undoable: boolean;
}

/** The latest edits of a revision, the newest first. */
export async function listEdits(actor: Actor, revisionId: string, limit = 200): Promise<EditRow[]> {
  const db = await getDb();
  return db
    .select({
      id: edit.id,
      at: edit.at,
      actorId: edit.actorId,
      actorName: sql<string>`coalesce(${user.name}, 'Ringfence')`,
      entity: edit.entity,
      entityId: edit.entityId,
      summary: edit.summary,
      undoneAt: edit.undoneAt,
      undoable: sql<boolean>`${edit.before} is not null`.mapWith(Boolean),
    })
    .from(edit)
    .leftJoin(user, eq(user.id, edit.actorId))
    .where(and(within(actor, "project:read", edit.teamId), eq(edit.revisionId, revisionId)))
    .orderBy(desc(edit.at), desc(edit.id))
    .limit(limit);
}

export interface Editor {
  userId: string;
  name: string;
  edits: number;
}

/** Everyone who edited this draft since it began, edits taken back included: they neither sign nor waive it. */
export async function listEditors(actor: Actor, revisionId: string): Promise<Editor[]> {
  const db = await getDb();
  return db
    .select({ userId: edit.actorId, name: sql<string>`coalesce(${user.name}, 'Ringfence')`, edits: count() })
    .from(edit)
    .leftJoin(user, eq(user.id, edit.actorId))
    .where(and(within(actor, "project:read", edit.teamId), eq(edit.revisionId, revisionId)))
    .groupBy(edit.actorId)
    .orderBy(asc(edit.actorId));
}

/** Whether the actor made an edit of this draft. */
export async function hasEdited(actor: Actor, revisionId: string): Promise<boolean> {
  const db = await getDb();
  const rows = await db
    .select({ id: edit.id })
    .from(edit)
    .where(
      and(
        within(actor, "project:read", edit.teamId),
        eq(edit.revisionId, revisionId),
        eq(edit.actorId, actor.userId),
      ),
    )
    .limit(1);
  return rows.length > 0;
}

/**
 * The answer to a write that was made on an old version: who changed the thing meanwhile, and in what.
 * @param what     begins the sentence: "The stackup"
 * @param describe names of what differs between the state that the caller had read and the present one
 */
export async function conflictOf(
  actor: Actor,
  draft: RevisionRef,
  thing: { entity: EditEntity; entityId: string | null; readVersion: number; what: string },
  current: { state: unknown; answer: unknown },
  describe: (before: unknown, current: unknown) => string[],
): Promise<ConflictError> {
  const db = await getDb();
  const since = await db
    .select({ before: edit.before, name: user.name })
    .from(edit)
    .leftJoin(user, eq(user.id, edit.actorId))
    .where(
      and(
        eq(edit.teamId, actor.teamId),
        eq(edit.revisionId, draft.id),
        eq(edit.entity, thing.entity),
        thing.entityId === null ? isNull(edit.entityId) : eq(edit.entityId, thing.entityId),
        gte(sql`json_extract(${edit.before}, '$.version')`, thing.readVersion),
      ),
    )
    .orderBy(asc(edit.at), asc(edit.id));
  const first = since[0]?.before as EditSide | null | undefined;
  const changed = first ? describe(first.state, current.state) : [];
  const names = [...new Set(since.flatMap((row) => (row.name === null ? [] : [row.name])))];
  const by = names.length > 0 ? ` by ${names.join(" and ")}` : "";
  const what = changed.length > 0 ? ` (${changed.slice(0, 5).join(", ")})` : "";
  return new ConflictError(
    `${thing.what} was changed${by} after you opened it${what}. Take the present one, or save yours over it.`,
    current.answer,
    changed,
  );
}

function touch(db: Database, actor: Actor, draft: RevisionRef, at: number): Statement[] {
  return [
    db
      .update(revision)
      .set({ editCount: sql`${revision.editCount} + 1` })
      .where(and(eq(revision.id, draft.id), eq(revision.teamId, actor.teamId))),
    db
      .update(project)
      .set({ updatedAt: at })
      .where(and(eq(project.id, draft.projectId), eq(project.teamId, actor.teamId))),
  ];
}
