import { queryOptions } from "@tanstack/react-query";
import type { MaterialDoc, StoredMaterial } from "@/lib/schemas/material";
import { apiDelete, apiGet, apiPost, apiPut } from "./api";

export const materialsKey = ["materials"] as const;

/** The team's own materials, by name. */
export const materialsQuery = () =>
  queryOptions({
    queryKey: materialsKey,
    // A page that is come back to may have been left long ago.
    refetchOnMount: "always",
    queryFn: async ({ signal }) =>
      (await apiGet<{ materials: StoredMaterial[] }>("/materials", undefined, signal)).materials,
  });

export const createMaterial = (material: MaterialDoc) => apiPost<StoredMaterial>("/materials", { material });

/** @throws ApiError, a conflict where the material was changed since it was read */
export const putMaterial = (id: string, version: number, material: MaterialDoc) =>
  apiPut<StoredMaterial>(`/materials/${id}`, { version, material });

export const removeMaterial = ({ id, version }: Pick<StoredMaterial, "id" | "version">) =>
  apiDelete<undefined>(`/materials/${id}`, { version });

export const restoreMaterial = (id: string) => apiPost<StoredMaterial>(`/materials/${id}/restore`);
