import { queryOptions } from "@tanstack/react-query";
import type { NetClassDoc, StoredNetClass } from "@/lib/schemas/net-class";
import { apiGet, apiPut } from "./api";

export const netClassesKey = (projectId: string, revision: string) =>
  ["project", projectId, "classes", revision] as const;

/** The classes of a revision, by its letter. */
export const netClassesQuery = (projectId: string, revision: string) =>
  queryOptions({
    queryKey: netClassesKey(projectId, revision),
    queryFn: async ({ signal }) =>
      (await apiGet<{ classes: StoredNetClass[] }>(`/projects/${projectId}/classes`, { revision }, signal))
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
