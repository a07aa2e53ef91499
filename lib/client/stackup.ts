import type { StackupDoc, StoredStackup } from "@/lib/schemas/stackup";
import { apiGet, apiPut } from "./api";

/** The draft's stackup as it is now. */
export const fetchStackup = (projectId: string) => apiGet<StoredStackup>(`/projects/${projectId}/stackup`);

/** Puts a whole stackup in place of the draft's. @throws ApiError, a conflict where it was changed since `version` */
export const putStackup = (projectId: string, version: number, stackup: StackupDoc) =>
  apiPut<StoredStackup>(`/projects/${projectId}/stackup`, { version, stackup });
