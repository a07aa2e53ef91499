"use client";

import { keepPreviousData, useQuery } from "@tanstack/react-query";
import { parseAsIsoDate, parseAsString, useQueryStates } from "nuqs";
import { useMemo, useState } from "react";
import { TimeText } from "@/components/shell/time-text";
import { Button } from "@/components/ui/button";
import { type DataColumn, DataTable } from "@/components/ui/data-table";
import { Input } from "@/components/ui/input";
import { toast } from "@/components/ui/toast";
import { errorMessage } from "@/lib/client/api";
import {
  type AuditAnswer,
  type AuditEntry,
  auditQuery,
  type AuditSearch,
  fetchAllAudit,
} from "@/lib/client/audit";
import { actionText, auditCsv, detailText } from "./audit-words";
import { ChainMark } from "./chain-mark";

const DAY_MS = 86_400_000;

const COLUMNS: readonly DataColumn<AuditEntry>[] = [
  {
    id: "seq",
    header: "No.",
    kind: "number",
    width: 80,
    sortValue: (entry) => entry.seq,
    number: (entry) => ({ text: String(entry.seq) }),
  },
  {
    id: "at",
    header: "Time",
    width: 190,
    sortValue: (entry) => entry.at,
    cell: (entry) => <TimeText at={entry.at} />,
  },
  {
    id: "person",
    header: "Person",
    width: 180,
    sortValue: (entry) => entry.actorName,
    cell: (entry) => entry.actorName,
  },
  {
    id: "action",
    header: "Action",
    width: 170,
    sortValue: (entry) => entry.action,
    cell: (entry) => actionText(entry.action),
  },
  {
    id: "detail",
    header: "Detail",
    cell: (entry) => <span title={detailText(entry.detail)}>{detailText(entry.detail)}</span>,
  },
  {
    id: "hash",
    header: "Hash",
    kind: "mono",
    width: 130,
    cell: (entry) => <span title={entry.hash}>{entry.hash.slice(0, 12)}</span>,
  },
];

/** The log of a team: filtered by text and days, verified, exported. The address keeps the filter. */
export function AuditView({ initial }: { initial: AuditAnswer }) {
  const [filter, setFilter] = useQueryStates({
    search: parseAsString.withDefault(""),
    from: parseAsIsoDate,
    to: parseAsIsoDate,
  });
  const search = useMemo<AuditSearch>(
    () => ({
      search: filter.search,
      from: filter.from?.getTime() ?? null,
      to: filter.to ? filter.to.getTime() + DAY_MS : null,
    }),
    [filter],
  );
  const unfiltered = search.search === "" && search.from === null && search.to === null;
  const { data = initial, error } = useQuery({
    ...auditQuery(search),
    placeholderData: keepPreviousData,
    initialData: unfiltered ? initial : undefined,
  });
  const [exporting, setExporting] = useState(false);

  async function save() {
    setExporting(true);
    try {
      download(auditCsv(await fetchAllAudit(search)));
    } catch (failure) {
      toast.error(errorMessage(failure));
    } finally {
      setExporting(false);
    }
  }

  return (
    <div className="flex flex-col gap-4">
      <ChainMark chain={data.chain} />
      <div className="flex flex-wrap items-end gap-3 print:hidden">
        <Input
          label="Search"
          type="search"
          placeholder="person, action or detail"
          fieldClassName="w-64"
          value={filter.search}
          onChange={(event) => void setFilter({ search: event.target.value || null })}
        />
        <Input
          label="From day"
          type="date"
          value={dayText(filter.from)}
          onChange={(event) => void setFilter({ from: event.target.valueAsDate })}
        />
        <Input
          label="To day"
          type="date"
          value={dayText(filter.to)}
          onChange={(event) => void setFilter({ to: event.target.valueAsDate })}
        />
        <Button className="ml-auto" busy={exporting} onClick={() => void save()}>
          Export as CSV
        </Button>
      </div>
      {error ? (
        <p role="alert" className="text-fail text-sm">
          {errorMessage(error)}
        </p>
      ) : null}
      <DataTable
        label="Audit log"
        rows={data.entries}
        columns={COLUMNS}
        rowId={(entry) => entry.id}
        keys="page"
        empty="No entry fits this filter. Widen the days or shorten the text."
      />
    </div>
  );
}

function dayText(day: Date | null): string {
  return day ? day.toISOString().slice(0, 10) : "";
}

function download(csv: string): void {
  const address = URL.createObjectURL(new Blob([csv], { type: "text/csv;charset=utf-8" }));
  const link = document.createElement("a");
  link.href = address;
  link.download = "audit.csv";
  link.click();
  URL.revokeObjectURL(address);
}
