import "server-only";
import { and, asc, count, eq, isNull, sql } from "drizzle-orm";
import type { Actor } from "@/lib/schemas/actor";
import { ConflictError, NotFoundError, RefusedError } from "@/lib/schemas/errors";
import { materialDoc, type MaterialDoc, type StoredMaterial } from "@/lib/schemas/material";
import { toSi, type Dimension, type Quantity } from "@/lib/si/units";
import { requirePermission, within } from "./access";
import { commitAudited } from "./audit";
import { getDb } from "./client";
import { now } from "./clock";
import { differingFields, same } from "./draft-thing";
import { newId } from "./ids";
import { material, user } from "./schema";
import { guard, GuardError, isUniqueFailure } from "./unit";

/** More than any team keeps by hand; keeps a menu a menu. */
const MOST_MATERIALS = 500;

/** The team's own materials, by name. */
export async function listMaterials(actor: Actor): Promise<StoredMaterial[]> {
  const db = await getDb();
  const rows = await db
    .select(columns)
    .from(material)
    .where(and(within(actor, "material:read", material.teamId), isNull(material.removedAt)))
    .orderBy(asc(material.name));
  return rows.map(stored);
}

/** @throws NotFoundError */
export async function getMaterial(actor: Actor, materialId: string): Promise<StoredMaterial> {
  const { removedAt, row } = await findMaterial(actor, materialId);
  if (removedAt !== null) throw new NotFoundError("This material");
  return row;
}

/** @throws RefusedError where the name is taken, or the team has as many as it may */
export async function createMaterial(actor: Actor, input: MaterialDoc): Promise<StoredMaterial> {
  requirePermission(actor, "material:edit", "The list of materials");
  const doc = materialDoc.parse(input);
  const db = await getDb();
  const [present] = await db
    .select({ entries: count() })
    .from(material)
    .where(and(within(actor, "material:edit", material.teamId), isNull(material.removedAt)));
  if ((present?.entries ?? 0) >= MOST_MATERIALS)
    throw new RefusedError(
      `A team keeps at most ${MOST_MATERIALS} materials of its own. Take away one that is no longer used.`,
      "too-many",
    );
  const id = newId();
  const at = now();
  await naming(doc.name, () =>
    commitAudited(
      actor,
      [
        db.insert(material).values({
          id,
          teamId: actor.teamId,
          ...derived(doc),
          createdAt: at,
          createdBy: actor.userId,
          updatedAt: at,
        }),
      ],
      entry("material.create", id, { name: doc.name, kind: doc.kind }),
    ),
  );
  return getMaterial(actor, id);
}

/** @throws ConflictError where it was changed since it was read */
export async function putMaterial(
  actor: Actor,
  materialId: string,
  readVersion: number,
  input: MaterialDoc,
): Promise<StoredMaterial> {
  requirePermission(actor, "material:edit", "This material");
  const doc = materialDoc.parse(input);
  const present = await getMaterial(actor, materialId);
  if (present.version === readVersion && same(docOf(present), doc)) return present;
  await naming(doc.name, () =>
    write(actor, materialId, readVersion, derived(doc), {
      action: "material.update",
      detail: { name: doc.name, changed: differingFields(docOf(present), doc).join(", ") },
      wanted: doc,
    }),
  );
  return getMaterial(actor, materialId);
}

/** Takes a material away: stackups filled in from it keep their values, and it can be brought back. */
export async function removeMaterial(actor: Actor, materialId: string, readVersion: number): Promise<void> {
  requirePermission(actor, "material:edit", "This material");
  const { name } = await getMaterial(actor, materialId);
  await write(
    actor,
    materialId,
    readVersion,
    { removedAt: now() },
    { action: "material.remove", detail: { name } },
  );
}

/** Brings back what was taken away. @throws RefusedError where another has its name now */
export async function restoreMaterial(actor: Actor, materialId: string): Promise<StoredMaterial> {
  requirePermission(actor, "material:edit", "This material");
  const { row, removedAt } = await findMaterial(actor, materialId);
  if (removedAt === null) return row;
  await naming(row.name, () =>
    write(
      actor,
      materialId,
      row.version,
      { removedAt: null },
      { action: "material.restore", detail: { name: row.name } },
    ),
  );
  return getMaterial(actor, materialId);
}

interface Act {
  action: string;
  detail: Record<string, unknown>;
  /** What the caller wants it to be: a conflict names where the present one differs. */
  wanted?: MaterialDoc;
}

async function write(
  actor: Actor,
  materialId: string,
  readVersion: number,
  values: Partial<typeof material.$inferInsert>,
  act: Act,
): Promise<void> {
  const db = await getDb();
  const restores = values.removedAt === null;
  const mine = and(
    within(actor, "material:edit", material.teamId),
    eq(material.id, materialId),
    eq(material.version, readVersion),
    restores ? undefined : isNull(material.removedAt),
  );
  try {
    await commitAudited(
      actor,
      [
        guard(db, sql`exists (select 1 from ${material} where ${mine})`),
        db
          .update(material)
          .set({ ...values, version: readVersion + 1, updatedAt: now() })
          .where(mine),
      ],
      entry(act.action, materialId, act.detail),
    );
  } catch (error) {
    if (!(error instanceof GuardError)) throw error;
    const current = await getMaterial(actor, materialId);
    throw new ConflictError(
      `${current.name} was changed after you opened it. Take the present one, or save yours over it.`,
      current,
      act.wanted ? differingFields(docOf(current), act.wanted) : [],
    );
  }
}

async function findMaterial(actor: Actor, materialId: string) {
  const db = await getDb();
  const [row] = await db
    .select(columns)
    .from(material)
    .where(and(within(actor, "material:read", material.teamId), eq(material.id, materialId)));
  if (!row) throw new NotFoundError("This material");
  return { row: stored(row), removedAt: row.removedAt };
}

const columns = {
  id: material.id,
  doc: material.doc,
  version: material.version,
  createdAt: material.createdAt,
  updatedAt: material.updatedAt,
  removedAt: material.removedAt,
  createdByName: sql<string | null>`(select name from ${user} where ${user.id} = "material"."created_by")`,
};

type Row = Pick<
  typeof material.$inferSelect,
  "id" | "doc" | "version" | "createdAt" | "updatedAt" | "removedAt"
> & {
  createdByName: string | null;
};

function stored({ doc, removedAt: _removed, ...row }: Row): StoredMaterial {
  return { ...doc, ...row };
}

function docOf(row: StoredMaterial): MaterialDoc {
  const { id: _id, version: _v, createdAt: _c, updatedAt: _u, createdByName: _n, ...doc } = row;
  return doc;
}

function derived(doc: MaterialDoc) {
  const si = (value: Quantity | null, dimension: Dimension) => (value ? toSi(value, dimension) : null);
  return {
    name: doc.name,
    kind: doc.kind,
    doc,
    thickness_m: si(doc.thickness, "length"),
    roughness_m: si(doc.roughness, "length"),
    dkFrequency_hz: si(doc.frequency, "frequency"),
  };
}

const entry = (action: string, subjectId: string, detail: Record<string, unknown>) => ({
  action,
  subjectKind: "material",
  subjectId,
  projectId: null,
  detail,
});

async function naming<T>(name: string, act: () => Promise<T>): Promise<T> {
  try {
    return await act();
  } catch (error) {
    if (!isUniqueFailure(error, "material.team_id, material.name")) throw error;
    const message = `The team has a material named ${name} already. Choose another name.`;
    throw new RefusedError(message, "name-taken", { name: message });
  }
}
