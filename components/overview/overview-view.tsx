"use client";

import { useQuery } from "@tanstack/react-query";
import type { Route } from "next";
import { useRouter } from "next/navigation";
import { useState } from "react";
import { Badge } from "@/components/ui/badge";
import { Button } from "@/components/ui/button";
import { LinkButton } from "@/components/ui/link-button";
import { PageHeader } from "@/components/ui/page-header";
import { Progress } from "@/components/ui/progress";
import { toast } from "@/components/ui/toast";
import { errorMessage } from "@/lib/client/api";
import { overviewQuery, startDraft } from "@/lib/client/project";
import type { ProjectOverview } from "@/lib/schemas/project-overview";
import { LatestEdits } from "./latest-edits";
import { ReleaseBlockers } from "./release-blockers";
import { ScopeCounts } from "./scope-counts";
import { VerdictCounts } from "./verdict-counts";

interface Props {
  initial: ProjectOverview;
  /** The letter in the address; absent: the draft. */
  revision: string | undefined;
  mayEdit: boolean;
}

const WHILE_RUNNING_MS = 2_000;

/** What was judged and how, what was not, and what keeps the board from release. */
export function OverviewView({ initial, revision, mayEdit }: Props) {
  const { data } = useQuery({
    ...overviewQuery(initial.project.id, revision),
    initialData: initial,
    refetchInterval: ({ state }) => (state.data?.running ? WHILE_RUNNING_MS : false),
  });
  const { project, running, run, blockers } = data;
  const base = `/projects/${project.id}`;

  return (
    <>
      <PageHeader
        title={project.name}
        description={project.description || undefined}
        actions={
          <>
            {project.archived ? <Badge tone="near">archived</Badge> : null}
            {project.draftLetter === null && mayEdit && !project.archived ? (
              <StartDraft projectId={project.id} />
            ) : null}
          </>
        }
      />
      {running ? (
        <section aria-label="Check under way" className="mb-6 max-w-xl">
          <Progress label={`Run ${running.number}`} done={running.done} total={running.total} noun="paths" />
        </section>
      ) : null}
      <div className="grid gap-8 lg:grid-cols-[3fr_2fr]">
        <div className="flex flex-col gap-8">
          {run ? (
            <VerdictCounts run={run} waived={data.waived} base={base} />
          ) : (
            <section aria-labelledby="verdicts">
              <h2 id="verdicts" className="mb-2 text-lg font-semibold">
                Verdicts
              </h2>
              <p className="text-ink-soft text-sm">
                Nothing has been judged yet. Import the routed nets, then start a run.
              </p>
              <div className="mt-3 flex flex-wrap gap-2">
                <LinkButton href={`${base}/nets` as Route}>Go to the nets</LinkButton>
                <LinkButton href={`${base}/runs` as Route}>Go to the runs</LinkButton>
              </div>
            </section>
          )}
          <ScopeCounts scopes={data.scopes} base={base} />
        </div>
        <div className="flex flex-col gap-8">
          <ReleaseBlockers
            blockers={blockers}
            letter={data.revision.letter}
            releasedAt={data.revision.releasedAt}
            openFlags={data.openFlags}
            base={base}
          />
          <LatestEdits edits={data.edits} />
        </div>
      </div>
    </>
  );
}

function StartDraft({ projectId }: { projectId: string }) {
  const router = useRouter();
  const [busy, setBusy] = useState(false);

  async function start() {
    setBusy(true);
    try {
      const { letter } = await startDraft(projectId);
      toast.success(`Draft ${letter} is a copy of the release; change it freely.`);
      router.push(`/projects/${projectId}/overview` as Route);
      router.refresh();
    } catch (error) {
      toast.error(errorMessage(error));
    } finally {
      setBusy(false);
    }
  }

  return (
    <Button variant="primary" busy={busy} onClick={() => void start()}>
      Start a new draft
    </Button>
  );
}
