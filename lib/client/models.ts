import { queryOptions } from "@tanstack/react-query";
import type { CountedBindings } from "@/lib/schemas/binding-matches";
import type { BindingDoc, ModelDoc, StoredBinding, StoredModel } from "@/lib/schemas/model";
import { apiDelete, apiGet, apiPost, apiPut } from "./api";

export const modelsKey = (projectId: string, revision: string) =>
  ["project", projectId, "models", revision] as const;

/** The models of a revision, by its letter. */
export const modelsQuery = (projectId: string, revision: string) =>
  queryOptions({
    queryKey: modelsKey(projectId, revision),
    queryFn: async ({ signal }) =>
      (await apiGet<{ models: StoredModel[] }>(`/projects/${projectId}/models`, { revision }, signal)).models,
  });

export const createModel = (projectId: string, model: ModelDoc) =>
  apiPost<StoredModel>(`/projects/${projectId}/models`, { model });

/** @throws ApiError, a conflict where the model was changed since `version` */
export const putModel = (projectId: string, id: string, version: number, model: ModelDoc) =>
  apiPut<StoredModel>(`/projects/${projectId}/models/${id}`, { version, model });

/** @throws ApiError, `model-in-use` where a class or a binding uses it */
export const deleteModel = (projectId: string, { id, version }: Pick<StoredModel, "id" | "version">) =>
  apiDelete<undefined>(`/projects/${projectId}/models/${id}`, { version });

/** The bindings in the order in which they are tried. */
export interface BindingList {
  version: number;
  bindings: StoredBinding[];
}

export const bindingsKey = (projectId: string, revision: string) =>
  ["project", projectId, "bindings", revision] as const;

export const bindingsQuery = (projectId: string, revision: string) =>
  queryOptions({
    queryKey: bindingsKey(projectId, revision),
    queryFn: ({ signal }) => apiGet<BindingList>(`/projects/${projectId}/bindings`, { revision }, signal),
  });

/** @throws ApiError, a conflict where the list was changed since `version` */
export const putBindings = (projectId: string, version: number, bindings: readonly BindingDoc[]) =>
  apiPut<BindingList>(`/projects/${projectId}/bindings`, { version, bindings });

export const bindingMatchesKey = (projectId: string) => ["project", projectId, "binding matches"] as const;

/** What the bindings reach on the board. */
export const bindingMatchesQuery = (projectId: string, revision: string) =>
  queryOptions({
    queryKey: [...bindingMatchesKey(projectId), revision],
    queryFn: ({ signal }) =>
      apiGet<CountedBindings>(`/projects/${projectId}/bindings/matches`, { revision }, signal),
  });
