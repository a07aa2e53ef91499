import "server-only";
import { and, eq, inArray, sql } from "drizzle-orm";
import { z } from "zod";
import { can, type Actor } from "@/lib/schemas/actor";
import { id } from "@/lib/schemas/common";
import { ConflictError, NotFoundError, RefusedError } from "@/lib/schemas/errors";
import { netDoc } from "@/lib/schemas/net";
import { getDb } from "./client";
import { changeThing, differingFields, same, type DraftThing, type Reading } from "./draft-thing";
import { getDraft, type RevisionRef } from "./revision";
import { net, netClass } from "./schema";

/** What a person sets on a net; its topology comes from imports alone. */
export const netFields = netDoc.pick({
  classLineageId: true,
  scope: true,
  scopeKind: true,
  scopeReason: true,
  pair: true,
  bus: true,
  matchGroup: true,
  limits: true,
});
export type NetFields = z.infer<typeof netFields>;

export interface NetPatch {
  id: string;
  /** the version it was read at; undefined: whatever it is now */
  version?: number;
  fields: Partial<NetFields>;
}

const netsState = z.array(z.object({ id, fields: netFields }));
type NetsState = z.infer<typeof netsState>;

interface NetRow {
  id: string;
  version: number;
  fields: NetFields;
  /** what keeps its route from being complete */
  gaps: number;
}

/** Bound parameters of one statement; SQLite takes 32,766. */
const IDS_A_QUERY = 5_000;

/**
 * Sets fields of many nets in one unit: all of them, or none where one was changed meanwhile.
 * Designers set everything but limits, reviewers limits. A net whose route has gaps is never in scope: put there, it
 * is incomplete, as at import.
 * @param summary of the edit, or how to say it of the fields that differ and the number of nets
 * @returns how many nets differ now
 * @throws ConflictError
 */
export async function patchNets(
  actor: Actor,
  projectId: string,
  patches: readonly NetPatch[],
  summary: string | ((fields: string[], nets: number) => string),
): Promise<number> {
  const draft = await getDraft(actor, projectId, "project:read");
  const before = new Map(
    (
      await readNets(
        draft,
        patches.map((patch) => patch.id),
      )
    ).map((row) => [row.id, row]),
  );
  if (before.size < new Set(patches.map((patch) => patch.id)).size)
    throw new NotFoundError("One of these nets");
  await assertClasses(draft, patches);
  const changed: NetsState = [];
  const stale: NetRow[] = [];
  for (const patch of patches) {
    const row = before.get(patch.id);
    if (!row) continue;
    if (patch.version !== undefined && patch.version !== row.version) stale.push(row);
    const fields = netFields.parse({ ...row.fields, ...patch.fields });
    if (fields.scope === "in" && row.gaps > 0) fields.scope = "incomplete";
    if (!same(fields, row.fields)) changed.push({ id: row.id, fields });
  }
  if (stale.length > 0) throw await staleNets(actor, draft, stale);
  if (changed.length === 0) return 0;
  const members = changed.flatMap((row) => before.get(row.id) ?? []);
  await changeThing(actor, draft, netsThing, {
    entityId: null,
    reading: readingOf(draft, members),
    readVersion: 0,
    after: inOrder(changed),
    summary:
      typeof summary === "string"
        ? summary
        : summary(
            netsThing.describe(
              members.map(({ id: netId, fields }) => ({ id: netId, fields })),
              changed,
            ),
            changed.length,
          ),
    answer: ({ state }) => state,
  });
  return changed.length;
}

export const netsThing: DraftThing<NetsState> = {
  entity: "nets",
  what: "One of these nets",
  parse: (state) => (state === null ? null : netsState.parse(state)),
  read: async (_actor, draft, _entityId, like) =>
    readingOf(draft, await readNets(draft, like?.map((row) => row.id) ?? [])),
  // The + keeps these columns' indexes out of the plan: each row of the list looks up its net, not the reverse.
  write: (db, draft, _entityId, state) => [
    db.run(sql`
      update ${net} set
        class_lineage_id = f.value ->> '$.fields.classLineageId',
        scope = f.value ->> '$.fields.scope',
        scope_kind = f.value ->> '$.fields.scopeKind',
        version = version + 1,
        doc = json_set(doc,
          '$.classLineageId', f.value ->> '$.fields.classLineageId',
          '$.scope', f.value ->> '$.fields.scope',
          '$.scopeKind', f.value ->> '$.fields.scopeKind',
          '$.scopeReason', f.value ->> '$.fields.scopeReason',
          '$.matchGroup', f.value ->> '$.fields.matchGroup',
          '$.pair', json(f.value -> '$.fields.pair'),
          '$.bus', json(f.value -> '$.fields.bus'),
          '$.limits', json(f.value -> '$.fields.limits'))
      from json_each(${JSON.stringify(state ?? [])}) as f
      where net.id = f.value ->> '$.id' and +net.team_id = ${draft.teamId} and +net.revision_id = ${draft.id}`),
  ],
  mayChange: (actor, before, after) => {
    const was = new Map(before?.map((row) => [row.id, row.fields]));
    const changed = new Set(after?.flatMap((row) => differingFields(was.get(row.id) ?? null, row.fields)));
    const rest = [...changed].some((field) => field !== "limits");
    if (!can(actor, "draft:edit") && !can(actor, "limits:set")) throw new NotFoundError("One of these nets");
    if (rest && !can(actor, "draft:edit"))
      throw new RefusedError(
        "As a reviewer you set a net's limits; class and scope are the designers'. Flag what should change.",
        "limits-only",
      );
    if (changed.has("limits") && !can(actor, "limits:set"))
      throw new RefusedError("Limits are set by a reviewer. Ask one, with a flag.", "limits");
  },
  describe: (before, after) => {
    const was = new Map(before?.map((row) => [row.id, row.fields]));
    return [...new Set(after?.flatMap((row) => differingFields(was.get(row.id) ?? null, row.fields)))];
  },
};

const fieldsOfDoc = sql<string>`json_object(
  'classLineageId', ${net.doc} -> '$.classLineageId', 'scope', ${net.doc} -> '$.scope',
  'scopeKind', ${net.doc} -> '$.scopeKind', 'scopeReason', ${net.doc} -> '$.scopeReason',
  'pair', ${net.doc} -> '$.pair', 'bus', ${net.doc} -> '$.bus',
  'matchGroup', ${net.doc} -> '$.matchGroup', 'limits', ${net.doc} -> '$.limits')`;

async function readNets(draft: RevisionRef, wanted: readonly string[]): Promise<NetRow[]> {
  const db = await getDb();
  const ids = [...new Set(wanted)];
  const found: NetRow[] = [];
  for (let start = 0; start < ids.length; start += IDS_A_QUERY) {
    const rows = await db
      .select({
        id: net.id,
        version: net.version,
        fields: fieldsOfDoc,
        gaps: sql<number>`coalesce(json_array_length(${net.doc}, '$.gaps'), 0)`,
      })
      .from(net)
      .where(
        and(
          eq(net.teamId, draft.teamId),
          eq(net.revisionId, draft.id),
          inArray(net.id, ids.slice(start, start + IDS_A_QUERY)),
        ),
      );
    for (const row of rows) found.push({ ...row, fields: netFields.parse(JSON.parse(row.fields)) });
  }
  return found;
}

function readingOf(draft: RevisionRef, rows: readonly NetRow[]): Reading<NetsState> {
  const versions = JSON.stringify(rows.map((row) => [row.id, row.version]));
  return {
    state: inOrder(rows.map(({ id: netId, fields }) => ({ id: netId, fields }))),
    version: 0,
    unchanged: [
      sql`(select count(*) from json_each(${versions}) as j
        cross join ${net} on ${net.id} = j.value ->> 0 and ${net.version} = j.value ->> 1
        where ${net.revisionId} = ${draft.id} and ${net.teamId} = ${draft.teamId}) = ${rows.length}`,
    ],
  };
}

function inOrder(state: NetsState): NetsState {
  return state.sort((a, b) => (a.id < b.id ? -1 : 1));
}

/** A 409 over many nets names the first few that were changed. */
async function staleNets(actor: Actor, draft: RevisionRef, stale: readonly NetRow[]): Promise<ConflictError> {
  const db = await getDb();
  const rows = await db
    .select({ name: net.name })
    .from(net)
    .where(
      and(
        eq(net.teamId, actor.teamId),
        eq(net.revisionId, draft.id),
        inArray(
          net.id,
          stale.slice(0, 5).map((row) => row.id),
        ),
      ),
    )
    .orderBy(net.name);
  const names = rows.map((row) => row.name);
  const more = stale.length > names.length ? ` and ${stale.length - names.length} more` : "";
  return new ConflictError(
    `${names.join(", ")}${more} changed after you opened the table. Look at ${stale.length === 1 ? "it" : "them"} again, then repeat the edit.`,
    stale,
    names,
  );
}

async function assertClasses(draft: RevisionRef, patches: readonly NetPatch[]): Promise<void> {
  const wanted = new Set(patches.flatMap((patch) => patch.fields.classLineageId ?? []));
  if (wanted.size === 0) return;
  const db = await getDb();
  const rows = await db
    .select({ lineageId: netClass.lineageId })
    .from(netClass)
    .where(and(eq(netClass.teamId, draft.teamId), eq(netClass.revisionId, draft.id)));
  for (const row of rows) wanted.delete(row.lineageId);
  if (wanted.size > 0)
    throw new RefusedError("This draft has no such class. Choose one of its classes.", "unknown-class", {
      classLineageId: "This draft has no such class.",
    });
}
