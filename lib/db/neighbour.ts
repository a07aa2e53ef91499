import "server-only";
import { and, asc, eq } from "drizzle-orm";
import type { Actor } from "@/lib/schemas/actor";
import type { NeighbourDoc } from "@/lib/schemas/net";
import { within } from "./access";
import { getDb } from "./client";
import type { RevisionRef } from "./revision";
import { neighbour } from "./schema";

/** The neighbour list of a revision, by net; of one net where `netName` is given. */
export async function listNeighbours(
  actor: Actor,
  revision: Pick<RevisionRef, "id">,
  netName?: string,
): Promise<NeighbourDoc[]> {
  const db = await getDb();
  const rows = await db
    .select()
    .from(neighbour)
    .where(
      and(
        within(actor, "project:read", neighbour.teamId),
        eq(neighbour.revisionId, revision.id),
        netName === undefined ? undefined : eq(neighbour.net, netName),
      ),
    )
    .orderBy(
      asc(neighbour.net),
      asc(neighbour.neighbour),
      asc(neighbour.layer),
      asc(neighbour.gap_m),
      asc(neighbour.parallel_m),
      asc(neighbour.id),
    );
  return rows.map((row) => ({
    net: row.net,
    neighbour: row.neighbour,
    layer: row.layer,
    gap: { value: row.gapValue, unit: row.gapUnit },
    parallelLength: { value: row.parallelValue, unit: row.parallelUnit },
  }));
}
