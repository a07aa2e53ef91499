"use client";

import { Ellipsis } from "lucide-react";
import type { Route } from "next";
import Link from "next/link";
import { useMemo } from "react";
import { TimeText } from "@/components/shell/time-text";
import { Badge } from "@/components/ui/badge";
import { Button } from "@/components/ui/button";
import { type DataColumn, DataTable } from "@/components/ui/data-table";
import { Menu, MenuItem } from "@/components/ui/menu";
import type { ProjectSummary } from "@/lib/schemas/project";

interface Props {
  projects: readonly ProjectSummary[];
  archived: boolean;
  onOpen: (project: ProjectSummary) => void;
  onEdit?: (project: ProjectSummary) => void;
  onArchive?: (project: ProjectSummary) => void;
}

export function ProjectsTable({ projects, archived, onOpen, onEdit, onArchive }: Props) {
  const columns = useMemo<DataColumn<ProjectSummary>[]>(() => {
    const list: DataColumn<ProjectSummary>[] = [
      {
        id: "name",
        header: "Name",
        sortValue: (project) => project.name,
        cell: (project) => (
          <Link href={`/projects/${project.id}/overview` as Route} className="font-medium hover:underline">
            {project.name}
          </Link>
        ),
      },
      {
        id: "description",
        header: "Description",
        cell: (project) => <span title={project.description}>{project.description}</span>,
      },
      {
        id: "revision",
        header: "Revisions",
        width: 200,
        cell: (project) => (
          <span className="flex gap-1">
            {project.draftLetter ? <Badge tone="ink">{project.draftLetter} draft</Badge> : null}
            {project.releasedLetter ? <Badge>{project.releasedLetter} released</Badge> : null}
          </span>
        ),
      },
      {
        id: "nets",
        header: "Nets",
        kind: "number",
        width: 90,
        sortValue: (project) => project.netCount,
        number: (project) => ({ text: project.netCount.toLocaleString("en") }),
      },
      {
        id: "changed",
        header: "Changed",
        width: 190,
        sortValue: (project) => project.updatedAt,
        cell: (project) => <TimeText at={project.updatedAt} />,
      },
    ];
    if (onArchive)
      list.push({
        id: "acts",
        header: "Acts",
        width: 64,
        cell: (project) => (
          <Menu
            align="end"
            trigger={
              <Button variant="quiet" size="icon" className="-my-1" aria-label={`Acts on ${project.name}`}>
                <Ellipsis size={16} aria-hidden="true" />
              </Button>
            }
          >
            {onEdit ? <MenuItem onSelect={() => onEdit(project)}>Rename or describe</MenuItem> : null}
            <MenuItem onSelect={() => onArchive(project)}>{archived ? "Restore" : "Archive"}</MenuItem>
          </Menu>
        ),
      });
    return list;
  }, [archived, onArchive, onEdit]);

  return (
    <DataTable
      label={archived ? "Archived projects" : "Projects"}
      rows={projects}
      columns={columns}
      rowId={(project) => project.id}
      onOpen={onOpen}
      keys="page"
    />
  );
}
