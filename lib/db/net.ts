import "server-only";
import { and, asc, count, desc, eq, gt, isNull, or, sql, type SQL } from "drizzle-orm";
import type { Actor } from "@/lib/schemas/actor";
import { NotFoundError } from "@/lib/schemas/errors";
import type { NetDoc, StoredNet } from "@/lib/schemas/net";
import { within } from "./access";
import { getDb } from "./client";
import type { RevisionRef } from "./revision";
import { net, netClass } from "./schema";

export const netSorts = ["name", "class", "scope", "length", "pins", "vias", "layers"] as const;

export interface NetFilter {
  /** Text in the name. */
  search?: string;
  /** Lineage of a class; "none": nets in no class. */
  classLineageId?: string;
  scope?: NetDoc["scope"];
  scopeKind?: string;
  /** Text in the names of its layers. */
  layer?: string;
  sort?: (typeof netSorts)[number];
  descending?: boolean;
  limit?: number;
  offset?: number;
}

/** A net as tables show it, without its topology. */
export interface NetListRow {
  id: string;
  lineageId: string;
  name: string;
  classLineageId: string | null;
  className: string | null;
  scope: NetDoc["scope"];
  scopeKind: string;
  pinCount: number;
  sectionCount: number;
  viaCount: number;
  length_m: number;
  layers: string;
  gaps: number;
  pairPartner: string | null;
  bus: string | null;
  matchGroup: string | null;
  version: number;
}

export interface NetList {
  total: number;
  nets: NetListRow[];
}

/** As many as a board of this issue has; a table shows them all, the rows in view drawn. */
const MOST = 25_000;

export async function listNets(
  actor: Actor,
  revision: Pick<RevisionRef, "id">,
  filter: NetFilter = {},
): Promise<NetList> {
  const db = await getDb();
  const where = and(inRevision(actor, revision), ...filterConditions(filter));
  const order = SORTS[filter.sort ?? "name"];
  const [nets, totals] = await Promise.all([
    db
      .select({
        id: net.id,
        lineageId: net.lineageId,
        name: net.name,
        classLineageId: net.classLineageId,
        className: netClass.name,
        scope: net.scope,
        scopeKind: net.scopeKind,
        pinCount: net.pinCount,
        sectionCount: net.sectionCount,
        viaCount: net.viaCount,
        length_m: net.length_m,
        layers: net.layers,
        gaps: sql<number>`json_array_length(${net.doc}, '$.gaps')`,
        pairPartner: sql<string | null>`${net.doc} ->> '$.pair.partner'`,
        bus: sql<string | null>`${net.doc} ->> '$.bus.name'`,
        matchGroup: sql<string | null>`${net.doc} ->> '$.matchGroup'`,
        version: net.version,
      })
      .from(net)
      .leftJoin(
        netClass,
        and(eq(netClass.revisionId, net.revisionId), eq(netClass.lineageId, net.classLineageId)),
      )
      .where(where)
      .orderBy(filter.descending ? desc(order) : asc(order), asc(net.name))
      .limit(Math.min(filter.limit ?? MOST, MOST))
      .offset(filter.offset ?? 0),
    db.select({ total: count() }).from(net).where(where),
  ]);
  return { total: totals[0]?.total ?? 0, nets };
}

/** A whole net, by its id or its lineage. @throws NotFoundError */
export async function getNet(
  actor: Actor,
  revision: Pick<RevisionRef, "id">,
  netId: string,
): Promise<StoredNet> {
  const db = await getDb();
  const [row] = await db
    .select()
    .from(net)
    .where(and(inRevision(actor, revision), or(eq(net.id, netId), eq(net.lineageId, netId))));
  if (!row) throw new NotFoundError("This net");
  return storedNet(row);
}

export type ScopeCounts = Record<NetDoc["scope"], number>;

/** How many nets are in scope, out of scope and incomplete. */
export async function countScopes(actor: Actor, revision: Pick<RevisionRef, "id">): Promise<ScopeCounts> {
  const db = await getDb();
  const rows = await db
    .select({ scope: net.scope, nets: count() })
    .from(net)
    .where(inRevision(actor, revision))
    .groupBy(net.scope);
  const counts: ScopeCounts = { in: 0, out: 0, incomplete: 0 };
  for (const row of rows) counts[row.scope] = row.nets;
  return counts;
}

/** Every whole net in the order of names, `size` at a time, so that none of the reads holds up the rest for long. */
export async function* readNetChunks(
  actor: Actor,
  revision: Pick<RevisionRef, "id">,
  size = 500,
): AsyncGenerator<StoredNet[]> {
  const db = await getDb();
  let last: string | null = null;
  for (;;) {
    const rows: (typeof net.$inferSelect)[] = await db
      .select()
      .from(net)
      .where(and(inRevision(actor, revision), last === null ? undefined : gt(net.name, last)))
      .orderBy(asc(net.name))
      .limit(size);
    if (rows.length > 0) yield rows.map(storedNet);
    last = rows.at(-1)?.name ?? null;
    if (rows.length < size) return;
  }
}

function storedNet(row: typeof net.$inferSelect): StoredNet {
  return { ...row.doc, id: row.id, lineageId: row.lineageId, version: row.version };
}

function inRevision(actor: Actor, revision: Pick<RevisionRef, "id">): SQL | undefined {
  return and(within(actor, "project:read", net.teamId), eq(net.revisionId, revision.id));
}

const SORTS = {
  name: net.name,
  class: netClass.name,
  scope: net.scope,
  length: net.length_m,
  pins: net.pinCount,
  vias: net.viaCount,
  layers: net.layers,
};

function filterConditions(filter: NetFilter): (SQL | undefined)[] {
  const contains = (text: string) => `%${text.replace(/[\\%_]/g, (mark) => `\\${mark}`)}%`;
  return [
    filter.search ? sql`${net.name} like ${contains(filter.search)} escape '\\'` : undefined,
    filter.classLineageId === "none"
      ? isNull(net.classLineageId)
      : filter.classLineageId
        ? eq(net.classLineageId, filter.classLineageId)
        : undefined,
    filter.scope ? eq(net.scope, filter.scope) : undefined,
    filter.scopeKind ? eq(net.scopeKind, filter.scopeKind) : undefined,
    filter.layer ? sql`${net.layers} like ${contains(filter.layer)} escape '\\'` : undefined,
  ];
}
