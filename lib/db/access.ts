import "server-only";
import { eq, sql, type SQL } from "drizzle-orm";
import type { AnySQLiteColumn } from "drizzle-orm/sqlite-core";
import { can, type Actor } from "@/lib/schemas/actor";
import { NotFoundError } from "@/lib/schemas/errors";
import type { Permission } from "@/lib/schemas/role";

/**
 * The part of a WHERE that decides what an actor may touch: rows of their team, and none at all where their
 * role does not allow it. So what is forbidden cannot be told from what does not exist.
 */
export function within(actor: Actor, permission: Permission, teamId: AnySQLiteColumn): SQL {
  return can(actor, permission) ? eq(teamId, actor.teamId) : sql`0`;
}

/** For what has no row to look for yet. */
export function requirePermission(actor: Actor, permission: Permission, what?: string): void {
  if (!can(actor, permission)) throw new NotFoundError(what);
}
