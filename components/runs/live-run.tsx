"use client";

import { Progress } from "@/components/ui/progress";
import { counted } from "./run-words";
import { useCancelRun, useLiveRun } from "./use-runs";

interface Props {
  projectId: string;
  runId: string;
  mayCancel: boolean;
}

/** How far a run has come, and the way to stop it; nothing once it has ended. */
export function LiveRun({ projectId, runId, mayCancel }: Props) {
  const { data: run, underWay } = useLiveRun(projectId, runId);
  const cancel = useCancelRun(projectId, runId);
  if (!run || !underWay) return null;
  const label =
    run.state === "queued"
      ? `Run ${run.number} waits for its turn`
      : `Run ${run.number} checks ${counted(run.total, "path")}`;
  return (
    <div className="border-rule-line bg-sheet border px-4 py-3">
      <Progress
        label={label}
        done={run.done}
        total={run.total}
        noun="paths"
        onCancel={mayCancel ? () => cancel.mutate() : undefined}
        cancelling={cancel.isPending}
      />
    </div>
  );
}
