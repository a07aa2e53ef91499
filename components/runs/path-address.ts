import type { Route } from "next";

/** Where a path of a run is drawn; a controlled line (class and layer) has its row of the impedance page opened. */
export function pathAddress(projectId: string, runId: string, pathId: string): Route {
  const [, netClass, layer] = /^line (\S+) (\S+)$/.exec(pathId) ?? [];
  return (
    netClass && layer
      ? `/projects/${projectId}/impedance?cell=${encodeURIComponent(`${netClass}.${layer}`)}`
      : `/projects/${projectId}/nets/${encodeURIComponent(pathId)}?run=${runId}`
  ) as Route;
}

/** The address of a run's page narrowed to what a cell, a count or a missing input stands for. */
export function narrowedRun(projectId: string, runId: string, narrow: Record<string, string | null>): Route {
  const search = new URLSearchParams();
  for (const [name, value] of Object.entries(narrow)) if (value !== null) search.set(name, value);
  return `/projects/${projectId}/runs/${runId}${search.size > 0 ? `?${search.toString()}` : ""}` as Route;
}
