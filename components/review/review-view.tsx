"use client";

import { useQuery } from "@tanstack/react-query";
import type { Route } from "next";
import Link from "next/link";
import { useSearchParams } from "next/navigation";
import { parseAsString, parseAsStringLiteral, useQueryStates } from "nuqs";
import { Button } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/empty-state";
import { LinkButton } from "@/components/ui/link-button";
import { Notice } from "@/components/ui/notice";
import { PageHeader } from "@/components/ui/page-header";
import { TableSkeleton } from "@/components/ui/skeleton";
import { Tabs } from "@/components/ui/tabs";
import { Sized } from "@/components/charts/sized";
import { LiveRun } from "@/components/runs/live-run";
import type { Rights } from "@/components/runs/rights";
import { timeText } from "@/components/runs/run-words";
import { runAddress } from "@/components/runs/runs-view";
import { Scopes } from "@/components/runs/run-head";
import { RunCounts } from "@/components/runs/verdict-counts";
import { errorMessage } from "@/lib/client/api";
import { flagsQuery, noDataQuery, waiversQuery } from "@/lib/client/review";
import { REVISION_PARAM } from "@/lib/client/revision-param";
import { isUnderWay, type ListedRun, type RunList, runsQuery, summaryQuery } from "@/lib/client/runs";
import { Blockers } from "./blockers";
import { ClassMatrix } from "./class-matrix";
import { FlagsList } from "./flags-list";
import { MissingInputs } from "./missing-inputs";
import { SignOff } from "./sign-off";
import { WaiversList } from "./waivers-list";

const TABS = ["matrix", "missing", "flags", "waivers"] as const;
type Tab = (typeof TABS)[number];

interface Props {
  projectId: string;
  rights: Rights;
}

/** Where a reviewer begins: class by rule, what is missing, flags, waivers; and beside them release and sign-off. */
export function ReviewView({ projectId, rights }: Props) {
  const { data: list, error, refetch } = useQuery(runsQuery(projectId));
  const chosen = useSearchParams().get(REVISION_PARAM);
  if (error)
    return (
      <Notice tone="refusal" actions={<Button onClick={() => void refetch()}>Try again</Button>}>
        {errorMessage(error)}
      </Notice>
    );
  if (!list) return <TableSkeleton rows={12} label="Loading the review" />;
  const letter = chosen ?? list.draft?.letter ?? list.runs[0]?.letter ?? null;
  const ofRevision = list.runs.filter((run) => run.letter === letter);
  const run = ofRevision.find((entry) => entry.state === "done");
  const underWay = ofRevision.find(isUnderWay);
  return (
    <>
      <PageHeader
        title="Review"
        description={
          run ? <Of run={run} projectId={projectId} /> : "What fails, what is near, what nobody knows yet."
        }
      />
      {underWay ? (
        <div className="mb-4" aria-live="polite">
          <LiveRun projectId={projectId} runId={underWay.id} mayCancel={rights.cancel} />
        </div>
      ) : null}
      {run ? (
        <Reviewed projectId={projectId} run={run} draft={list.draft} rights={rights} />
      ) : (
        <EmptyState
          title={`Revision ${letter ?? ""} has no finished run`.replace("  ", " ")}
          actions={
            <LinkButton variant="primary" href={`/projects/${projectId}/runs` as Route}>
              Go to runs
            </LinkButton>
          }
        >
          A review rests on a run: it lists what fails and what has no data. Run the check, then come back.
        </EmptyState>
      )}
    </>
  );
}

function Of({ run, projectId }: { run: ListedRun; projectId: string }) {
  return (
    <>
      Revision {run.letter},{" "}
      <Link className="prose-link" href={runAddress(projectId, run.id)}>
        run {run.number}
      </Link>{" "}
      of {timeText(run.createdAt)}
    </>
  );
}

interface ReviewedProps extends Props {
  run: ListedRun;
  draft: RunList["draft"];
}

function Reviewed({ projectId, run, draft, rights }: ReviewedProps) {
  const isDraft = draft?.letter === run.letter;
  const stale = isDraft && draft.inputHash !== run.inputHash;
  const summary = useQuery(summaryQuery(projectId, run.id));
  const missing = useQuery(noDataQuery(projectId, run.id)).data;
  const flags = useQuery(flagsQuery(projectId)).data;
  const waivers = useQuery(waiversQuery(projectId, run.id)).data;
  const [{ tab, flag }, setParams] = useQueryStates({
    tab: parseAsStringLiteral(TABS),
    flag: parseAsString,
  });
  const shown: Tab = tab ?? (flag ? "flags" : "matrix");
  const unaccepted = missing?.missing.filter(
    (entry) => !missing.accepted.some((accepted) => accepted.missing === entry.missing),
  ).length;

  const content: Record<Tab, React.ReactNode> = {
    matrix: summary.error ? (
      <Notice tone="refusal">{errorMessage(summary.error)}</Notice>
    ) : summary.data ? (
      <ClassMatrix projectId={projectId} runId={run.id} cells={summary.data.matrix} />
    ) : (
      <TableSkeleton label="Loading class by rule" />
    ),
    missing: <MissingInputs projectId={projectId} runId={run.id} rights={rights} frozen={!isDraft} />,
    flags: (
      <FlagsList
        projectId={projectId}
        runId={run.id}
        rights={rights}
        openId={flag}
        onOpen={(id) => void setParams({ flag: id, tab: "flags" })}
      />
    ),
    waivers: <WaiversList projectId={projectId} runId={run.id} rights={rights} />,
  };
  const labels: Record<Tab, string> = {
    matrix: "Class × rule",
    missing: withCount("Missing inputs", unaccepted),
    flags: withCount("Flags", flags?.filter((entry) => entry.state === "open").length),
    waivers: withCount("Waivers", waivers?.filter((entry) => entry.judged.state !== "revoked").length),
  };

  return (
    <div className="flex flex-col gap-8">
      {stale ? (
        <Notice tone="warning">
          Run {run.number} is <strong>stale</strong>: the draft was edited after it. What you see here is the
          board as it was; waivers and signatures given now rest on those values.
        </Notice>
      ) : null}
      <div className="flex flex-col gap-2">
        <Sized initial={640} least={300}>
          {(width) => <RunCounts counts={run.counts} width={width} />}
        </Sized>
        <Scopes projectId={projectId} scopes={summary.data?.scopes} />
      </div>
      <div className="grid grid-cols-[minmax(0,1fr)] gap-8 xl:grid-cols-[minmax(0,1fr)_300px]">
        <Tabs
          label="What to review"
          value={shown}
          onValueChange={(next) => {
            const name = TABS.find((known) => known === next);
            void setParams({ tab: name ?? null, flag: name === "flags" ? flag : null });
          }}
          tabs={TABS.map((name) => ({ value: name, label: labels[name], content: content[name] }))}
        />
        <aside aria-label="Release and sign-off" className="flex flex-col gap-6">
          {isDraft ? <Blockers projectId={projectId} /> : null}
          <SignOff projectId={projectId} run={run} rights={rights} isDraft={isDraft} stale={stale} />
        </aside>
      </div>
    </div>
  );
}

function withCount(label: string, count: number | undefined): string {
  return count ? `${label} (${count.toLocaleString("en")})` : label;
}
