import { redirect } from "next/navigation";
import type { ReactNode } from "react";
import { DeskShell } from "@/components/shell/desk-shell";
import { listMemberships, requireActor } from "@/lib/auth/require-actor";
import { can } from "@/lib/schemas/actor";

/** Draws the shell. It guards nothing: each page and each query asks for the actor itself. */
export default async function DeskLayout({ children }: { children: ReactNode }) {
  const actor = await requireActor();
  if (actor.role === "manufacturer") redirect("/fabrication");
  const teams = (await listMemberships(actor.userId)).map((team) => ({
    id: team.teamId,
    name: team.teamName,
    role: team.role,
  }));
  return (
    <DeskShell
      user={{ name: actor.name, email: actor.email }}
      teams={teams}
      activeTeam={teams.find((team) => team.id === actor.teamId) ?? null}
      mayReadAudit={can(actor, "audit:read")}
    >
      {children}
    </DeskShell>
  );
}
