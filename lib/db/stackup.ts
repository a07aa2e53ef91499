import "server-only";
import { and, asc, eq, sql } from "drizzle-orm";
import { z } from "zod";
import { can, type Actor } from "@/lib/schemas/actor";
import { canonicalJson } from "@/lib/schemas/canonical-json";
import { NotFoundError } from "@/lib/schemas/errors";
import { id } from "@/lib/schemas/common";
import { processDoc, type ProcessDoc } from "@/lib/schemas/process";
import {
  stackupDoc,
  stackupLayer as stackupLayerDoc,
  type StackupDoc,
  type StoredStackup,
  type StoredStackupLayer,
} from "@/lib/schemas/stackup";
import { layerThickness } from "@/lib/resolve/note-layers";
import { within } from "./access";
import { getDb, type Database } from "./client";
import { changeThing, differingFields, type DraftThing, type Reading } from "./draft-thing";
import { newId } from "./ids";
import { getDraft, type RevisionRef } from "./revision";
import { stackup, stackupLayer } from "./schema";
import type { Statement } from "./unit";

interface StackupState {
  name: string;
  process?: ProcessDoc | undefined;
  layers: StoredStackupLayer[];
}

const stackupState = z.object({
  name: z.string(),
  process: processDoc.optional(),
  layers: z.array(stackupLayerDoc.extend({ id, lineageId: id })),
});

/** A layer with its finished thickness [m], null where an input of it is missing. */
export type StackupLayerView = StoredStackupLayer & { thickness_m: number | null };
export interface StackupView extends StoredStackup {
  layers: StackupLayerView[];
}

/** @throws NotFoundError */
export async function getStackup(actor: Actor, revision: Pick<RevisionRef, "id">): Promise<StackupView> {
  const db = await getDb();
  const [head] = await db
    .select()
    .from(stackup)
    .where(and(within(actor, "project:read", stackup.teamId), eq(stackup.revisionId, revision.id)));
  if (!head) throw new NotFoundError("This stackup");
  const rows = await db
    .select()
    .from(stackupLayer)
    .where(and(within(actor, "project:read", stackupLayer.teamId), eq(stackupLayer.revisionId, revision.id)))
    .orderBy(asc(stackupLayer.position));
  return {
    name: head.name,
    version: head.version,
    ...(head.process ? { process: head.process } : {}),
    layers: rows.map((row) => ({
      ...row.doc,
      id: row.id,
      lineageId: row.lineageId,
      thickness_m: row.thickness_m,
    })),
  };
}

/**
 * Puts a whole stackup in place of the draft's. Layers are told apart by their id, else by their name, so that
 * what binds to a layer's lineage (classes, routed sections, flags) survives a list that is read in anew.
 * @throws ConflictError
 */
export async function putStackup(
  actor: Actor,
  projectId: string,
  readVersion: number,
  input: StackupDoc,
): Promise<StackupView> {
  const draft = await getDraft(actor, projectId);
  const doc = stackupDoc.parse(input);
  const reading = await stackupThing.read(actor, draft, null, null);
  const after = {
    name: doc.name,
    ...(doc.process ? { process: doc.process } : {}),
    layers: identify(doc, reading.state?.layers ?? []),
  };
  const changed = stackupThing.describe(reading.state, after);
  await changeThing(actor, draft, stackupThing, {
    entityId: null,
    reading,
    readVersion,
    after,
    summary: summarise(changed),
  });
  return getStackup(actor, draft);
}

export const stackupThing: DraftThing<StackupState> = {
  entity: "stackup",
  what: "The stackup",
  parse: (stored) => (stored === null ? null : stackupState.parse(stored)),
  read: async (actor, draft): Promise<Reading<StackupState>> => {
    const { name, version, process, layers } = await getStackup(actor, draft);
    return {
      state: {
        name,
        ...(process ? { process } : {}),
        layers: layers.map(({ thickness_m: _derived, ...layer }) => layer),
      },
      version,
      unchanged: [
        sql`exists (select 1 from ${stackup} where ${stackup.revisionId} = ${draft.id} and ${stackup.version} = ${version})`,
      ],
    };
  },
  write: (db, draft, _entityId, state, version) => {
    if (!state) throw new Error("A revision always has a stackup.");
    return [
      db
        .update(stackup)
        .set({ name: state.name, process: state.process ?? null, version })
        .where(and(eq(stackup.revisionId, draft.id), eq(stackup.teamId, draft.teamId))),
      db
        .delete(stackupLayer)
        .where(and(eq(stackupLayer.revisionId, draft.id), eq(stackupLayer.teamId, draft.teamId))),
      ...layerStatements(db, draft, state.layers),
    ];
  },
  mayChange: (actor) => {
    if (!can(actor, "draft:edit")) throw new NotFoundError("This stackup");
  },
  describe: (before, after) => {
    const changed: string[] = before?.name !== after?.name ? ["name"] : [];
    if (canonicalJson(before?.process ?? null) !== canonicalJson(after?.process ?? null))
      changed.push("fabricator’s process");
    const old = new Map(before?.layers.map((layer) => [layer.lineageId, layer]));
    for (const layer of after?.layers ?? []) {
      const was = old.get(layer.lineageId);
      old.delete(layer.lineageId);
      if (!was) changed.push(`${layer.name} added`);
      else for (const field of differingFields(was, layer)) changed.push(`${layer.name} ${words(field)}`);
    }
    for (const gone of old.values()) changed.push(`${gone.name} removed`);
    const order = (state: StackupState | null) => state?.layers.map((layer) => layer.lineageId).join();
    return changed.length === 0 && order(before) !== order(after) ? ["order of layers"] : changed;
  },
};

/** The statements that lay a stackup's layers; also for a new revision. */
export function layerStatements(
  db: Database,
  revision: Pick<RevisionRef, "id" | "teamId">,
  layers: readonly StoredStackupLayer[],
): Statement[] {
  if (layers.length === 0) return [];
  const rows = layers.map((layer, position) => {
    const { id: layerId, lineageId, ...doc } = layer;
    return {
      id: layerId,
      lineageId,
      teamId: revision.teamId,
      revisionId: revision.id,
      position,
      kind: layer.kind,
      name: layer.name,
      doc,
      thickness_m: layerThickness(layers, position),
    };
  });
  return [db.insert(stackupLayer).values(rows)];
}

/** Gives each layer its ids: those of the layer it is, or new ones. */
export function identify(doc: StackupDoc, present: readonly StoredStackupLayer[]): StoredStackupLayer[] {
  const free = new Map(present.map((layer) => [layer.id, layer]));
  const claim = (found: StoredStackupLayer | undefined) => {
    if (found) free.delete(found.id);
    return found;
  };
  const byId = doc.layers.map((layer) => claim(layer.id === undefined ? undefined : free.get(layer.id)));
  return doc.layers.map((layer, index) => {
    const was =
      byId[index] ??
      claim([...free.values()].find((other) => other.name.toLowerCase() === layer.name.toLowerCase()));
    return { ...layer, id: was?.id ?? newId(), lineageId: was?.lineageId ?? newId() };
  });
}

function summarise(changed: readonly string[]): string {
  const more = changed.length > 3 ? ` and ${changed.length - 3} more` : "";
  return `Stackup: ${changed.slice(0, 3).join(", ") || "no change"}${more}`;
}

function words(field: string): string {
  return field.replace(/[A-Z]/g, (letter) => ` ${letter.toLowerCase()}`);
}
