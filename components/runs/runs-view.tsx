"use client";

import { useQuery } from "@tanstack/react-query";
import type { Route } from "next";
import Link from "next/link";
import { useRouter } from "next/navigation";
import { Badge } from "@/components/ui/badge";
import { Button } from "@/components/ui/button";
import { type DataColumn, DataTable } from "@/components/ui/data-table";
import { EmptyState } from "@/components/ui/empty-state";
import { LinkButton } from "@/components/ui/link-button";
import { Notice } from "@/components/ui/notice";
import { PageHeader } from "@/components/ui/page-header";
import { TableSkeleton } from "@/components/ui/skeleton";
import { errorMessage } from "@/lib/client/api";
import { isUnderWay, type ListedRun, type RunList, runsQuery } from "@/lib/client/runs";
import { LiveRun } from "./live-run";
import type { Rights } from "./rights";
import { counted, durationText, STATE_WORDS, timeText } from "./run-words";
import { useStartRun } from "./use-runs";
import { RunCounts } from "./verdict-counts";

interface Props {
  projectId: string;
  rights: Rights;
}

/** The checks of a project: what each judged, and whether it still speaks of the draft. */
export function RunsView({ projectId, rights }: Props) {
  const router = useRouter();
  const { data, error, refetch } = useQuery(runsQuery(projectId));
  const start = useStartRun(projectId);
  const runs = data?.runs ?? [];
  const open = (run: ListedRun) => router.push(runAddress(projectId, run.id));
  const button =
    rights.start && data?.draft ? (
      <Button variant="primary" busy={start.isPending} onClick={() => start.mutate()}>
        Run the check
      </Button>
    ) : null;

  return (
    <>
      <PageHeader
        title="Runs"
        description="A run judges every path in scope at every corner of driver and impedance. It keeps its own copy of the inputs, so its findings stay what they were."
        actions={button}
      />
      {start.error ? (
        <Notice tone="refusal" className="mb-4">
          {errorMessage(start.error)}
        </Notice>
      ) : null}
      <div className="mb-4 flex flex-col gap-2" aria-live="polite">
        {runs.filter(isUnderWay).map((run) => (
          <LiveRun key={run.id} projectId={projectId} runId={run.id} mayCancel={rights.cancel} />
        ))}
      </div>
      {data ? <StaleNotice list={data} /> : null}
      {error ? (
        <Notice tone="refusal" actions={<Button onClick={() => void refetch()}>Try again</Button>}>
          {errorMessage(error)}
        </Notice>
      ) : !data ? (
        <TableSkeleton label="Loading the runs" />
      ) : runs.length === 0 ? (
        <EmptyState
          title="Nothing has been checked yet"
          actions={
            <>
              {button}
              <LinkButton href={`/projects/${projectId}/nets` as Route}>Look at the nets</LinkButton>
            </>
          }
        >
          A run needs nets in scope, a class for each of them and a driver with an edge time. What is missing
          is named path by path, so it can be started at any time.
        </EmptyState>
      ) : (
        <DataTable
          label="Runs, newest first"
          keys="page"
          rows={runs}
          columns={columns(projectId, data)}
          rowId={(run) => run.id}
          onOpen={open}
        />
      )}
    </>
  );
}

export const runAddress = (projectId: string, runId: string) =>
  `/projects/${projectId}/runs/${runId}` as Route;

/** Says what it means that the newest run and the draft have gone apart. */
function StaleNotice({ list: { runs, draft } }: { list: RunList }) {
  const newest = draft && runs.find((run) => run.letter === draft.letter && run.state === "done");
  if (!newest || newest.inputHash === draft.inputHash) return null;
  return (
    <Notice tone="warning" className="mb-4">
      Run {newest.number} is <strong>stale</strong>: revision {draft.letter} was edited after it. Its findings
      describe the board as it was then. Run the check again before anyone signs or releases.
    </Notice>
  );
}

function columns(projectId: string, { draft }: RunList): DataColumn<ListedRun>[] {
  return [
    {
      id: "number",
      header: "Run",
      width: 72,
      sortValue: (run) => run.number,
      cell: (run) => (
        <Link className="text-violet font-medium hover:underline" href={runAddress(projectId, run.id)}>
          {run.number}
        </Link>
      ),
    },
    {
      id: "letter",
      header: "Revision",
      width: 76,
      sortValue: (run) => run.letter,
      cell: (run) => run.letter,
    },
    {
      id: "state",
      header: "State",
      width: 190,
      sortValue: (run) => run.state,
      cell: (run) => (
        <span className="flex items-center gap-2" title={run.error ?? undefined}>
          {STATE_WORDS[run.state]}
          <Currency run={run} draft={draft} />
        </span>
      ),
    },
    {
      id: "counts",
      header: "Paths by verdict",
      width: 330,
      sortValue: (run) => run.counts?.fail,
      cell: (run) =>
        run.state === "done" ? (
          <span className="flex items-center gap-3">
            <RunCounts counts={run.counts} width={120} bare />
            <span className="text-xs">{countsText(run.counts)}</span>
          </span>
        ) : (
          <span className="text-ink-soft">
            {run.done.toLocaleString("en")} of {counted(run.total, "path")}
          </span>
        ),
    },
    {
      id: "who",
      header: "Started by",
      width: 130,
      sortValue: (run) => run.startedByName,
      cell: (run) => run.startedByName ?? "Ringfence",
    },
    {
      id: "when",
      header: "When",
      width: 150,
      sortValue: (run) => run.createdAt,
      cell: (run) => timeText(run.createdAt),
    },
    {
      id: "duration",
      header: "Took",
      width: 90,
      sortValue: (run) => (run.finishedAt && run.startedAt ? run.finishedAt - run.startedAt : null),
      cell: (run) => durationText(run) ?? "–",
    },
    { id: "engine", header: "Engine", width: 90, kind: "mono", cell: (run) => run.engineVersion },
  ];
}

/** Whether a run still speaks of the draft as it is. */
function Currency({ run, draft }: { run: ListedRun; draft: RunList["draft"] }) {
  if (run.state !== "done" || draft?.letter !== run.letter) return null;
  return run.inputHash === draft.inputHash ? (
    <Badge tone="pass">current</Badge>
  ) : (
    <Badge tone="near">stale</Badge>
  );
}

function countsText(counts: Record<string, number> | null): string {
  return (["fail", "near", "no data", "pass"] as const)
    .filter((verdict) => (counts?.[verdict] ?? 0) > 0)
    .map((verdict) => `${(counts?.[verdict] ?? 0).toLocaleString("en")} ${verdict}`)
    .join(", ");
}
