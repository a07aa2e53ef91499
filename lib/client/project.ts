import { queryOptions } from "@tanstack/react-query";
import type { ProjectOverview } from "@/lib/schemas/project-overview";
import type { ProjectSummary } from "@/lib/schemas/project";
import { apiDelete, apiGet, apiPatch, apiPost } from "./api";

export interface NewProject {
  name: string;
  description: string;
  unit: "mm" | "mil";
  template: string | null;
}

export const createProject = (input: NewProject) => apiPost<ProjectSummary>("/projects", input);
export const updateProject = (
  projectId: string,
  input: { version: number; name: string; description: string; unit: "mm" | "mil" },
) => apiPatch<ProjectSummary>(`/projects/${projectId}`, input);
export const archiveProject = (projectId: string) => apiDelete<undefined>(`/projects/${projectId}`);
export const restoreProject = (projectId: string) =>
  apiPost<ProjectSummary>(`/projects/${projectId}/restore`);
/** Starts a new draft as a copy of the newest release. */
export const startDraft = (projectId: string) =>
  apiPost<{ letter: string }>(`/projects/${projectId}/revisions`);

export const overviewQuery = (projectId: string, revision: string | undefined) =>
  queryOptions({
    queryKey: ["project", projectId, "overview", revision ?? "draft"],
    queryFn: ({ signal }) => apiGet<ProjectOverview>(`/projects/${projectId}/overview`, { revision }, signal),
  });
