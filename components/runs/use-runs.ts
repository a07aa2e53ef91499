"use client";

import { useMutation, useQuery, useQueryClient } from "@tanstack/react-query";
import { useEffect, useRef } from "react";
import { toast } from "@/components/ui/toast";
import { errorMessage } from "@/lib/client/api";
import { reviewKey } from "@/lib/client/review";
import { cancelRun, isUnderWay, runQuery, runsKey, startRun } from "@/lib/client/runs";

/** Starts a check of the draft; `onStarted` gets the run. */
export function useStartRun(projectId: string, onStarted?: (runId: string) => void) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: () => startRun(projectId),
    onSuccess: async ({ run }) => {
      await client.invalidateQueries({ queryKey: runsKey(projectId), exact: true });
      onStarted?.(run.id);
    },
    onError: (error) => toast.error(errorMessage(error)),
  });
}

export function useCancelRun(projectId: string, runId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: () => cancelRun(projectId, runId),
    onError: (error) => toast.error(errorMessage(error)),
    onSettled: () => client.invalidateQueries({ queryKey: [...runsKey(projectId), runId] }),
  });
}

/** A run, followed while it is under way; when it ends, what depends on it is read anew. */
export function useLiveRun(projectId: string, runId: string) {
  const client = useQueryClient();
  const query = useQuery(runQuery(projectId, runId));
  const underWay = isUnderWay(query.data);
  const was = useRef(false);
  useEffect(() => {
    if (was.current && !underWay && query.data) {
      void client.invalidateQueries({ queryKey: runsKey(projectId), exact: true });
      void client.invalidateQueries({ queryKey: reviewKey(projectId) });
      void client.invalidateQueries({ queryKey: [...runsKey(projectId), runId] });
    }
    was.current = underWay;
  }, [underWay, query.data, client, projectId, runId]);
  return { ...query, underWay };
}
