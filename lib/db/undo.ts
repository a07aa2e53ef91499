import "server-only";
import { and, asc, desc, eq, isNotNull, isNull, notExists, sql } from "drizzle-orm";
import { alias } from "drizzle-orm/sqlite-core";
import type { Actor } from "@/lib/schemas/actor";
import { ConflictError, RefusedError } from "@/lib/schemas/errors";
import { bindingsThing } from "./binding";
import { getDb } from "./client";
import { same, type DraftThing } from "./draft-thing";
import { commitDraftChange, type EditSide } from "./edit";
import { modelThing } from "./model";
import { netsThing } from "./net-fields";
import { netClassThing } from "./net-class";
import { getDraft, type RevisionRef } from "./revision";
import { ruleSetThing } from "./rule-set";
import { edit } from "./schema";
import { stackupThing } from "./stackup";
import { isUniqueFailure } from "./unit";

type StoredEdit = typeof edit.$inferSelect;

export interface Moved {
  id: string;
  entity: string;
  entityId: string | null;
  summary: string;
}

/** Takes back the actor's last edit of the draft that still stands. */
export async function undo(actor: Actor, projectId: string): Promise<Moved> {
  const draft = await getDraft(actor, projectId, "project:read");
  const last = await lastEdit(actor, draft);
  if (!last)
    throw new RefusedError(
      "You have made no edit of this draft that could be taken back.",
      "nothing-to-undo",
    );
  if (!last.before || !last.after)
    throw new RefusedError(
      `The last edit, "${last.summary}", is an import and is not taken back. Import the former list again instead.`,
      "not-undoable",
    );
  return move(actor, draft, last, true);
}

/** Brings back the edit that the actor took back last, unless they went on editing since. */
export async function redo(actor: Actor, projectId: string): Promise<Moved> {
  const draft = await getDraft(actor, projectId, "project:read");
  const last = await lastUndone(actor, draft);
  if (!last?.before || !last.after)
    throw new RefusedError("There is no edit to bring back.", "nothing-to-redo");
  return move(actor, draft, last, false);
}

export interface UndoState {
  undo: string | null;
  redo: string | null;
}

/** What undo and redo would do now, in words for their buttons. */
export async function undoState(actor: Actor, draft: RevisionRef): Promise<UndoState> {
  const [last, undone] = await Promise.all([lastEdit(actor, draft), lastUndone(actor, draft)]);
  return { undo: last?.before ? last.summary : null, redo: undone?.summary ?? null };
}

async function move(actor: Actor, draft: RevisionRef, stored: StoredEdit, undone: boolean): Promise<Moved> {
  switch (stored.entity) {
    case "stackup":
      return moveThing(actor, draft, stored, undone, stackupThing);
    case "class":
      return moveThing(actor, draft, stored, undone, netClassThing);
    case "model":
      return moveThing(actor, draft, stored, undone, modelThing);
    case "bindings":
      return moveThing(actor, draft, stored, undone, bindingsThing);
    case "rules":
      return moveThing(actor, draft, stored, undone, ruleSetThing);
    case "nets":
      return moveThing(actor, draft, stored, undone, netsThing);
    default:
      throw new RefusedError(`"${stored.summary}" is not taken back.`, "not-undoable");
  }
}

async function moveThing<State>(
  actor: Actor,
  draft: RevisionRef,
  stored: StoredEdit,
  undone: boolean,
  thing: DraftThing<State>,
): Promise<Moved> {
  const [from, to] = (undone ? [stored.after, stored.before] : [stored.before, stored.after]) as [
    EditSide,
    EditSide,
  ];
  const expected = thing.parse(from.state);
  const wanted = thing.parse(to.state);
  const reading = await thing.read(actor, draft, stored.entityId, expected ?? wanted);
  const changedSince = async () => {
    const now = await thing.read(actor, draft, stored.entityId, expected ?? wanted);
    const changed = thing.describe(expected, now.state);
    return new ConflictError(
      `${thing.what} was changed after "${stored.summary}"${changed.length > 0 ? ` (${changed.slice(0, 5).join(", ")})` : ""}, so that edit is not ${undone ? "taken back" : "brought back"}. Change it by hand.`,
      now.state,
      changed,
    );
  };
  if (!same(reading.state, expected)) throw await changedSince();
  thing.mayChange(actor, reading.state, wanted);
  const version = Math.max(reading.version, from.version, to.version) + 1;
  const commit = commitDraftChange(actor, draft, {
    entity: thing.entity,
    entityId: stored.entityId,
    summary: stored.summary,
    before: null,
    after: null,
    statements: thing.write(await getDb(), draft, stored.entityId, wanted, version),
    unchanged: [...reading.unchanged, ...(thing.conditions?.(draft, stored.entityId, wanted) ?? [])],
    stale: changedSince,
    moves: { editId: stored.id, undone },
  });
  await commit.catch((error: unknown) => {
    if (!isUniqueFailure(error, "")) throw error;
    throw new RefusedError(
      `"${stored.summary}" is not ${undone ? "taken back" : "brought back"}: its name has been given to another since. Rename that one first.`,
      "name-taken",
    );
  });
  return { id: stored.id, entity: stored.entity, entityId: stored.entityId, summary: stored.summary };
}

async function lastEdit(actor: Actor, draft: RevisionRef): Promise<StoredEdit | undefined> {
  const db = await getDb();
  const [row] = await db
    .select()
    .from(edit)
    .where(and(own(actor, draft), isNull(edit.undoneAt)))
    .orderBy(desc(edit.at), desc(edit.id))
    .limit(1);
  return row;
}

async function lastUndone(actor: Actor, draft: RevisionRef): Promise<StoredEdit | undefined> {
  const db = await getDb();
  const later = alias(edit, "later");
  const [row] = await db
    .select()
    .from(edit)
    .where(
      and(
        own(actor, draft),
        isNotNull(edit.undoneAt),
        notExists(
          db
            .select({ one: sql`1` })
            .from(later)
            .where(
              and(
                eq(later.revisionId, draft.id),
                eq(later.teamId, actor.teamId),
                eq(later.actorId, actor.userId),
                sql`${later.at} > ${edit.undoneAt}`,
              ),
            ),
        ),
      ),
    )
    .orderBy(desc(edit.undoneAt), asc(edit.at), asc(edit.id))
    .limit(1);
  return row;
}

function own(actor: Actor, draft: RevisionRef) {
  return and(eq(edit.teamId, actor.teamId), eq(edit.revisionId, draft.id), eq(edit.actorId, actor.userId));
}
