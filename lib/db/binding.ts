import "server-only";
import { and, asc, eq, sql } from "drizzle-orm";
import { z } from "zod";
import { can, type Actor } from "@/lib/schemas/actor";
import { id } from "@/lib/schemas/common";
import { NotFoundError, RefusedError } from "@/lib/schemas/errors";
import { bindingDoc, pinRole, type BindingDoc, type StoredBinding } from "@/lib/schemas/model";
import { within } from "./access";
import { getDb } from "./client";
import { changeThing, same, type DraftThing } from "./draft-thing";
import { newId } from "./ids";
import { listModels } from "./model";
import { getDraft, type RevisionRef } from "./revision";
import { binding, ruleSet } from "./schema";

export interface BindingList {
  version: number;
  bindings: StoredBinding[];
}

const bindingsState = z.array(bindingDoc.extend({ id }));

/** The bindings of a revision, in the order in which they are tried. @throws NotFoundError */
export async function getBindings(actor: Actor, revision: Pick<RevisionRef, "id">): Promise<BindingList> {
  const db = await getDb();
  const [head] = await db
    .select({ version: ruleSet.bindingsVersion })
    .from(ruleSet)
    .where(and(within(actor, "project:read", ruleSet.teamId), eq(ruleSet.revisionId, revision.id)));
  if (!head) throw new NotFoundError("This list of bindings");
  const rows = await db
    .select()
    .from(binding)
    .where(and(within(actor, "project:read", binding.teamId), eq(binding.revisionId, revision.id)))
    .orderBy(asc(binding.position));
  return {
    version: head.version,
    bindings: rows.map((row) => ({
      id: row.id,
      referencePattern: row.referencePattern,
      partNumberPattern: row.partNumberPattern,
      pinPattern: row.pinPattern,
      netPattern: row.netPattern,
      role: pinRole.parse(row.role),
      modelLineageId: row.modelLineageId,
    })),
  };
}

/** Puts a whole ordered list in place of the draft's. @throws ConflictError */
export async function putBindings(
  actor: Actor,
  projectId: string,
  readVersion: number,
  input: readonly BindingDoc[],
): Promise<BindingList> {
  const draft = await getDraft(actor, projectId);
  const docs = z.array(bindingDoc).parse(input);
  const known = new Set((await listModels(actor, draft)).map((model) => model.lineageId));
  const stray = docs.findIndex((doc) => doc.modelLineageId !== null && !known.has(doc.modelLineageId));
  if (stray >= 0) {
    const message = `Binding ${stray + 1} names a model that this draft does not have. Choose one of its models.`;
    throw new RefusedError(message, "unknown-model", { [`bindings.${stray}.modelLineageId`]: message });
  }
  const reading = await bindingsThing.read(actor, draft, null, null);
  const present = reading.state ?? [];
  const after = docs.map((doc, index) => {
    const was = present[index];
    const unchanged = was && same({ ...doc, id: was.id }, was);
    return { ...doc, id: unchanged ? was.id : newId() };
  });
  await changeThing(actor, draft, bindingsThing, {
    entityId: null,
    reading,
    readVersion,
    after,
    summary: `Bindings: ${docs.length === 1 ? "1 line" : `${docs.length} lines`}`,
    answer: ({ state, version }) => ({ bindings: state ?? [], version }),
  });
  return getBindings(actor, draft);
}

export const bindingsThing: DraftThing<StoredBinding[]> = {
  entity: "bindings",
  what: "The list of bindings",
  parse: (state) => (state === null ? null : bindingsState.parse(state)),
  read: async (actor, draft) => {
    const { version, bindings } = await getBindings(actor, draft);
    return {
      state: bindings,
      version,
      unchanged: [
        sql`exists (select 1 from ${ruleSet} where ${ruleSet.revisionId} = ${draft.id} and ${ruleSet.bindingsVersion} = ${version})`,
      ],
    };
  },
  write: (db, draft, _entityId, state, version) => [
    db
      .update(ruleSet)
      .set({ bindingsVersion: version })
      .where(and(eq(ruleSet.revisionId, draft.id), eq(ruleSet.teamId, draft.teamId))),
    db.delete(binding).where(and(eq(binding.revisionId, draft.id), eq(binding.teamId, draft.teamId))),
    ...(state && state.length > 0
      ? [
          db.insert(binding).values(
            state.map((line, position) => ({
              ...line,
              position,
              teamId: draft.teamId,
              revisionId: draft.id,
            })),
          ),
        ]
      : []),
  ],
  mayChange: (actor) => {
    if (!can(actor, "draft:edit")) throw new NotFoundError("This list of bindings");
  },
  describe: (before, after) => {
    const changed: string[] = [];
    const lines = Math.max(before?.length ?? 0, after?.length ?? 0);
    for (let line = 0; line < lines; line++)
      if (!same(before?.[line] ?? null, after?.[line] ?? null)) changed.push(`line ${line + 1}`);
    return changed;
  },
};
