"use client";

import { useQuery } from "@tanstack/react-query";
import { Badge } from "@/components/ui/badge";
import { Button } from "@/components/ui/button";
import { type DataColumn, DataTable } from "@/components/ui/data-table";
import { Notice } from "@/components/ui/notice";
import { WithSidePanel } from "@/components/ui/side-panel";
import { TableSkeleton } from "@/components/ui/skeleton";
import type { Rights } from "@/components/runs/rights";
import { counted, dayText } from "@/components/runs/run-words";
import { errorMessage } from "@/lib/client/api";
import { flagsQuery, type FlagView } from "@/lib/client/review";
import { FlagThread } from "./flag-thread";

interface Props {
  projectId: string;
  runId: string | null;
  rights: Rights;
  /** the flag whose discussion is open */
  openId: string | null;
  onOpen: (id: string | null) => void;
}

const COLUMNS: readonly DataColumn<FlagView>[] = [
  {
    id: "state",
    header: "State",
    width: 92,
    sortValue: (flag) => flag.state,
    cell: (flag) => <Badge tone={flag.state === "open" ? "copper" : "plain"}>{flag.state}</Badge>,
  },
  {
    id: "title",
    header: "About",
    sortValue: (flag) => flag.title,
    cell: (flag) => <span title={flag.title}>{flag.title}</span>,
  },
  {
    id: "assignee",
    header: "Assigned to",
    width: 130,
    sortValue: (flag) => flag.assigneeName,
    cell: (flag) => flag.assigneeName ?? <span className="text-near">nobody yet</span>,
  },
  {
    id: "author",
    header: "Raised by",
    width: 130,
    sortValue: (flag) => flag.authorName,
    cell: (flag) => flag.authorName ?? "–",
  },
  {
    id: "at",
    header: "Raised",
    width: 116,
    sortValue: (flag) => flag.createdAt,
    cell: (flag) => dayText(flag.createdAt),
  },
  {
    id: "entries",
    header: "Discussion",
    width: 112,
    sortValue: (flag) => flag.entryCount,
    cell: (flag) => counted(flag.entryCount, "comment"),
  },
];

/** The flags of the project, the open ones first; one opens its discussion beside the list. */
export function FlagsList({ projectId, runId, rights, openId, onOpen }: Props) {
  const { data, error, refetch } = useQuery(flagsQuery(projectId));
  if (error)
    return (
      <Notice tone="refusal" actions={<Button onClick={() => void refetch()}>Try again</Button>}>
        {errorMessage(error)}
      </Notice>
    );
  if (!data) return <TableSkeleton label="Loading the flags" />;
  return (
    <WithSidePanel
      panel={
        openId ? (
          <FlagThread
            key={openId}
            projectId={projectId}
            runId={runId}
            flagId={openId}
            rights={rights}
            onClose={() => onOpen(null)}
          />
        ) : null
      }
    >
      <DataTable
        label="Flags"
        keys="page"
        rows={data}
        columns={openId ? COLUMNS.slice(0, 3) : COLUMNS}
        rowId={(flag) => flag.id}
        activeId={openId}
        onActiveChange={onOpen}
        empty="No flag was raised. Flag a problem with f in the table of a run."
      />
    </WithSidePanel>
  );
}
