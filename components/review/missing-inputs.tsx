"use client";

import { useQuery } from "@tanstack/react-query";
import type { Route } from "next";
import Link from "next/link";
import { useState } from "react";
import { Button } from "@/components/ui/button";
import { type DataColumn, DataTable } from "@/components/ui/data-table";
import { Notice } from "@/components/ui/notice";
import { TableSkeleton } from "@/components/ui/skeleton";
import { narrowedRun } from "@/components/runs/path-address";
import type { Rights } from "@/components/runs/rights";
import { counted } from "@/components/runs/run-words";
import { errorMessage } from "@/lib/client/api";
import { type Acceptance, acceptNoData, noDataQuery, withdrawAcceptance } from "@/lib/client/review";
import { noRuleJudges } from "@/lib/schemas/review";
import { ReasonDialog } from "./reason-dialog";
import { useReviewAct } from "./use-review";

interface Props {
  projectId: string;
  runId: string;
  rights: Rights;
  /** A released revision is not changed any more. */
  frozen: boolean;
}

interface MissingRow {
  missing: string;
  paths: number;
  accepted: Acceptance | null;
}

/** What nobody has said yet, by how many paths it would free; a reviewer may accept that it stays unsaid. */
export function MissingInputs({ projectId, runId, rights, frozen }: Props) {
  const { data, error, refetch } = useQuery(noDataQuery(projectId, runId));
  const [asked, setAsked] = useState<MissingRow | null>(null);
  const accept = useReviewAct(
    projectId,
    ({ missing, reason }: { missing: string; reason: string }) =>
      acceptNoData(projectId, runId, missing, reason),
    "Accepted.",
  );
  const withdraw = useReviewAct(
    projectId,
    (id: string) => withdrawAcceptance(projectId, id),
    "The acceptance is withdrawn.",
  );
  if (error)
    return (
      <Notice tone="refusal" actions={<Button onClick={() => void refetch()}>Try again</Button>}>
        {errorMessage(error)}
      </Notice>
    );
  if (!data) return <TableSkeleton label="Loading what is missing" />;
  const rows = data.missing.map((entry): MissingRow => ({
    ...entry,
    accepted: data.accepted.find((accepted) => accepted.missing === entry.missing) ?? null,
  }));
  const columns: DataColumn<MissingRow>[] = [
    {
      id: "missing",
      header: "Missing input",
      width: 280,
      sortValue: (row) => row.missing,
      cell: (row) => row.missing,
    },
    {
      id: "paths",
      header: "Filling it frees",
      width: 130,
      sortValue: (row) => row.paths,
      cell: (row) => (
        <Link
          className="text-violet hover:underline"
          href={
            row.missing === noRuleJudges
              ? (`/projects/${projectId}/rules` as Route)
              : narrowedRun(projectId, runId, { missing: row.missing, group: "missing input" })
          }
        >
          {counted(row.paths, "path")}
        </Link>
      ),
    },
    {
      id: "accepted",
      header: "Accepted",
      cell: (row) =>
        row.accepted ? (
          <span title={row.accepted.reason}>
            <span className="text-waived">{row.accepted.authorName ?? "somebody"}:</span>{" "}
            {row.accepted.reason}
          </span>
        ) : (
          <span className="text-near">not yet: it holds up the release</span>
        ),
    },
    ...(rights.waive && !frozen
      ? [
          {
            id: "act",
            header: "",
            width: 168,
            cell: (row: MissingRow) =>
              row.accepted ? (
                <Button
                  variant="quiet"
                  className="h-7"
                  busy={withdraw.isPending}
                  onClick={() => withdraw.mutate(row.accepted?.id ?? "")}
                >
                  Withdraw
                </Button>
              ) : (
                <Button variant="quiet" className="h-7" onClick={() => setAsked(row)}>
                  Accept with reason
                </Button>
              ),
          },
        ]
      : []),
  ];
  return (
    <>
      <p className="text-ink-soft mb-3 max-w-prose text-sm">
        A path that lacks an input has no data, which is never a pass. Give the input, or have a reviewer
        accept with a reason that it stays unknown for this revision.
      </p>
      <DataTable
        label="Missing inputs"
        rows={rows}
        columns={columns}
        rowId={(row) => row.missing}
        empty="Nothing is missing: every path in scope could be judged."
      />
      {asked ? (
        <ReasonDialog
          title={`Accept: ${asked.missing}`}
          description={`${counted(asked.paths, "path")} ${asked.paths === 1 ? "stays" : "stay"} without a verdict in this revision. The reason is kept with the release.`}
          label="Reason"
          confirm="Accept"
          least={10}
          onClose={() => setAsked(null)}
          onConfirm={(reason) => accept.mutateAsync({ missing: asked.missing, reason })}
        />
      ) : null}
    </>
  );
}
