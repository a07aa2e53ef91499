"use client";

import { useQuery } from "@tanstack/react-query";
import { TimeText } from "@/components/shell/time-text";
import { type DataColumn, DataTable } from "@/components/ui/data-table";
import { importsQuery } from "@/lib/client/imports";
import type { ImportView } from "@/lib/schemas/import-list";
import { KIND_LABELS, STATE_WORDS } from "./list-words";

const COLUMNS: readonly DataColumn<ImportView>[] = [
  {
    id: "name",
    header: "List",
    sortValue: (view) => view.fileName,
    cell: (view) => <span title={view.fileName}>{view.fileName}</span>,
  },
  {
    id: "kind",
    header: "Kind",
    width: 130,
    sortValue: (view) => view.kind,
    cell: (view) => KIND_LABELS[view.kind],
  },
  {
    id: "state",
    header: "State",
    width: 130,
    sortValue: (view) => STATE_WORDS[view.state],
    cell: (view) => STATE_WORDS[view.state],
  },
  {
    id: "rows",
    header: "Rows",
    kind: "number",
    width: 100,
    sortValue: (view) => view.total,
    number: (view) => ({ text: view.total.toLocaleString("en") }),
  },
  {
    id: "at",
    header: "When",
    width: 180,
    sortValue: (view) => view.createdAt,
    cell: (view) => <TimeText at={view.createdAt} />,
  },
];

/** Lists that came before, to look at what became of them or to go on with one that is not confirmed. */
export function LatestImports({
  projectId,
  onOpen,
}: {
  projectId: string;
  onOpen: (importId: string) => void;
}) {
  const { data = [] } = useQuery(importsQuery(projectId));
  if (data.length === 0) return null;
  return (
    <section aria-labelledby="latest" className="flex flex-col gap-2">
      <h2 id="latest" className="text-lg font-semibold">
        Latest imports
      </h2>
      <DataTable
        label="Latest imports"
        rows={data}
        columns={COLUMNS}
        rowId={(view) => view.id}
        onOpen={(view) => onOpen(view.id)}
        height="18rem"
      />
    </section>
  );
}
