import "server-only";
import { and, asc, eq } from "drizzle-orm";
import { role, type Role } from "@/lib/schemas/role";
import { getDb } from "./client";
import { member, organization, session } from "./schema";

/** These functions make actors, so they take the signed-in person's id instead of one. */

export interface Membership {
  teamId: string;
  teamName: string;
  role: Role;
}

/** The teams that somebody belongs to, by name. A role that is not ours counts as no membership at all. */
export async function listMemberships(userId: string): Promise<Membership[]> {
  const db = await getDb();
  const rows = await db
    .select({ teamId: member.organizationId, teamName: organization.name, role: member.role })
    .from(member)
    .innerJoin(organization, eq(organization.id, member.organizationId))
    .where(eq(member.userId, userId))
    .orderBy(asc(organization.name), asc(organization.id));
  return rows.flatMap((row) => {
    const known = role.safeParse(row.role);
    return known.success ? [{ ...row, role: known.data }] : [];
  });
}

/** Somebody's role in one team; null where they have none. */
export async function readRole(userId: string, teamId: string): Promise<Role | null> {
  const db = await getDb();
  const [row] = await db
    .select({ role: member.role })
    .from(member)
    .where(and(eq(member.userId, userId), eq(member.organizationId, teamId)));
  return role.safeParse(row?.role).data ?? null;
}

/** The team that a session works in from now on. */
export async function rememberTeam(sessionId: string, teamId: string): Promise<void> {
  const db = await getDb();
  await db.update(session).set({ activeOrganizationId: teamId }).where(eq(session.id, sessionId));
}

export async function findTeamIdBySlug(slug: string): Promise<string | null> {
  const db = await getDb();
  const [row] = await db
    .select({ id: organization.id })
    .from(organization)
    .where(eq(organization.slug, slug));
  return row?.id ?? null;
}
