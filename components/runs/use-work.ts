"use client";

import { useQueryClient } from "@tanstack/react-query";
import { useState } from "react";
import { toast } from "@/components/ui/toast";
import { changeFlag, commentOnFlag, grantWaiver, raiseFlag, reviewKey } from "@/lib/client/review";
import type { WorkedProblem } from "./problem-filter";
import { counted } from "./run-words";
import { type WorkedEach, workEach } from "./work-each";

const subjectOf = (problem: WorkedProblem) => ({
  kind: "problem" as const,
  lineageId: problem.pathId,
  mechanism: problem.mechanism,
});

/** Flags and waives problems, one or many; tells how far it is and what was refused. */
export function useWork(projectId: string, runId: string) {
  const client = useQueryClient();
  const [progress, setProgress] = useState<{ done: number; total: number } | null>(null);
  const [refusals, setRefusals] = useState<string[]>([]);

  async function work(
    problems: readonly WorkedProblem[],
    said: string,
    act: (problem: WorkedProblem) => Promise<unknown>,
  ): Promise<WorkedEach> {
    setRefusals([]);
    setProgress({ done: 0, total: problems.length });
    const result = await workEach(problems, act, (done) => setProgress({ done, total: problems.length }));
    await client.invalidateQueries({ queryKey: reviewKey(projectId) });
    setProgress(null);
    setRefusals(result.refusals);
    if (result.done > 0) toast.success(`${counted(result.done, "problem")} ${said}.`);
    return result;
  }

  /** A new flag where there is none; a comment, and somebody to look after it, where there is. */
  const flag = (
    problems: readonly WorkedProblem[],
    { comment, assigneeUserId }: { comment: string; assigneeUserId: string | null },
  ) =>
    work(problems, "flagged", async (problem) => {
      if (!problem.flag)
        return raiseFlag(projectId, { subject: subjectOf(problem), comment, assigneeUserId });
      if (comment) await commentOnFlag(projectId, problem.flag.id, comment);
      if (assigneeUserId && assigneeUserId !== problem.flag.assigneeUserId)
        await changeFlag(projectId, problem.flag.id, { version: problem.flag.version, assigneeUserId });
    });

  const waive = (problems: readonly WorkedProblem[], input: { reason: string; expiresAt: number }) =>
    work(problems, "waived", (problem) =>
      grantWaiver(projectId, { runId, subject: subjectOf(problem), ...input }),
    );

  return { flag, waive, progress, refusals, forget: () => setRefusals([]) };
}
