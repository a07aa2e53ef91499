"use client";

import { useQuery } from "@tanstack/react-query";
import { useMemo } from "react";
import { flagsQuery, noDataQuery, waiversQuery } from "@/lib/client/review";
import { problemsQuery } from "@/lib/client/runs";
import { joinReview } from "./problem-filter";

/** The problems of a finished run, with what people have said of them. */
export function useProblems(projectId: string, runId: string) {
  const problems = useQuery(problemsQuery(projectId, runId));
  const flags = useQuery(flagsQuery(projectId));
  const waivers = useQuery(waiversQuery(projectId, runId));
  const noData = useQuery(noDataQuery(projectId, runId));
  const rows = useMemo(
    () =>
      problems.data && flags.data && waivers.data && noData.data
        ? joinReview(problems.data, flags.data, waivers.data, noData.data.accepted)
        : null,
    [problems.data, flags.data, waivers.data, noData.data],
  );
  const failed = [problems, flags, waivers, noData].find((query) => query.error);
  return {
    rows,
    missing: noData.data?.missing ?? [],
    error: failed?.error ?? null,
    retry: () => void failed?.refetch(),
  };
}
