import "server-only";
import { and, asc, eq } from "drizzle-orm";
import type { Actor } from "@/lib/schemas/actor";
import type { StoredPart } from "@/lib/schemas/net";
import { within } from "./access";
import { getDb } from "./client";
import type { RevisionRef } from "./revision";
import { part } from "./schema";

/** The parts of a revision by reference. */
export async function listParts(actor: Actor, revision: Pick<RevisionRef, "id">): Promise<StoredPart[]> {
  const db = await getDb();
  const rows = await db
    .select()
    .from(part)
    .where(and(within(actor, "project:read", part.teamId), eq(part.revisionId, revision.id)))
    .orderBy(asc(part.reference));
  return rows.map((row) => ({ ...row.doc, id: row.id, lineageId: row.lineageId }));
}
