import { queryOptions } from "@tanstack/react-query";
import type { ImportMode, ImportPreview, ImportView, ListKind, ListMapping } from "@/lib/schemas/import-list";
import { apiDelete, ApiError, apiGet, apiPost, apiPut } from "./api";

export interface ImportAnswer {
  import: ImportView;
  preview: ImportPreview | null;
}

export const importsKey = (projectId: string) => ["project", projectId, "imports"] as const;

export const importsQuery = (projectId: string) =>
  queryOptions({
    queryKey: importsKey(projectId),
    queryFn: ({ signal }) =>
      apiGet<{ imports: ImportView[] }>(`/projects/${projectId}/imports`, undefined, signal),
    select: ({ imports }) => imports,
  });

/** How often a list that is being applied is asked after. */
const POLL_MS = 400;

export const importQuery = (projectId: string, importId: string) =>
  queryOptions({
    queryKey: [...importsKey(projectId), importId],
    queryFn: ({ signal }) =>
      apiGet<ImportAnswer>(`/projects/${projectId}/imports/${importId}`, undefined, signal),
    staleTime: Infinity,
    refetchInterval: (query) => (query.state.data?.import.state === "applying" ? POLL_MS : false),
  });

/** Sends a file, or pasted text, as it is. @throws ApiError with what is wrong with it */
export async function uploadList(
  projectId: string,
  list: { body: Blob | string; name: string; kind: ListKind | null },
): Promise<ImportAnswer> {
  const query = new URLSearchParams({ name: list.name.slice(0, 200) || "list" });
  if (list.kind) query.set("kind", list.kind);
  let response: Response;
  try {
    response = await fetch(`/api/v1/projects/${projectId}/imports?${query.toString()}`, {
      method: "POST",
      headers: { "content-type": "application/octet-stream" },
      body: list.body,
      credentials: "same-origin",
    });
  } catch (cause) {
    throw new ApiError(
      "The server could not be reached. Check the connection, then try again.",
      0,
      "offline",
      {},
      null,
      [],
      null,
      { cause },
    );
  }
  const body = (await response.json().catch(() => ({}))) as ImportAnswer & {
    error?: { message?: string; code?: string };
  };
  if (response.ok) return body;
  throw new ApiError(
    body.error?.message ?? "The server could not take this list. Try again, or send it in parts.",
    response.status,
    body.error?.code ?? String(response.status),
  );
}

export const remapImport = (projectId: string, importId: string, mapping: ListMapping) =>
  apiPut<ImportAnswer>(`/projects/${projectId}/imports/${importId}`, { mapping });

export const confirmImport = (projectId: string, importId: string, mode: ImportMode) =>
  apiPost<{ import: ImportView }>(`/projects/${projectId}/imports/${importId}/confirm`, { mode });

export const dropImport = (projectId: string, importId: string) =>
  apiDelete<undefined>(`/projects/${projectId}/imports/${importId}`);

/** Where the rows that were not taken are downloaded. */
export const problemsAddress = (projectId: string, importId: string) =>
  `/api/v1/projects/${projectId}/imports/${importId}/problems`;
