import type { Metadata } from "next";
import { ProjectsView } from "@/components/projects/projects-view";
import { Sheet } from "@/components/shell/sheet";
import { requireActor } from "@/lib/auth/require-actor";
import { listProjects } from "@/lib/db/project";
import { can } from "@/lib/schemas/actor";

export const metadata: Metadata = { title: "Projects" };

interface Props {
  searchParams: Promise<{ archived?: string }>;
}

export default async function ProjectsPage({ searchParams }: Props) {
  const actor = await requireActor("project:read");
  const archived = (await searchParams).archived === "true";
  return (
    <Sheet>
      <ProjectsView
        projects={await listProjects(actor, archived)}
        archived={archived}
        mayCreate={can(actor, "project:create")}
        mayArchive={can(actor, "project:update")}
      />
    </Sheet>
  );
}
