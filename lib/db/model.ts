import "server-only";
import { and, asc, eq, or, sql } from "drizzle-orm";
import { z } from "zod";
import { can, type Actor } from "@/lib/schemas/actor";
import { id } from "@/lib/schemas/common";
import { NotFoundError, RefusedError } from "@/lib/schemas/errors";
import { modelDoc, type ModelDoc, type StoredModel } from "@/lib/schemas/model";
import { within } from "./access";
import { getDb } from "./client";
import { changeThing, differingFields, type DraftThing } from "./draft-thing";
import { newId } from "./ids";
import { getDraft, type RevisionRef } from "./revision";
import { binding, model, netClass } from "./schema";
import { isUniqueFailure } from "./unit";

const modelState = modelDoc.and(z.object({ id, lineageId: id }));
type ModelState = Omit<StoredModel, "version">;

export async function listModels(actor: Actor, revision: Pick<RevisionRef, "id">): Promise<StoredModel[]> {
  const db = await getDb();
  const rows = await db
    .select()
    .from(model)
    .where(and(within(actor, "project:read", model.teamId), eq(model.revisionId, revision.id)))
    .orderBy(asc(model.name));
  return rows.map(stored);
}

/** By its id or its lineage. @throws NotFoundError */
export async function getModel(
  actor: Actor,
  revision: Pick<RevisionRef, "id">,
  modelId: string,
): Promise<StoredModel> {
  const db = await getDb();
  const [row] = await db
    .select()
    .from(model)
    .where(
      and(
        within(actor, "project:read", model.teamId),
        eq(model.revisionId, revision.id),
        or(eq(model.id, modelId), eq(model.lineageId, modelId)),
      ),
    );
  if (!row) throw new NotFoundError("This model");
  return stored(row);
}

export async function createModel(actor: Actor, projectId: string, input: ModelDoc): Promise<StoredModel> {
  const draft = await getDraft(actor, projectId);
  const doc = modelDoc.parse(input);
  const after = { ...doc, id: newId(), lineageId: newId() };
  await naming(doc.name, () =>
    changeThing(actor, draft, modelThing, {
      entityId: after.lineageId,
      reading: { state: null, version: -1, unchanged: [] },
      readVersion: -1,
      after,
      summary: `Model ${doc.name} made`,
    }),
  );
  return getModel(actor, draft, after.id);
}

/** @throws ConflictError */
export async function putModel(
  actor: Actor,
  projectId: string,
  modelId: string,
  readVersion: number,
  input: ModelDoc,
): Promise<StoredModel> {
  const draft = await getDraft(actor, projectId);
  const doc = modelDoc.parse(input);
  const present = await getModel(actor, draft, modelId);
  const reading = await modelThing.read(actor, draft, present.lineageId, null);
  const after = { ...doc, id: present.id, lineageId: present.lineageId };
  await naming(doc.name, () =>
    changeThing(actor, draft, modelThing, {
      entityId: present.lineageId,
      reading,
      readVersion,
      after,
      summary: `Model ${doc.name}: ${modelThing.describe(reading.state, after).slice(0, 3).join(", ")}`,
    }),
  );
  return getModel(actor, draft, present.id);
}

/** Takes a model away. @throws RefusedError where a class or a binding uses it */
export async function deleteModel(
  actor: Actor,
  projectId: string,
  modelId: string,
  readVersion: number,
): Promise<void> {
  const draft = await getDraft(actor, projectId);
  const present = await getModel(actor, draft, modelId);
  const users = await usersOf(actor, draft, present.lineageId);
  if (users.length > 0)
    throw new RefusedError(
      `Model ${present.name} is used by ${users.join(" and ")}. Give ${users.length === 1 ? "it" : "them"} another model first.`,
      "model-in-use",
      {},
      { users },
    );
  const reading = await modelThing.read(actor, draft, present.lineageId, null);
  await changeThing(actor, draft, modelThing, {
    entityId: present.lineageId,
    reading,
    readVersion,
    after: null,
    summary: `Model ${present.name} taken away`,
  });
}

export const modelThing: DraftThing<ModelState> = {
  entity: "model",
  what: "The model",
  parse: (state) => (state === null ? null : modelState.parse(state)),
  read: async (_actor, draft, entityId) => {
    const db = await getDb();
    const [row] = await db
      .select()
      .from(model)
      .where(
        and(
          eq(model.teamId, draft.teamId),
          eq(model.revisionId, draft.id),
          eq(model.lineageId, entityId ?? ""),
        ),
      );
    const here = sql`select 1 from ${model} where ${model.revisionId} = ${draft.id} and ${model.lineageId} = ${entityId}`;
    if (!row) return { state: null, version: -1, unchanged: [sql`not exists (${here})`] };
    const { version, ...state } = stored(row);
    return { state, version, unchanged: [sql`exists (${here} and ${model.version} = ${version})`] };
  },
  write: (db, draft, entityId, state, version) => {
    const mine = and(
      eq(model.teamId, draft.teamId),
      eq(model.revisionId, draft.id),
      eq(model.lineageId, entityId ?? ""),
    );
    if (!state) return [db.delete(model).where(mine)];
    const { id: modelId, lineageId, ...doc } = state;
    const columns = { name: doc.name, doc, version };
    return [
      db
        .insert(model)
        .values({ id: modelId, lineageId, teamId: draft.teamId, revisionId: draft.id, ...columns })
        .onConflictDoUpdate({ target: model.id, set: columns, setWhere: mine }),
    ];
  },
  conditions: (draft, entityId, state) =>
    state
      ? []
      : [
          sql`not exists (select 1 from ${binding} where ${binding.revisionId} = ${draft.id} and ${binding.modelLineageId} = ${entityId})`,
        ],
  mayChange: (actor) => {
    if (!can(actor, "draft:edit")) throw new NotFoundError("This model");
  },
  describe: (before, after) => {
    if (!before) return ["made"];
    if (!after) return ["taken away"];
    return differingFields(before, after);
  },
};

/** What uses a model, in words: "class Clock", "2 bindings". */
async function usersOf(actor: Actor, draft: RevisionRef, lineageId: string): Promise<string[]> {
  const db = await getDb();
  const [classes, bindings] = await Promise.all([
    db
      .select({ name: netClass.name, doc: netClass.doc })
      .from(netClass)
      .where(and(eq(netClass.teamId, actor.teamId), eq(netClass.revisionId, draft.id)))
      .orderBy(asc(netClass.name)),
    db
      .select({ id: binding.id })
      .from(binding)
      .where(
        and(
          eq(binding.teamId, actor.teamId),
          eq(binding.revisionId, draft.id),
          eq(binding.modelLineageId, lineageId),
        ),
      ),
  ]);
  const users = classes
    .filter(({ doc }) => doc.driverModelLineageId === lineageId || doc.receiverModelLineageId === lineageId)
    .map(({ name }) => `class ${name}`);
  if (bindings.length > 0) users.push(bindings.length === 1 ? "1 binding" : `${bindings.length} bindings`);
  return users;
}

function stored(row: typeof model.$inferSelect): StoredModel {
  return { ...row.doc, id: row.id, lineageId: row.lineageId, version: row.version };
}

async function naming<T>(name: string, act: () => Promise<T>): Promise<T> {
  try {
    return await act();
  } catch (error) {
    if (!isUniqueFailure(error, "model.revision_id, model.name")) throw error;
    const message = `There is a model named ${name} already. Choose another name.`;
    throw new RefusedError(message, "name-taken", { name: message });
  }
}
