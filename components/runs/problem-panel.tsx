"use client";

import { useQuery } from "@tanstack/react-query";
import type { Route } from "next";
import Link from "next/link";
import { Button } from "@/components/ui/button";
import { LinkButton } from "@/components/ui/link-button";
import { Notice } from "@/components/ui/notice";
import { SidePanel } from "@/components/ui/side-panel";
import { Skeleton } from "@/components/ui/skeleton";
import { VerdictMark } from "@/components/ui/verdict-mark";
import { errorMessage } from "@/lib/client/api";
import { pathFindingsQuery } from "@/lib/client/runs";
import { FindingList } from "./finding-list";
import type { WorkedProblem } from "./problem-filter";
import { pathAddress } from "./path-address";
import type { Rights } from "./rights";

interface Props {
  projectId: string;
  runId: string;
  problem: WorkedProblem;
  rights: Rights;
  onClose: () => void;
  onFlag: () => void;
  onWaive: () => void;
}

/** What one problem rests on, beside the table. */
export function ProblemPanel({ projectId, runId, problem, rights, onClose, onFlag, onWaive }: Props) {
  const { data, error } = useQuery(pathFindingsQuery(projectId, runId, problem.pathId));
  const own = data?.filter((finding) => finding.mechanism === problem.mechanism) ?? [];
  const others = (data?.length ?? 0) - own.length;
  const mayWaive = rights.waive && problem.verdict === "fail" && !problem.waiver?.covers;
  return (
    <SidePanel
      title={<span className="font-mono text-sm">{problem.path}</span>}
      onClose={onClose}
      footer={
        <>
          {rights.flag ? <Button onClick={onFlag}>{problem.flag ? "Add to the flag" : "Flag"}</Button> : null}
          {mayWaive ? <Button onClick={onWaive}>Waive</Button> : null}
          <LinkButton variant="primary" href={pathAddress(projectId, runId, problem.pathId)}>
            {problem.pathId.startsWith("line ") ? "Open the impedance page" : "Open the net"}
          </LinkButton>
        </>
      }
    >
      <div className="mb-3 flex flex-col gap-1 text-sm">
        <div className="flex items-start justify-between gap-3">
          <p className="text-base font-medium">{problem.title}</p>
          <VerdictMark verdict={problem.verdict} />
        </div>
        <p className="text-ink-soft">
          {[
            problem.className && `class ${problem.className}`,
            problem.driver && `driven by ${problem.driver}`,
            problem.layers && `on ${problem.layers}`,
          ]
            .filter(Boolean)
            .join(", ")}
        </p>
        {problem.flag ? (
          <p>
            Flagged,{" "}
            {problem.flag.assigneeName ? `assigned to ${problem.flag.assigneeName}` : "assigned to nobody"}.{" "}
            <Link
              className="prose-link"
              href={`/projects/${projectId}/review?tab=flags&flag=${problem.flag.id}` as Route}
            >
              Read the discussion
            </Link>
          </p>
        ) : null}
        {problem.waiver ? (
          <p className={problem.waiver.covers ? "text-waived" : "text-near"}>
            Waiver: {problem.waiver.state}. {problem.waiver.reason}
          </p>
        ) : null}
        {problem.accepted ? <p className="text-waived">Accepted as missing: {problem.accepted}</p> : null}
      </div>
      {error ? (
        <Notice tone="refusal">{errorMessage(error)}</Notice>
      ) : data ? (
        <>
          <FindingList findings={own} />
          {others > 0 ? (
            <p className="text-ink-soft mt-4 text-xs">
              {others} more {others === 1 ? "finding" : "findings"} of this path: on the net page.
            </p>
          ) : null}
        </>
      ) : (
        <div role="status" aria-label="Loading the findings" className="flex flex-col gap-3">
          <Skeleton className="h-24" />
          <Skeleton className="h-24" />
        </div>
      )}
    </SidePanel>
  );
}
