"use client";

import { useQuery } from "@tanstack/react-query";
import { Download } from "lucide-react";
import type { Route } from "next";
import { useRouter } from "next/navigation";
import { Button, buttonClasses } from "@/components/ui/button";
import { LinkButton } from "@/components/ui/link-button";
import { Notice } from "@/components/ui/notice";
import { PageHeader } from "@/components/ui/page-header";
import { TableSkeleton } from "@/components/ui/skeleton";
import { Tabs } from "@/components/ui/tabs";
import { errorMessage } from "@/lib/client/api";
import { findingsCsvUrl, type ListedRun, type RunView as Run, runsQuery } from "@/lib/client/runs";
import { LiveRun } from "./live-run";
import { ProblemsWork } from "./problems-work";
import type { Rights } from "./rights";
import { RunHead } from "./run-head";
import { runAddress } from "./runs-view";
import { counted, durationText, timeText } from "./run-words";
import { SelectorsTable } from "./selectors-table";
import { NO_FILTERS, useProblemParams } from "./use-problem-params";
import { useLiveRun, useStartRun } from "./use-runs";

interface Props {
  projectId: string;
  runId: string;
  rights: Rights;
}

/** One run: how it stands, what it judged, and its problems to be worked. */
export function RunView({ projectId, runId, rights }: Props) {
  const router = useRouter();
  const { data: run, error, refetch } = useLiveRun(projectId, runId);
  const list = useQuery(runsQuery(projectId)).data;
  const { params, setParams } = useProblemParams();
  const start = useStartRun(projectId, (id) => router.push(runAddress(projectId, id)));
  const listed = list?.runs.find((entry) => entry.id === runId);

  if (error && !run)
    return (
      <Notice tone="refusal" actions={<Button onClick={() => void refetch()}>Try again</Button>}>
        {errorMessage(error)}
      </Notice>
    );
  if (!run) return <TableSkeleton rows={12} label="Loading the run" />;
  const done = run.state === "done";

  return (
    <>
      <PageHeader
        title={`Run ${run.number}`}
        description={describe(run, listed)}
        actions={
          <>
            {done ? (
              <>
                <LinkButton href={`/projects/${projectId}/review` as Route}>Review</LinkButton>
                <a className={buttonClasses({})} href={findingsCsvUrl(projectId, runId)} download>
                  <Download size={14} aria-hidden="true" />
                  Findings as CSV
                </a>
              </>
            ) : null}
            {rights.start && list?.draft ? (
              <Button busy={start.isPending} onClick={() => start.mutate()}>
                Run the check again
              </Button>
            ) : null}
          </>
        }
      />
      <div aria-live="polite">
        <LiveRun projectId={projectId} runId={runId} mayCancel={rights.cancel} />
      </div>
      <RunHead
        projectId={projectId}
        run={run}
        listed={listed}
        draft={list?.draft}
        onVerdict={(verdict) => void setParams({ ...NO_FILTERS, verdict, view: null })}
      />
      {done ? (
        <Tabs
          label="What this run found"
          value={params.view}
          onValueChange={(view) => void setParams({ view: view === "selectors" ? "selectors" : null })}
          tabs={[
            {
              value: "problems",
              label: "Problems",
              content: <ProblemsWork projectId={projectId} runId={runId} rights={rights} />,
            },
            {
              value: "selectors",
              label: "Selectors ◇",
              content: <SelectorsTable projectId={projectId} runId={runId} />,
            },
          ]}
        />
      ) : null}
    </>
  );
}

function describe(run: Run, listed: ListedRun | undefined): string {
  const took = durationText(run);
  return [
    listed ? `Revision ${listed.letter}` : null,
    `started ${timeText(run.createdAt)}${listed?.startedByName ? ` by ${listed.startedByName}` : ""}`,
    took ? `took ${took}` : null,
    counted(run.corners.length, "corner"),
    `engine ${run.engineVersion}`,
  ]
    .filter(Boolean)
    .join(", ");
}
