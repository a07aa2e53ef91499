import "server-only";
import { and, asc, count, eq, or, sql } from "drizzle-orm";
import { can, type Actor } from "@/lib/schemas/actor";
import { id } from "@/lib/schemas/common";
import { ConflictError, NotFoundError, RefusedError } from "@/lib/schemas/errors";
import { netClassDoc, type NetClassDoc, type StoredNetClass } from "@/lib/schemas/net-class";
import { toSi } from "@/lib/si/units";
import { within } from "./access";
import { getDb } from "./client";
import { changeThing, differingFields, same, type DraftThing } from "./draft-thing";
import { newId } from "./ids";
import { patchNets } from "./net-fields";
import { getDraft, type RevisionRef } from "./revision";
import { net, netClass } from "./schema";
import { getStackup } from "./stackup";
import { isUniqueFailure } from "./unit";

const classState = netClassDoc.extend({ id, lineageId: id });
type ClassState = Omit<StoredNetClass, "version">;

export type NetClassView = StoredNetClass & { netCount: number };

/** The classes of a revision by name, each with the number of its nets. */
export async function listNetClasses(
  actor: Actor,
  revision: Pick<RevisionRef, "id">,
): Promise<NetClassView[]> {
  const db = await getDb();
  const [rows, counts] = await Promise.all([
    db
      .select()
      .from(netClass)
      .where(and(within(actor, "project:read", netClass.teamId), eq(netClass.revisionId, revision.id)))
      .orderBy(asc(netClass.name)),
    db
      .select({ lineageId: net.classLineageId, nets: count() })
      .from(net)
      .where(and(within(actor, "project:read", net.teamId), eq(net.revisionId, revision.id)))
      .groupBy(net.classLineageId),
  ]);
  const netCount = new Map(counts.map((row) => [row.lineageId, row.nets]));
  return rows.map((row) => ({ ...stored(row), netCount: netCount.get(row.lineageId) ?? 0 }));
}

/** By its id or its lineage. @throws NotFoundError */
export async function getNetClass(
  actor: Actor,
  revision: Pick<RevisionRef, "id">,
  classId: string,
): Promise<StoredNetClass> {
  const db = await getDb();
  const [row] = await db
    .select()
    .from(netClass)
    .where(
      and(
        within(actor, "project:read", netClass.teamId),
        eq(netClass.revisionId, revision.id),
        or(eq(netClass.id, classId), eq(netClass.lineageId, classId)),
      ),
    );
  if (!row) throw new NotFoundError("This class");
  return stored(row);
}

export async function createNetClass(
  actor: Actor,
  projectId: string,
  input: NetClassDoc,
): Promise<StoredNetClass> {
  const draft = await getDraft(actor, projectId);
  const doc = netClassDoc.parse(input);
  await assertLayers(actor, draft, doc, []);
  const after = { ...doc, id: newId(), lineageId: newId() };
  await naming(doc.name, () =>
    changeThing(actor, draft, netClassThing, {
      entityId: after.lineageId,
      reading: { state: null, version: -1, unchanged: [] },
      readVersion: -1,
      after,
      summary: `Class ${doc.name} made`,
    }),
  );
  return getNetClass(actor, draft, after.id);
}

/**
 * Changes a class: designers everything but its limits, reviewers its limits.
 * @throws ConflictError
 */
export async function putNetClass(
  actor: Actor,
  projectId: string,
  classId: string,
  readVersion: number,
  input: NetClassDoc,
): Promise<StoredNetClass> {
  const draft = await getDraft(actor, projectId, "project:read");
  const doc = netClassDoc.parse(input);
  const present = await getNetClass(actor, draft, classId);
  await assertLayers(actor, draft, doc, present.layers);
  const reading = await netClassThing.read(actor, draft, present.lineageId, null);
  const after = { ...doc, id: present.id, lineageId: present.lineageId };
  const changed = netClassThing.describe(reading.state, after);
  await naming(doc.name, () =>
    changeThing(actor, draft, netClassThing, {
      entityId: present.lineageId,
      reading,
      readVersion,
      after,
      summary: `Class ${doc.name}: ${changed.slice(0, 3).join(", ")}${changed.length > 3 ? ` and ${changed.length - 3} more` : ""}`,
    }),
  );
  return getNetClass(actor, draft, present.id);
}

/**
 * Takes a class away. Its nets go to another class, or to none, where the caller says so.
 * @param reassignTo lineage of the class that takes its nets; null: none; undefined: it must have no nets
 * @throws RefusedError where nets are in it and nothing was said of them
 */
export async function deleteNetClass(
  actor: Actor,
  projectId: string,
  classId: string,
  readVersion: number,
  reassignTo?: string | null,
): Promise<void> {
  const draft = await getDraft(actor, projectId);
  const present = await getNetClass(actor, draft, classId);
  const db = await getDb();
  const members = await db
    .select({ id: net.id, version: net.version })
    .from(net)
    .where(
      and(
        eq(net.teamId, actor.teamId),
        eq(net.revisionId, draft.id),
        eq(net.classLineageId, present.lineageId),
      ),
    );
  if (members.length > 0) {
    if (reassignTo === undefined) throw inUse(present.name, members.length);
    if (present.version !== readVersion)
      throw new ConflictError(
        `Class ${present.name} was changed after you opened it. Look at it again.`,
        present,
      );
    const target = reassignTo === null ? null : await getNetClass(actor, draft, reassignTo);
    if (target?.lineageId === present.lineageId)
      throw new RefusedError(
        "Its nets cannot go to the class that is taken away. Choose another.",
        "same-class",
      );
    await patchNets(
      actor,
      projectId,
      members.map((member) => ({ ...member, fields: { classLineageId: target?.lineageId ?? null } })),
      `${members.length} nets from class ${present.name} to ${target?.name ?? "no class"}`,
    );
  }
  const reading = await netClassThing.read(actor, draft, present.lineageId, null);
  await changeThing(actor, draft, netClassThing, {
    entityId: present.lineageId,
    reading,
    readVersion,
    after: null,
    summary: `Class ${present.name} taken away`,
  });
}

export const netClassThing: DraftThing<ClassState> = {
  entity: "class",
  what: "The class",
  parse: (state) => (state === null ? null : classState.parse(state)),
  read: async (_actor, draft, entityId) => {
    const db = await getDb();
    const [row] = await db
      .select()
      .from(netClass)
      .where(
        and(
          eq(netClass.teamId, draft.teamId),
          eq(netClass.revisionId, draft.id),
          eq(netClass.lineageId, entityId ?? ""),
        ),
      );
    const here = sql`select 1 from ${netClass} where ${netClass.revisionId} = ${draft.id} and ${netClass.lineageId} = ${entityId}`;
    if (!row) return { state: null, version: -1, unchanged: [sql`not exists (${here})`] };
    const { version, ...state } = stored(row);
    return { state, version, unchanged: [sql`exists (${here} and ${netClass.version} = ${version})`] };
  },
  write: (db, draft, entityId, state, version) => {
    const mine = and(
      eq(netClass.teamId, draft.teamId),
      eq(netClass.revisionId, draft.id),
      eq(netClass.lineageId, entityId ?? ""),
    );
    if (!state) return [db.delete(netClass).where(mine)];
    const { id: classId, lineageId, ...doc } = state;
    const columns = {
      name: doc.name,
      doc,
      targetImpedance_ohm: doc.targetImpedance ? toSi(doc.targetImpedance, "resistance") : null,
      version,
    };
    return [
      db
        .insert(netClass)
        .values({ id: classId, lineageId, teamId: draft.teamId, revisionId: draft.id, ...columns })
        .onConflictDoUpdate({ target: netClass.id, set: columns, setWhere: mine }),
    ];
  },
  conditions: (draft, entityId, state) =>
    state
      ? []
      : [
          sql`not exists (select 1 from ${net} where ${net.revisionId} = ${draft.id} and ${net.classLineageId} = ${entityId})`,
        ],
  mayChange: (actor, before, after) => {
    const rest = (state: ClassState | null) => state && { ...state, limits: {} };
    if (!can(actor, "draft:edit") && (!can(actor, "limits:set") || !before || !after))
      throw new NotFoundError("This class");
    if (!can(actor, "draft:edit") && !same(rest(before), rest(after)))
      throw new RefusedError(
        "As a reviewer you set a class's limits; the rest of it is the designers'. Flag what should change.",
        "limits-only",
      );
    const limits = (state: ClassState | null) => state?.limits ?? {};
    if (!can(actor, "limits:set") && !same(limits(before), limits(after)))
      throw new RefusedError(
        "Limits are set by a reviewer. Save the class without them and ask a reviewer, with a flag, to set them.",
        "limits",
        { limits: "Only a reviewer sets limits." },
      );
  },
  describe: (before, after) => {
    if (!before) return ["made"];
    if (!after) return ["taken away"];
    return differingFields(before, after).map((field) =>
      field.replace(/[A-Z]/g, (letter) => ` ${letter.toLowerCase()}`),
    );
  },
};

/** A layer that a class had may be gone from the stackup; none is taken up that is no copper of it. */
async function assertLayers(
  actor: Actor,
  draft: RevisionRef,
  { layers }: NetClassDoc,
  had: NetClassDoc["layers"],
): Promise<void> {
  const known = new Set(had.map(({ layerLineageId }) => layerLineageId));
  const added = layers.filter(({ layerLineageId }) => !known.has(layerLineageId));
  if (added.length === 0) return;
  const { layers: built } = await getStackup(actor, draft);
  for (const { lineageId, kind } of built) if (kind === "signal" || kind === "plane") known.add(lineageId);
  if (added.every(({ layerLineageId }) => known.has(layerLineageId))) return;
  const message = "This draft's stackup has no such copper layer. Choose one of its copper layers.";
  throw new RefusedError(message, "unknown-layer", { layers: message });
}

function stored(row: typeof netClass.$inferSelect): StoredNetClass {
  return { ...row.doc, id: row.id, lineageId: row.lineageId, version: row.version };
}

function inUse(name: string, nets: number): RefusedError {
  return new RefusedError(
    `${nets === 1 ? "1 net is" : `${nets.toLocaleString("en")} nets are`} in class ${name}. Move ${nets === 1 ? "it" : "them"} to another class, or to none, to take the class away.`,
    "class-in-use",
    {},
    { nets },
  );
}

async function naming<T>(name: string, act: () => Promise<T>): Promise<T> {
  try {
    return await act();
  } catch (error) {
    if (!isUniqueFailure(error, "net_class.revision_id, net_class.name")) throw error;
    const message = `There is a class named ${name} already. Choose another name.`;
    throw new RefusedError(message, "name-taken", { name: message });
  }
}
