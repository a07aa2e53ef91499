import { queryOptions } from "@tanstack/react-query";
import {
  type PackedRows,
  type ProblemEntry,
  type SelectorEntry,
  unpackRows,
} from "@/lib/schemas/problem-list";
import { apiGet, apiPost } from "./api";

/** A run as lists and heads of pages show it. */
export interface RunView {
  id: string;
  number: number;
  state: "queued" | "running" | "done" | "cancelled" | "failed";
  inputHash: string;
  engineVersion: string;
  runtimeVersion: string;
  corners: string[];
  total: number;
  done: number;
  counts: Record<string, number> | null;
  createdAt: number;
  startedAt: number | null;
  finishedAt: number | null;
  error: string | null;
}

export interface ListedRun extends RunView {
  letter: string;
  startedByName: string | null;
}

export interface RunList {
  runs: ListedRun[];
  draft: { letter: string; inputHash: string } | null;
}

/** A finding as the panel beside the table shows it. */
export interface FindingView {
  id: string;
  mechanism: string;
  rule: string;
  verdict: "near" | "fail" | "no data";
  value: number | null;
  limit: number | null;
  limitOrigin: string | null;
  unit: string;
  margin: number | null;
  counts: boolean;
  corner: string | null;
  pin: string | null;
  driver: string | null;
  edge: string | null;
  time_s: number | null;
  failsAt: number;
  ofCorners: number;
  failsAtNominal: boolean;
  missing: string | null;
  cause: string | null;
  restsOnAssumed: boolean;
}

/** One cell of class × rule. */
export interface MatrixCell {
  className: string | null;
  rule: string;
  fail: number;
  near: number;
  noData: number;
  worstMargin: number | null;
  unit: string;
}

export interface RunSummary {
  matrix: MatrixCell[];
  missing: { missing: string; paths: number }[];
  scopes: Record<string, number>;
  counts: Record<string, number> | null;
}

const POLL_MS = 500;

export const isUnderWay = (run: Pick<RunView, "state"> | undefined) =>
  run?.state === "queued" || run?.state === "running";

export const runsKey = (projectId: string) => ["project", projectId, "runs"] as const;
const runKey = (projectId: string, runId: string) => [...runsKey(projectId), runId] as const;

export const runsQuery = (projectId: string) =>
  queryOptions({
    queryKey: runsKey(projectId),
    queryFn: ({ signal }) => apiGet<RunList>(`/projects/${projectId}/runs`, undefined, signal),
  });

/** One run, asked for again and again while it is under way. */
export const runQuery = (projectId: string, runId: string) =>
  queryOptions({
    queryKey: [...runKey(projectId, runId), "state"],
    queryFn: ({ signal }) =>
      apiGet<{ run: RunView }>(`/projects/${projectId}/runs/${runId}`, undefined, signal),
    select: ({ run }) => run,
    refetchInterval: (query) => (isUnderWay(query.state.data?.run) ? POLL_MS : false),
  });

/** What a finished run found never changes, so it is fetched once. */
const FOREVER = { staleTime: Number.POSITIVE_INFINITY };

export const problemsQuery = (projectId: string, runId: string) =>
  queryOptions({
    ...FOREVER,
    queryKey: [...runKey(projectId, runId), "problems"],
    queryFn: async ({ signal }) =>
      unpackRows<ProblemEntry>(
        await apiGet<PackedRows>(`/projects/${projectId}/runs/${runId}/problems`, undefined, signal),
      ),
  });

export const selectorsQuery = (projectId: string, runId: string) =>
  queryOptions({
    ...FOREVER,
    queryKey: [...runKey(projectId, runId), "selectors"],
    queryFn: async ({ signal }) =>
      unpackRows<SelectorEntry>(
        await apiGet<PackedRows>(`/projects/${projectId}/runs/${runId}/selectors`, undefined, signal),
      ),
  });

export const summaryQuery = (projectId: string, runId: string) =>
  queryOptions({
    queryKey: [...runKey(projectId, runId), "summary"],
    queryFn: ({ signal }) =>
      apiGet<RunSummary>(`/projects/${projectId}/runs/${runId}/summary`, undefined, signal),
  });

export const pathFindingsQuery = (projectId: string, runId: string, pathId: string) =>
  queryOptions({
    ...FOREVER,
    queryKey: [...runKey(projectId, runId), "findings", pathId],
    queryFn: ({ signal }) =>
      apiGet<{ findings: FindingView[] }>(
        `/projects/${projectId}/runs/${runId}/paths/${encodeURIComponent(pathId)}/findings`,
        undefined,
        signal,
      ),
    select: ({ findings }) => findings,
  });

export const startRun = (projectId: string) => apiPost<{ run: RunView }>(`/projects/${projectId}/runs`);
export const cancelRun = (projectId: string, runId: string) =>
  apiPost<undefined>(`/projects/${projectId}/runs/${runId}/cancel`);
export const findingsCsvUrl = (projectId: string, runId: string) =>
  `/api/v1/projects/${projectId}/runs/${runId}/findings/csv`;
