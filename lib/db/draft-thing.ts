import "server-only";
import type { SQL } from "drizzle-orm";
import type { Actor } from "@/lib/schemas/actor";
import { canonicalJson } from "@/lib/schemas/canonical-json";
import { getDb, type Database } from "./client";
import { commitDraftChange, conflictOf, type EditEntity } from "./edit";
import type { RevisionRef } from "./revision";
import type { Statement } from "./unit";

/** A thing as it is now, and what holds only while it stays so. */
export interface Reading<State> {
  /** null: it does not exist */
  state: State | null;
  /** −1 where it does not exist */
  version: number;
  unchanged: SQL[];
}

/**
 * One kind of thing in a draft that is edited, undone and redone as a whole. To add a kind, write one of these
 * beside its queries and name it in undo.ts.
 */
export interface DraftThing<State> {
  entity: EditEntity;
  /** Begins sentences: "The stackup". */
  what: string;
  /** Checks what an edit had stored. */
  parse: (stored: unknown) => State | null;
  /** `like`: a state with the same members, where a thing is a set that its id does not tell. */
  read: (
    actor: Actor,
    draft: RevisionRef,
    entityId: string | null,
    like: State | null,
  ) => Promise<Reading<State>>;
  /** Statements that make it so; null takes it away. */
  write: (
    db: Database,
    draft: RevisionRef,
    entityId: string | null,
    state: State | null,
    version: number,
  ) => Statement[];
  /** Further conditions on the write: nothing else may rest on what is taken away. */
  conditions?: (draft: RevisionRef, entityId: string | null, state: State | null) => SQL[];
  /** Refuses what the actor's role may not do. */
  mayChange: (actor: Actor, before: State | null, after: State | null) => void;
  /** Names of what differs, for those whose edit came second. */
  describe: (before: State | null, after: State | null) => string[];
}

export interface ThingChange<State> {
  entityId: string | null;
  reading: Reading<State>;
  /** The version that the caller had read. */
  readVersion: number;
  after: State | null;
  summary: string;
  /** What a 409 shows as the present thing. */
  answer?: (reading: Reading<State>) => unknown;
}

/**
 * Changes a thing of a draft from the state read a moment ago to another.
 * @returns its new version; the old one where nothing differs
 * @throws ConflictError where it is no longer as the caller had read it
 */
export async function changeThing<State>(
  actor: Actor,
  draft: RevisionRef,
  thing: DraftThing<State>,
  change: ThingChange<State>,
): Promise<number> {
  const { reading, entityId, after } = change;
  const answer = change.answer ?? ((now: Reading<State>) => ({ ...now.state, version: now.version }));
  const conflict = (now: Reading<State>) =>
    conflictOf(
      actor,
      draft,
      { entity: thing.entity, entityId, readVersion: change.readVersion, what: thing.what },
      { state: now.state, answer: now.state === null ? null : answer(now) },
      (before, current) => thing.describe(thing.parse(before), thing.parse(current)),
    );
  if (reading.version !== change.readVersion) throw await conflict(reading);
  thing.mayChange(actor, reading.state, after);
  if (same(reading.state, after)) return reading.version;
  const version = reading.version + 1;
  await commitDraftChange(actor, draft, {
    entity: thing.entity,
    entityId,
    summary: change.summary,
    before: { state: reading.state, version: reading.version },
    after: { state: after, version },
    statements: thing.write(await getDb(), draft, entityId, after, version),
    unchanged: [...reading.unchanged, ...(thing.conditions?.(draft, entityId, after) ?? [])],
    stale: async () => conflict(await thing.read(actor, draft, entityId, reading.state)),
  });
  return version;
}

export function same(a: unknown, b: unknown): boolean {
  return canonicalJson(a) === canonicalJson(b);
}

/** Names of the top fields in which two records differ. */
export function differingFields(a: object | null, b: object | null): string[] {
  const left: Record<string, unknown> = { ...a };
  const right: Record<string, unknown> = { ...b };
  return [...new Set([...Object.keys(left), ...Object.keys(right)])].filter(
    (key) => !same(left[key] ?? null, right[key] ?? null),
  );
}
