"use client";

import { useQuery } from "@tanstack/react-query";
import type { Route } from "next";
import Link from "next/link";
import { useState } from "react";
import { Button } from "@/components/ui/button";
import { type DataColumn, DataTable, type RowSelectionState } from "@/components/ui/data-table";
import { Notice } from "@/components/ui/notice";
import { Select } from "@/components/ui/select";
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
  /** "Route in islands" */
  kind: string;
  accepted: Acceptance | null;
}

/** What nobody has said yet, by how many paths it would free; a reviewer may accept that it stays unsaid. */
export function MissingInputs({ projectId, runId, rights, frozen }: Props) {
  const { data, error, refetch } = useQuery(noDataQuery(projectId, runId));
  const [asked, setAsked] = useState<readonly MissingRow[]>([]);
  const [kind, setKind] = useState<string | null>(null);
  const [selection, setSelection] = useState<RowSelectionState>({});
  const accept = useReviewAct(
    projectId,
    ({ missing, reason }: { missing: readonly string[]; reason: string }) =>
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
  const kinds = kindsOf(rows);
  const shown = kind === null ? rows : rows.filter((row) => row.kind === kind);
  const ticked = shown.filter((row) => selection[row.missing] && !row.accepted);
  const mayAccept = rights.waive && !frozen;
  const columns: DataColumn<MissingRow>[] = [
    {
      id: "missing",
      header: "Missing input",
      width: 280,
      sortValue: (row) => row.missing,
      cell: (row) => row.missing,
    },
    {
      id: "kind",
      header: "Kind",
      width: 170,
      sortValue: (row) => row.kind,
      cell: (row) => row.kind,
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
    ...(mayAccept
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
                <Button variant="quiet" className="h-7" onClick={() => setAsked([row])}>
                  Accept with reason
                </Button>
              ),
          },
        ]
      : []),
  ];
  const [first] = asked;
  const paths = asked.reduce((sum, row) => sum + row.paths, 0);
  return (
    <>
      <p className="text-ink-soft mb-3 max-w-prose text-sm">
        A path that lacks an input has no data, which is never a pass. Give the input, or have a reviewer
        accept with a reason that it stays unknown for this revision.
      </p>
      <div className="mb-2 flex min-h-8 flex-wrap items-center gap-2 print:hidden">
        {kinds.length > 1 ? (
          <Select
            label="Kind"
            labelHidden
            className="w-64"
            value={kind ?? ""}
            placeholder={`All kinds, ${rows.length.toLocaleString("en")}`}
            options={kinds.map(({ name, count }) => ({
              value: name,
              label: `${name}, ${count.toLocaleString("en")}`,
            }))}
            onChange={(event) => {
              setKind(event.target.value || null);
              setSelection({});
            }}
          />
        ) : null}
        {mayAccept && ticked.length > 0 ? (
          <>
            <Button onClick={() => setAsked(ticked)}>
              Accept {counted(ticked.length, "input")} with one reason
            </Button>
            <Button variant="quiet" onClick={() => setSelection({})}>
              Select none
            </Button>
          </>
        ) : null}
      </div>
      <DataTable
        label="Missing inputs"
        rows={shown}
        columns={columns}
        rowId={(row) => row.missing}
        selection={mayAccept ? selection : undefined}
        onSelectionChange={mayAccept ? setSelection : undefined}
        empty="Nothing is missing: every path in scope could be judged."
      />
      {first ? (
        <ReasonDialog
          title={asked.length === 1 ? `Accept: ${first.missing}` : `Accept ${asked.length} missing inputs`}
          description={`${counted(paths, "path")} ${paths === 1 ? "stays" : "stay"} without a verdict in this revision. The reason is kept with the release.`}
          label="Reason"
          confirm="Accept"
          least={10}
          onClose={() => setAsked([])}
          onConfirm={async (reason) => {
            await accept.mutateAsync({ missing: asked.map(({ missing }) => missing), reason });
            setSelection({});
          }}
        />
      ) : null}
    </>
  );
}

/** The kinds with how many inputs each has, the commonest first. */
function kindsOf(rows: readonly MissingRow[]): { name: string; count: number }[] {
  const counts = new Map<string, number>();
  for (const { kind } of rows) counts.set(kind, (counts.get(kind) ?? 0) + 1);
  return [...counts].map(([name, count]) => ({ name, count })).sort((a, b) => b.count - a.count);
}
