import "server-only";
import type { UserActor } from "@/lib/schemas/actor";
import { requireActor, requireSigned } from "./require-actor";

/** What the frame around a page shows: who, in which team, and which others. */
export interface ShellFacts {
  actor: UserActor;
  user: { name: string; email: string };
  teams: { id: string; name: string; role: string }[];
  activeTeam: { id: string; name: string; role: string } | null;
}

export async function readShell(): Promise<ShellFacts> {
  const actor = await requireActor();
  const signed = await requireSigned();
  const teams = signed.teams.map(({ teamId, teamName, role }) => ({ id: teamId, name: teamName, role }));
  return {
    actor,
    user: { name: actor.name, email: actor.email },
    teams,
    activeTeam: teams.find(({ id }) => id === actor.teamId) ?? null,
  };
}
