import { queryOptions } from "@tanstack/react-query";
import { apiGet, apiPost } from "./api";

/** What undo and redo would do now, in words for their buttons; null where there is nothing. */
export interface UndoState {
  undo: string | null;
  redo: string | null;
}

/** An edit that was taken back or brought back. */
export interface Moved {
  id: string;
  entity: string;
  entityId: string | null;
  summary: string;
}

export const undoKey = (projectId: string) => ["project", projectId, "undo"] as const;

export const undoQuery = (projectId: string) =>
  queryOptions({
    queryKey: undoKey(projectId),
    queryFn: ({ signal }) => apiGet<UndoState>(`/projects/${projectId}/undo`, undefined, signal),
  });

export const undoEdit = (projectId: string) => apiPost<Moved>(`/projects/${projectId}/undo`);
export const redoEdit = (projectId: string) => apiPost<Moved>(`/projects/${projectId}/redo`);
