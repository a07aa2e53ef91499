import { redirect } from "next/navigation";
import type { ReactNode } from "react";
import { Header } from "@/components/shell/header";
import { listMemberships, requireActor } from "@/lib/auth/require-actor";

/** The manufacturer's side: a header and the sheet, no rail, for there is nowhere else to go. */
export default async function FabricationLayout({ children }: { children: ReactNode }) {
  const actor = await requireActor();
  if (actor.role !== "manufacturer") redirect("/projects");
  const teams = (await listMemberships(actor.userId)).map((team) => ({
    id: team.teamId,
    name: team.teamName,
    role: team.role,
  }));
  return (
    <div className="flex min-h-dvh flex-col">
      <Header
        user={{ name: actor.name, email: actor.email }}
        teams={teams}
        activeTeam={teams.find((team) => team.id === actor.teamId) ?? null}
        home="/fabrication"
      />
      <div className="mx-auto flex w-full max-w-6xl min-w-0 flex-1 flex-col">{children}</div>
    </div>
  );
}
