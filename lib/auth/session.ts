import "server-only";
import { listMemberships, rememberTeam, type Membership } from "@/lib/db/membership";
import type { UserActor } from "@/lib/schemas/actor";
import { getAuth } from "./auth";

/** Somebody signed in, whatever their team. */
export interface Person {
  userId: string;
  email: string;
  name: string;
}

export interface Signed {
  person: Person;
  /** Every team they belong to. */
  teams: Membership[];
  /** They, in the team they work in now; null while they belong to none. */
  actor: UserActor | null;
}

/**
 * Who a request comes from, read from the database each time: the session, then the membership. The active team
 * counts while they belong to it; else the first of theirs becomes the active one.
 */
export async function readSigned(headers: Headers): Promise<Signed | null> {
  const auth = await getAuth();
  const found = await auth.api.getSession({ headers });
  if (!found?.user.emailVerified) return null;
  const { id, email, name } = found.user;
  const person: Person = { userId: id, email, name };
  const teams = await listMemberships(id);
  const active = found.session.activeOrganizationId ?? null;
  const team = teams.find(({ teamId }) => teamId === active) ?? teams[0];
  if (!team) return { person, teams, actor: null };
  if (team.teamId !== active) await rememberTeam(found.session.id, team.teamId);
  return { person, teams, actor: { kind: "user", ...person, teamId: team.teamId, role: team.role } };
}
