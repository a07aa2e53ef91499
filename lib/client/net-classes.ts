import { queryOptions } from "@tanstack/react-query";
import type { NetClassDoc, StoredNetClass } from "@/lib/schemas/net-class";
import { apiDelete, apiGet, apiPost, apiPut } from "./api";

/** A class with the number of its nets. */
export type NetClassRow = StoredNetClass & { netCount: number };

export const netClassesKey = (projectId: string, revision: string) =>
  ["project", projectId, "classes", revision] as const;

/** The classes of a revision, by its letter. */
export const netClassesQuery = (projectId: string, revision: string) =>
  queryOptions({
    queryKey: netClassesKey(projectId, revision),
    // A page that is come back to may have been left long ago.
    refetchOnMount: "always",
    queryFn: async ({ signal }) =>
      (await apiGet<{ classes: StoredNetClass[] }>(`/projects/${projectId}/classes`, { revision }, signal))
        .classes,
  });

/** The same, each with the number of its nets. */
export const netClassRowsQuery = (projectId: string, revision: string) =>
  queryOptions({
    queryKey: netClassesKey(projectId, revision),
    // A page that is come back to may have been left long ago.
    refetchOnMount: "always",
    queryFn: async ({ signal }) =>
      (await apiGet<{ classes: NetClassRow[] }>(`/projects/${projectId}/classes`, { revision }, signal))
        .classes,
  });

/** @throws ApiError, a conflict where the class was changed since it was read */
export function putNetClass(
  projectId: string,
  present: StoredNetClass,
  netClass: NetClassDoc,
): Promise<StoredNetClass> {
  return apiPut<StoredNetClass>(`/projects/${projectId}/classes/${present.id}`, {
    version: present.version,
    netClass,
  });
}

export const createNetClass = (projectId: string, netClass: NetClassDoc) =>
  apiPost<StoredNetClass>(`/projects/${projectId}/classes`, { netClass });

/**
 * Takes a class away.
 * @param reassignTo  lineage of the class that takes its nets; null: none; undefined: it must have no nets
 * @throws ApiError, `class-in-use` where nets are in it and nothing was said of them
 */
export const deleteNetClass = (
  projectId: string,
  { id, version }: Pick<StoredNetClass, "id" | "version">,
  reassignTo?: string | null,
) => apiDelete<undefined>(`/projects/${projectId}/classes/${id}`, { version, reassignTo });
