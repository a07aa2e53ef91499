import "server-only";
import { setImmediate } from "node:timers/promises";
import { and, eq, sql } from "drizzle-orm";
import { SiValues } from "@/lib/resolve/si-values";
import type { Actor } from "@/lib/schemas/actor";
import { RefusedError } from "@/lib/schemas/errors";
import {
  neighbourDoc,
  netDoc,
  partDoc,
  type NeighbourDoc,
  type NetDoc,
  type PartDoc,
} from "@/lib/schemas/net";
import { getDb, type Database } from "./client";
import { commitDraftChange } from "./edit";
import { newId } from "./ids";
import { netColumns } from "./net-row";
import { getDraft, type RevisionRef } from "./revision";
import { neighbour, net, part } from "./schema";
import type { Statement } from "./unit";

export interface LayoutLists {
  nets?: readonly NetDoc[];
  parts?: readonly PartDoc[];
  neighbours?: readonly NeighbourDoc[];
}

export interface ApplyOptions {
  /** merge: what the lists do not name stays; replace: it goes, of each list that is given */
  mode: "merge" | "replace";
  summary: string;
  /** Written in the same unit, such as the state of the import. */
  also?: readonly Statement[];
  /** Called as rows are checked, from 0 to 1. */
  onProgress?: (share: number) => void;
}

/** Rows that one statement takes; the write of a whole board is a second, and these are its steps. */
const ROWS_A_STATEMENT = 2_000;
/** Rows checked before others get a turn. */
const ROWS_A_TURN = 200;

/**
 * Writes imported lists into the draft as one unit: all rows or none. A net or part that is there already by its
 * name keeps its lineage and what people set on it (limits; class, pair, bus and group where the list has none;
 * out of scope stays out). Recorded as an import, which undo does not take back.
 */
export async function applyLayoutLists(
  actor: Actor,
  projectId: string,
  lists: LayoutLists,
  options: ApplyOptions,
): Promise<void> {
  const draft = await getDraft(actor, projectId);
  const db = await getDb();
  const replace = options.mode === "replace";
  const total = Math.max(
    1,
    [lists.nets, lists.parts, lists.neighbours].reduce((sum, rows) => sum + (rows?.length ?? 0), 0),
  );
  let checked = 0;
  const prepare = async <In, Out>(
    rows: readonly In[] | undefined,
    make: (row: In) => Out,
  ): Promise<Out[]> => {
    const made: Out[] = [];
    for (const row of rows ?? []) {
      made.push(make(row));
      if (++checked % ROWS_A_TURN === 0) {
        options.onProgress?.(checked / total);
        await setImmediate();
      }
    }
    return made;
  };
  const si = new SiValues();
  const nets = await prepare(lists.nets, (row) => netRow(netDoc.parse(row), si));
  const parts = await prepare(lists.parts, (row) => ({
    id: newId(),
    lineageId: newId(),
    doc: partDoc.parse(row),
  }));
  const neighbours = await prepare(lists.neighbours, (row) => neighbourRow(neighbourDoc.parse(row), si));

  await commitDraftChange(actor, draft, {
    entity: "import",
    entityId: null,
    summary: options.summary,
    before: null,
    after: null,
    statements: [
      ...(lists.nets && replace
        ? [
            removeOthers(
              db,
              draft,
              net,
              "name",
              nets.map((row) => row.name),
            ),
          ]
        : []),
      ...inSteps(nets).map((rows) => upsertNets(db, draft, rows)),
      ...(lists.parts && replace
        ? [
            removeOthers(
              db,
              draft,
              part,
              "reference",
              parts.map((row) => row.doc.reference),
            ),
          ]
        : []),
      ...inSteps(parts).map((rows) => upsertParts(db, draft, rows)),
      ...(lists.neighbours
        ? [removeNeighbours(db, draft, replace ? null : neighbours.map((row) => row.net))]
        : []),
      ...inSteps(neighbours).map((rows) => insertNeighbours(db, draft, rows)),
      ...(options.also ?? []),
    ],
    unchanged: [],
    stale: () =>
      Promise.resolve(
        new RefusedError("The draft changed while this list was read in. Import it again.", "stale-import"),
      ),
  });
  options.onProgress?.(1);
}

function netRow(doc: NetDoc, si: SiValues) {
  return { id: newId(), lineageId: newId(), ...netColumns(doc, si), doc };
}

function neighbourRow(doc: NeighbourDoc, si: SiValues) {
  return {
    id: newId(),
    ...doc,
    gap_m: si.of(doc.gap, "length"),
    parallel_m: si.of(doc.parallelLength, "length"),
  };
}

function inSteps<Row>(rows: readonly Row[]): Row[][] {
  const steps: Row[][] = [];
  for (let start = 0; start < rows.length; start += ROWS_A_STATEMENT)
    steps.push(rows.slice(start, start + ROWS_A_STATEMENT));
  return steps;
}

function upsertNets(db: Database, draft: RevisionRef, rows: readonly ReturnType<typeof netRow>[]): Statement {
  return db.run(sql`
    insert into net (id, lineage_id, team_id, revision_id, name, class_lineage_id, scope, scope_kind, doc,
      pin_count, section_count, via_count, length_m, layers)
    select value ->> 'id', value ->> 'lineageId', ${draft.teamId}, ${draft.id}, value ->> 'name',
      value ->> 'classLineageId', value ->> 'scope', value ->> 'scopeKind', value -> 'doc', value ->> 'pinCount',
      value ->> 'sectionCount', value ->> 'viaCount', value ->> 'length_m', value ->> 'layers'
    from json_each(${JSON.stringify(rows)}) where true
    on conflict (revision_id, name) do update set
      class_lineage_id = coalesce(excluded.class_lineage_id, net.class_lineage_id),
      scope = iif(net.scope = 'out', 'out', excluded.scope),
      scope_kind = iif(net.scope = 'out', net.scope_kind, excluded.scope_kind),
      pin_count = excluded.pin_count, section_count = excluded.section_count, via_count = excluded.via_count,
      length_m = excluded.length_m, layers = excluded.layers, version = net.version + 1,
      doc = json_set(excluded.doc,
        '$.classLineageId', coalesce(excluded.class_lineage_id, net.class_lineage_id),
        '$.scope', iif(net.scope = 'out', 'out', excluded.scope),
        '$.scopeKind', iif(net.scope = 'out', net.scope_kind, excluded.scope_kind),
        '$.scopeReason', iif(net.scope = 'out', net.doc ->> '$.scopeReason', excluded.doc ->> '$.scopeReason'),
        '$.pair', json(iif(excluded.doc ->> '$.pair' is null, net.doc -> '$.pair', excluded.doc -> '$.pair')),
        '$.bus', json(iif(excluded.doc ->> '$.bus' is null, net.doc -> '$.bus', excluded.doc -> '$.bus')),
        '$.matchGroup', coalesce(excluded.doc ->> '$.matchGroup', net.doc ->> '$.matchGroup'),
        '$.limits', json(net.doc -> '$.limits'))
    where net.team_id = excluded.team_id`);
}

function upsertParts(
  db: Database,
  draft: RevisionRef,
  rows: readonly { id: string; lineageId: string; doc: PartDoc }[],
): Statement {
  return db.run(sql`
    insert into part (id, lineage_id, team_id, revision_id, reference, part_number, kind, doc)
    select value ->> 'id', value ->> 'lineageId', ${draft.teamId}, ${draft.id}, value ->> '$.doc.reference',
      value ->> '$.doc.partNumber', value ->> '$.doc.kind', value -> 'doc'
    from json_each(${JSON.stringify(rows)}) where true
    on conflict (revision_id, reference) do update set
      part_number = excluded.part_number, kind = excluded.kind, doc = excluded.doc
    where part.team_id = excluded.team_id`);
}

function insertNeighbours(
  db: Database,
  draft: RevisionRef,
  rows: readonly ReturnType<typeof neighbourRow>[],
): Statement {
  return db.run(sql`
    insert into neighbour (id, team_id, revision_id, net, neighbour, layer, gap_value, gap_unit, gap_m,
      parallel_value, parallel_unit, parallel_m)
    select value ->> 'id', ${draft.teamId}, ${draft.id}, value ->> 'net', value ->> 'neighbour', value ->> 'layer',
      value ->> '$.gap.value', value ->> '$.gap.unit', value ->> 'gap_m',
      value ->> '$.parallelLength.value', value ->> '$.parallelLength.unit', value ->> 'parallel_m'
    from json_each(${JSON.stringify(rows)})`);
}

/** Removes what a replacing list does not name. */
function removeOthers(
  db: Database,
  draft: RevisionRef,
  table: typeof net | typeof part,
  column: "name" | "reference",
  kept: readonly string[],
): Statement {
  return db.run(sql`
    delete from ${table} where team_id = ${draft.teamId} and revision_id = ${draft.id}
      and ${sql.identifier(column)} not in (select value from json_each(${JSON.stringify(kept)}))`);
}

/** @param nets whose rows are replaced; null: all */
function removeNeighbours(db: Database, draft: RevisionRef, nets: readonly string[] | null): Statement {
  return db
    .delete(neighbour)
    .where(
      and(
        eq(neighbour.teamId, draft.teamId),
        eq(neighbour.revisionId, draft.id),
        nets
          ? sql`${neighbour.net} in (select value from json_each(${JSON.stringify([...new Set(nets)])}))`
          : undefined,
      ),
    );
}
