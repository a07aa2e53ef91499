import { queryOptions } from "@tanstack/react-query";
import type { NetDoc, StoredPart } from "@/lib/schemas/net";
import type { ConfirmedProposals, DraftProposals } from "@/lib/schemas/name-proposals";
import { apiGet, apiPatch, apiPost } from "./api";

/** A net as the table shows it, without its topology. */
export interface NetRow {
  id: string;
  lineageId: string;
  name: string;
  classLineageId: string | null;
  className: string | null;
  scope: NetDoc["scope"];
  scopeKind: string;
  pinCount: number;
  sectionCount: number;
  viaCount: number;
  length_m: number;
  layers: string;
  gaps: number;
  pairPartner: string | null;
  bus: string | null;
  matchGroup: string | null;
  version: number;
}

export type NetChange = Partial<
  Pick<NetDoc, "classLineageId" | "scope" | "scopeKind" | "scopeReason" | "matchGroup">
>;

export const netsKey = (projectId: string) => ["project", projectId, "nets"] as const;

/** Every net of a revision; the table filters and sorts them itself, at once. */
export const netsQuery = (projectId: string, revision: string | undefined) =>
  queryOptions({
    queryKey: [...netsKey(projectId), revision ?? "draft"],
    queryFn: ({ signal }) =>
      apiGet<{ total: number; nets: NetRow[] }>(`/projects/${projectId}/nets`, { revision }, signal),
  });

export const partsQuery = (projectId: string, revision: string | undefined) =>
  queryOptions({
    queryKey: ["project", projectId, "parts", revision ?? "draft"],
    queryFn: ({ signal }) =>
      apiGet<{ parts: StoredPart[] }>(`/projects/${projectId}/parts`, { revision }, signal),
    select: ({ parts }) => parts,
  });

export const classesQuery = (projectId: string, revision: string | undefined) =>
  queryOptions({
    queryKey: ["project", projectId, "classes", "names", revision ?? "draft"],
    queryFn: ({ signal }) =>
      apiGet<{ classes: { lineageId: string; name: string }[] }>(
        `/projects/${projectId}/classes`,
        { revision },
        signal,
      ),
    select: ({ classes }) => classes.map(({ lineageId, name }) => ({ lineageId, name })),
  });

/** The same change to many nets, each at the version it was read at. @throws ApiError, a conflict */
export const changeNets = (
  projectId: string,
  nets: readonly Pick<NetRow, "id" | "version">[],
  change: NetChange,
) =>
  apiPatch<{ changed: number }>(`/projects/${projectId}/nets`, {
    nets: nets.map(({ id, version }) => ({ id, version })),
    change,
  });

export const proposalsQuery = (projectId: string) =>
  queryOptions({
    queryKey: [...netsKey(projectId), "proposals"],
    queryFn: ({ signal }) =>
      apiGet<DraftProposals>(`/projects/${projectId}/nets/proposals`, undefined, signal),
    // Read anew at each visit, and not while somebody is at work on it.
    gcTime: 0,
    staleTime: Infinity,
    refetchOnReconnect: false,
  });

export const confirmProposals = (projectId: string, confirmed: ConfirmedProposals) =>
  apiPost<{ changed: number }>(`/projects/${projectId}/nets/proposals`, confirmed);
