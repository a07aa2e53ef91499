"use client";

import { useQuery } from "@tanstack/react-query";
import type { Route } from "next";
import Link from "next/link";
import { VerdictBar } from "@/components/charts/verdict-bar";
import { Sized } from "@/components/charts/sized";
import { Notice } from "@/components/ui/notice";
import { type ListedRun, type RunList, type RunView, summaryQuery } from "@/lib/client/runs";
import { counted } from "./run-words";
import { verdictCounts } from "./verdict-counts";

interface Props {
  projectId: string;
  run: RunView;
  listed: ListedRun | undefined;
  draft: RunList["draft"] | undefined;
  onVerdict: (verdict: "fail" | "near" | "no data") => void;
}

/** What a run judged and what it did not: verdicts beside scopes, and whether it still speaks of the draft. */
export function RunHead({ projectId, run, listed, draft, onVerdict }: Props) {
  const { data: summary } = useQuery({ ...summaryQuery(projectId, run.id), enabled: run.state === "done" });
  return (
    <section aria-label="What this run judged" className="mb-6 flex flex-col gap-3">
      <RunState run={run} listed={listed} draft={draft} />
      {run.state === "done" ? (
        <>
          <Sized initial={560} least={300}>
            {(width) => (
              <VerdictBar
                counts={verdictCounts(run.counts)}
                width={width}
                noun="paths"
                title="Paths by verdict"
                onPick={(verdict) => {
                  if (verdict === "fail" || verdict === "near" || verdict === "no data") onVerdict(verdict);
                }}
              />
            )}
          </Sized>
          <Scopes projectId={projectId} scopes={summary?.scopes} />
        </>
      ) : null}
    </section>
  );
}

function RunState({ run, listed, draft }: Pick<Props, "run" | "listed" | "draft">) {
  if (run.state === "failed")
    return (
      <Notice tone="refusal">
        Run {run.number} stopped: {run.error ?? "it gave no reason."} Start another.
      </Notice>
    );
  if (run.state === "cancelled")
    return (
      <Notice tone="warning">
        Run {run.number} was cancelled after {run.done.toLocaleString("en")} of {counted(run.total, "path")}.
        What it found so far is not judged as a whole; start another run.
      </Notice>
    );
  if (run.state !== "done" || !draft || !listed || listed.letter !== draft.letter) return null;
  if (listed.inputHash === draft.inputHash) return null;
  return (
    <Notice tone="warning">
      This run is <strong>stale</strong>: revision {draft.letter} was edited after it, so its findings
      describe the board as it was. Run the check again before anyone signs or releases.
    </Notice>
  );
}

const SCOPES: readonly [scope: string, words: string][] = [
  ["in", "in scope"],
  ["out", "out of scope"],
  ["incomplete", "incomplete route"],
];

/** The counts that stand beside the verdicts: what was not judged is not a pass. */
export function Scopes({
  projectId,
  scopes,
}: {
  projectId: string;
  scopes: Record<string, number> | undefined;
}) {
  const total = Object.values(scopes ?? {}).reduce((sum, count) => sum + count, 0);
  return (
    <p className="text-ink-soft min-h-5 text-sm">
      {scopes ? `${counted(total, "net")}: ` : null}
      {scopes
        ? SCOPES.map(([scope, words], index) => (
            <span key={scope}>
              {index > 0 ? ", " : ""}
              <Link className="prose-link" href={`/projects/${projectId}/nets?scope=${scope}` as Route}>
                {(scopes[scope] ?? 0).toLocaleString("en")}
              </Link>{" "}
              {words}
            </span>
          ))
        : null}
      {scopes ? ". Paths of several nets are judged as one." : null}
    </p>
  );
}
