import { queryOptions } from "@tanstack/react-query";
import { apiGet } from "./api";

export interface AuditEntry {
  id: string;
  seq: number;
  at: number;
  actorName: string;
  action: string;
  subjectKind: string;
  subjectId: string | null;
  projectId: string | null;
  detail: Record<string, unknown>;
  hash: string;
}

export interface AuditAnswer {
  entries: AuditEntry[];
  chain: { entries: number; intact: boolean; brokenAt: number | null; lastHash: string };
}

export interface AuditSearch {
  search: string;
  /** ms UTC, both ends included */
  from: number | null;
  to: number | null;
}

const PAGE = 500;
const EXPORT_PAGE = 5_000;

export const auditQuery = (filter: AuditSearch) =>
  queryOptions({
    queryKey: ["audit", filter],
    queryFn: ({ signal }) => apiGet<AuditAnswer>("/audit", { ...filter, limit: PAGE }, signal),
  });

/** Every entry that the filter lets through, however many, for export. */
export async function fetchAllAudit(filter: AuditSearch): Promise<AuditEntry[]> {
  const all: AuditEntry[] = [];
  for (;;) {
    const before = all.at(-1)?.seq;
    const { entries } = await apiGet<AuditAnswer>("/audit", { ...filter, before, limit: EXPORT_PAGE });
    all.push(...entries);
    if (entries.length < EXPORT_PAGE) return all;
  }
}
