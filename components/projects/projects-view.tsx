"use client";

import type { Route } from "next";
import { useRouter } from "next/navigation";
import { useState } from "react";
import { Button } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/empty-state";
import { LinkButton } from "@/components/ui/link-button";
import { PageHeader } from "@/components/ui/page-header";
import { toast } from "@/components/ui/toast";
import { errorMessage } from "@/lib/client/api";
import { archiveProject, restoreProject } from "@/lib/client/project";
import type { ProjectSummary } from "@/lib/schemas/project";
import { CreateProject } from "./create-project";
import { EditProject } from "./edit-project";
import { ProjectsTable } from "./projects-table";

interface Props {
  projects: readonly ProjectSummary[];
  /** Whether these are the archived ones. */
  archived: boolean;
  mayCreate: boolean;
  mayArchive: boolean;
}

/** The boards of the team, and the way to a new one. */
export function ProjectsView({ projects, archived, mayCreate, mayArchive }: Props) {
  const router = useRouter();
  const [creating, setCreating] = useState(false);
  const [editing, setEditing] = useState<ProjectSummary | null>(null);

  const restore = (project: ProjectSummary) =>
    restoreProject(project.id).then(
      () => {
        toast.success(`${project.name} is back among the projects.`);
        router.refresh();
      },
      (error: unknown) => toast.error(errorMessage(error)),
    );
  const archive = (project: ProjectSummary) =>
    archiveProject(project.id).then(
      () => {
        toast.success(`${project.name} is archived.`, {
          action: { label: "Undo", onClick: () => void restore(project) },
        });
        router.refresh();
      },
      (error: unknown) => toast.error(errorMessage(error)),
    );

  const create = mayCreate ? (
    <Button variant="primary" onClick={() => setCreating(true)}>
      Create a project
    </Button>
  ) : null;

  return (
    <>
      <PageHeader
        title={archived ? "Archived projects" : "Projects"}
        description={
          archived ? "Put away: to be read, not changed, until restored." : "One project for each board."
        }
        actions={
          <>
            <LinkButton variant="quiet" href={archived ? "/projects" : "/projects?archived=true"}>
              {archived ? "Show the projects in work" : "Show archived"}
            </LinkButton>
            {archived ? null : create}
          </>
        }
      />
      {projects.length > 0 ? (
        <ProjectsTable
          projects={projects}
          archived={archived}
          onOpen={(project) => router.push(`/projects/${project.id}/overview` as Route)}
          onEdit={mayArchive && !archived ? setEditing : undefined}
          onArchive={
            mayArchive ? (project) => void (archived ? restore(project) : archive(project)) : undefined
          }
        />
      ) : archived ? (
        <EmptyState title="Nothing is archived">
          A project that is archived is kept here and can be restored.
        </EmptyState>
      ) : (
        <EmptyState title="No project yet" actions={create}>
          {mayCreate
            ? "Start with a stackup from a template of 2 to 18 layers; classes, nets and the check follow from there."
            : "A designer or the owner of the team creates the first one."}
        </EmptyState>
      )}
      <CreateProject open={creating} onOpenChange={setCreating} />
      {editing ? <EditProject project={editing} onClose={() => setEditing(null)} /> : null}
    </>
  );
}
