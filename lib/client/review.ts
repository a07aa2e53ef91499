import { queryOptions } from "@tanstack/react-query";
import type { ReleaseBlocker } from "@/lib/schemas/release";
import type { Subject, WaiverState } from "@/lib/schemas/review";
import { apiDelete, apiGet, apiPatch, apiPost } from "./api";

export interface FlagView {
  id: string;
  subjectKind: "problem" | "path" | "layer";
  subjectLineageId: string;
  mechanism: string | null;
  title: string;
  state: "open" | "resolved";
  assigneeUserId: string | null;
  assigneeName: string | null;
  authorName: string | null;
  createdAt: number;
  resolvedAt: number | null;
  version: number;
  entryCount: number;
}

export interface FlagThread {
  flag: FlagView;
  entries: { id: string; at: number; comment: string; authorId: string; authorName: string | null }[];
}

export interface WaiverView {
  id: string;
  pathLineageId: string;
  pathName: string;
  mechanism: string;
  runId: string;
  waived: {
    rule: string;
    value: number;
    limit: number;
    unit: string;
    margin: number;
    corner: string | null;
  }[];
  reason: string;
  expiresAt: number;
  createdAt: number;
  authorName: string | null;
  judged: { state: WaiverState; covers: boolean; reason: string };
  /** What the run that is looked at found of the same path and problem. */
  current: { rule: string; value: number | null; unit: string; margin: number | null; verdict: string }[];
}

export interface Acceptance {
  id: string;
  missing: string;
  reason: string;
  createdAt: number;
  authorName: string | null;
}

export interface Signature {
  id: string;
  runId: string;
  runNumber: number;
  signedBy: string;
  signerName: string | null;
  signedAt: number;
  remark: string;
}

export interface ReadinessView {
  draft: { id: string; letter: string };
  run: { id: string; number: number; state: string; counts: Record<string, number> | null } | null;
  blockers: ReleaseBlocker[];
  failing: number;
  waived: number;
  signature: { signerName: string | null; signedAt: number } | null;
}

/** There is no draft to be released, and why. */
export interface NoDraft {
  draft: null;
  why: string;
}

export interface Assignee {
  userId: string;
  name: string;
  role: string;
}

export const reviewKey = (projectId: string) => ["project", projectId, "review"] as const;

export const flagsQuery = (projectId: string) =>
  queryOptions({
    queryKey: [...reviewKey(projectId), "flags"],
    queryFn: ({ signal }) => apiGet<{ flags: FlagView[] }>(`/projects/${projectId}/flags`, undefined, signal),
    select: ({ flags }) => flags,
  });

export const flagQuery = (projectId: string, flagId: string) =>
  queryOptions({
    queryKey: [...reviewKey(projectId), "flag", flagId],
    queryFn: ({ signal }) => apiGet<FlagThread>(`/projects/${projectId}/flags/${flagId}`, undefined, signal),
  });

export const waiversQuery = (projectId: string, runId: string | null) =>
  queryOptions({
    queryKey: [...reviewKey(projectId), "waivers", runId],
    queryFn: ({ signal }) =>
      apiGet<{ waivers: WaiverView[] }>(`/projects/${projectId}/waivers`, { run: runId }, signal),
    select: ({ waivers }) => waivers,
  });

export const noDataQuery = (projectId: string, runId: string) =>
  queryOptions({
    queryKey: [...reviewKey(projectId), "no-data", runId],
    queryFn: ({ signal }) =>
      apiGet<{ missing: { missing: string; paths: number; kind: string }[]; accepted: Acceptance[] }>(
        `/projects/${projectId}/runs/${runId}/no-data`,
        undefined,
        signal,
      ),
  });

export const signaturesQuery = (projectId: string, runId: string) =>
  queryOptions({
    queryKey: [...reviewKey(projectId), "signatures", runId],
    queryFn: ({ signal }) =>
      apiGet<{ signatures: Signature[] }>(`/projects/${projectId}/runs/${runId}/sign-off`, undefined, signal),
    select: ({ signatures }) => signatures,
  });

/** Who edited the draft; they neither sign it nor waive in it. */
export const editorsQuery = (projectId: string, letter: string) =>
  queryOptions({
    queryKey: [...reviewKey(projectId), "editors", letter],
    queryFn: ({ signal }) =>
      apiGet<{ editors: { userId: string; name: string; edits: number }[] }>(
        `/projects/${projectId}/edits`,
        { revision: letter },
        signal,
      ),
    select: ({ editors }) => editors,
  });

export const readinessQuery = (projectId: string) =>
  queryOptions({
    queryKey: [...reviewKey(projectId), "readiness"],
    queryFn: ({ signal }) =>
      apiGet<ReadinessView | NoDraft>(`/projects/${projectId}/readiness`, undefined, signal),
  });

export const assigneesQuery = (projectId: string) =>
  queryOptions({
    queryKey: ["project", projectId, "assignees"],
    queryFn: ({ signal }) =>
      apiGet<{ people: Assignee[] }>(`/projects/${projectId}/assignees`, undefined, signal),
    select: ({ people }) => people,
    staleTime: 300_000,
  });

export const raiseFlag = (
  projectId: string,
  flag: { subject: Subject; comment: string; assigneeUserId: string | null },
) => apiPost<{ id: string }>(`/projects/${projectId}/flags`, flag);

export const changeFlag = (
  projectId: string,
  flagId: string,
  change: { version: number; state?: "open" | "resolved"; assigneeUserId?: string | null },
) => apiPatch<{ flag: FlagView }>(`/projects/${projectId}/flags/${flagId}`, change);

export const commentOnFlag = (projectId: string, flagId: string, comment: string) =>
  apiPost<undefined>(`/projects/${projectId}/flags/${flagId}/comments`, { comment });

export const grantWaiver = (
  projectId: string,
  waiver: { runId: string; subject: Subject; reason: string; expiresAt: number },
) => apiPost<{ id: string }>(`/projects/${projectId}/waivers`, waiver);

export const revokeWaiver = (projectId: string, waiverId: string) =>
  apiDelete<undefined>(`/projects/${projectId}/waivers/${waiverId}`);

export const acceptNoData = (projectId: string, runId: string, missing: readonly string[], reason: string) =>
  apiPost<{ ids: string[] }>(`/projects/${projectId}/runs/${runId}/no-data`, { missing, reason });

export const withdrawAcceptance = (projectId: string, acceptanceId: string) =>
  apiDelete<undefined>(`/projects/${projectId}/no-data/${acceptanceId}`);

export const signRun = (projectId: string, runId: string, remark: string) =>
  apiPost<{ id: string }>(`/projects/${projectId}/runs/${runId}/sign-off`, { remark });

export const withdrawSignature = (projectId: string, signOffId: string) =>
  apiDelete<undefined>(`/projects/${projectId}/sign-offs/${signOffId}`);
