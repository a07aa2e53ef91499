import type { Metadata } from "next";
import { Sheet } from "@/components/shell/sheet";
import { TeamView } from "@/components/team/team-view";
import { PageHeader } from "@/components/ui/page-header";
import { requireActor } from "@/lib/auth/require-actor";
import { can } from "@/lib/schemas/actor";

export const metadata: Metadata = { title: "Team" };

export default async function TeamPage() {
  const actor = await requireActor();
  return (
    <Sheet wide={false}>
      <PageHeader title="Team" description="Who works here, and as what. One role each." />
      <TeamView userId={actor.userId} mayManage={can(actor, "team:manage")} />
    </Sheet>
  );
}
