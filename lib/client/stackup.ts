import { queryOptions } from "@tanstack/react-query";
import type { StackupDoc, StoredStackup } from "@/lib/schemas/stackup";
import { apiGet, apiPut } from "./api";

/** The stackup of a revision, by its letter, as it is now: a page that is come back to may have been left long ago. */
export const stackupQuery = (projectId: string, revision: string) =>
  queryOptions({
    queryKey: ["project", projectId, "stackup", revision],
    queryFn: ({ signal }) => apiGet<StoredStackup>(`/projects/${projectId}/stackup`, { revision }, signal),
    refetchOnMount: "always",
    staleTime: 0,
  });

/** Puts a whole stackup in place of the draft's. @throws ApiError, a conflict where it was changed since `version` */
export const putStackup = (projectId: string, version: number, stackup: StackupDoc) =>
  apiPut<StoredStackup>(`/projects/${projectId}/stackup`, { version, stackup });
