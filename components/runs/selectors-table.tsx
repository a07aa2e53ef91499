"use client";

import { useQuery } from "@tanstack/react-query";
import Link from "next/link";
import { Button } from "@/components/ui/button";
import { type DataColumn, DataTable } from "@/components/ui/data-table";
import { Notice } from "@/components/ui/notice";
import { TableSkeleton } from "@/components/ui/skeleton";
import { VerdictMark } from "@/components/ui/verdict-mark";
import { errorMessage } from "@/lib/client/api";
import { selectorsQuery } from "@/lib/client/runs";
import type { SelectorEntry } from "@/lib/schemas/problem-list";
import { measure } from "./measure";
import { pathAddress } from "./path-address";
import { ruleTitle } from "./rule-title";

/** What the selectors point at: worth a look, but no failure, since simulation has judged the path. */
export function SelectorsTable({ projectId, runId }: { projectId: string; runId: string }) {
  const { data, error, refetch } = useQuery(selectorsQuery(projectId, runId));
  if (error)
    return (
      <Notice tone="refusal" actions={<Button onClick={() => void refetch()}>Try again</Button>}>
        {errorMessage(error)}
      </Notice>
    );
  if (!data) return <TableSkeleton label="Loading what the selectors point at" />;
  return (
    <>
      <p className="text-ink-soft mb-3 max-w-prose text-sm">
        Selectors (◇) choose what to simulate and look at. Once simulation has judged a path they are shown
        but do not count as failures: an edge that is short for its line may still be clean.
      </p>
      <DataTable
        label="What the selectors point at"
        rows={data}
        columns={columns(projectId, runId)}
        rowId={(row) => `${row.pathId} ${row.rule}`}
        empty="No selector points at a path of this run."
      />
    </>
  );
}

function columns(projectId: string, runId: string): DataColumn<SelectorEntry>[] {
  return [
    {
      id: "verdict",
      header: "Verdict",
      width: 100,
      sortValue: (row) => row.verdict,
      cell: (row) => <VerdictMark verdict={row.verdict} />,
    },
    {
      id: "path",
      header: "Path",
      kind: "mono",
      width: 200,
      sortValue: (row) => row.path,
      cell: (row) => (
        <Link className="text-violet hover:underline" href={pathAddress(projectId, runId, row.pathId)}>
          {row.path}
        </Link>
      ),
    },
    {
      id: "class",
      header: "Class",
      width: 130,
      sortValue: (row) => row.className,
      cell: (row) => row.className ?? "–",
    },
    {
      id: "rule",
      header: "Selector",
      width: 170,
      sortValue: (row) => ruleTitle(row.rule),
      cell: (row) => `◇ ${ruleTitle(row.rule)}`,
    },
    {
      id: "value",
      header: "Value",
      kind: "number",
      width: 110,
      sortValue: (row) => row.value,
      number: (row) => measure(row.value, row.unit),
    },
    {
      id: "limit",
      header: "Limit",
      kind: "number",
      width: 110,
      sortValue: (row) => row.limit,
      number: (row) => measure(row.limit, row.unit),
    },
    { id: "missing", header: "Missing input", cell: (row) => row.missing ?? "–" },
  ];
}
