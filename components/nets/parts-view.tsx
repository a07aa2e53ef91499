"use client";

import { useQuery } from "@tanstack/react-query";
import type { Route } from "next";
import { parseAsString, useQueryStates } from "nuqs";
import { useMemo } from "react";
import { type DataColumn, DataTable } from "@/components/ui/data-table";
import { EmptyState } from "@/components/ui/empty-state";
import { Input } from "@/components/ui/input";
import { LinkButton } from "@/components/ui/link-button";
import { Select } from "@/components/ui/select";
import { TableSkeleton } from "@/components/ui/skeleton";
import { errorMessage } from "@/lib/client/api";
import { partsQuery } from "@/lib/client/nets";
import { REVISION_PARAM } from "@/lib/client/revision-param";
import { valueWarning } from "@/lib/formats/lists/parts-list";
import { partKinds, type StoredPart } from "@/lib/schemas/net";
import { NetPlaces } from "./net-places";

const PART_KINDS: Record<StoredPart["kind"], string> = {
  resistor: "Resistor",
  capacitor: "Capacitor",
  inductor: "Inductor",
  ferrite: "Ferrite",
  ic: "Circuit",
  connector: "Connector",
  other: "Other",
};

const COLUMNS: readonly DataColumn<StoredPart>[] = [
  {
    id: "reference",
    header: "Reference",
    kind: "mono",
    width: 120,
    sortValue: (part) => part.reference,
    cell: (part) => part.reference,
  },
  {
    id: "kind",
    header: "Kind",
    width: 120,
    sortValue: (part) => part.kind,
    cell: (part) => PART_KINDS[part.kind],
  },
  {
    id: "number",
    header: "Part number",
    width: 220,
    sortValue: (part) => part.partNumber || null,
    cell: (part) => part.partNumber || "–",
  },
  {
    id: "value",
    header: "Value",
    width: 160,
    sortValue: (part) => part.value || null,
    cell: (part) => part.value || "–",
  },
  {
    id: "pins",
    header: "Pins",
    kind: "number",
    width: 90,
    sortValue: (part) => part.pins.length || null,
    number: (part) => (part.pins.length > 0 ? { text: String(part.pins.length) } : null),
  },
  {
    id: "remark",
    header: "Remark",
    sortValue: (part) => valueWarning(part),
    cell: (part) => (
      <span className="text-near" title={valueWarning(part) ?? undefined}>
        {valueWarning(part) ?? ""}
      </span>
    ),
  },
];

interface Props {
  projectId: string;
  revision: string | undefined;
  mayImport: boolean;
}

/** The parts that the parts list gave: what joins nets into signal paths. */
export function PartsView({ projectId, revision, mayImport }: Props) {
  const [filter, setFilter] = useQueryStates({
    q: parseAsString.withDefault(""),
    kind: parseAsString.withDefault(""),
  });
  const { data: parts, error } = useQuery(partsQuery(projectId, revision));
  const words = filter.q.toLowerCase();
  const shown = useMemo(
    () =>
      (parts ?? []).filter(
        (part) =>
          (filter.kind === "" || part.kind === filter.kind) &&
          `${part.reference} ${part.partNumber} ${part.value}`.toLowerCase().includes(words),
      ),
    [parts, filter.kind, words],
  );
  return (
    <div className="flex flex-col gap-4">
      <NetPlaces
        projectId={projectId}
        current="parts"
        search={revision ? `?${REVISION_PARAM}=${revision}` : ""}
      />
      {error ? (
        <p role="alert" className="text-fail text-sm">
          {errorMessage(error)}
        </p>
      ) : !parts ? (
        <TableSkeleton />
      ) : parts.length === 0 ? (
        <EmptyState
          title="No parts yet"
          actions={
            mayImport ? (
              <LinkButton variant="primary" href={`/projects/${projectId}/nets/import` as Route}>
                Import a parts list
              </LinkButton>
            ) : null
          }
        >
          A parts list (reference, part number, value, pins) joins nets through their series resistors and
          capacitors, and lets models be given by part number.
        </EmptyState>
      ) : (
        <>
          <div role="search" aria-label="Parts" className="flex flex-wrap items-end gap-3 print:hidden">
            <Input
              label="Search"
              type="search"
              placeholder="reference, number or value"
              fieldClassName="w-full sm:w-64"
              value={filter.q}
              onChange={(event) => void setFilter({ q: event.target.value || null })}
            />
            <Select
              label="Kind"
              fieldClassName="w-40"
              placeholder="All kinds"
              options={partKinds.map((kind) => ({ value: kind, label: PART_KINDS[kind] }))}
              value={filter.kind}
              onChange={(event) => void setFilter({ kind: event.target.value || null })}
            />
          </div>
          <p className="text-ink-soft text-xs" aria-live="polite">
            {shown.length.toLocaleString("en")} of {parts.length.toLocaleString("en")} parts
          </p>
          <DataTable
            label="Parts"
            rows={shown}
            columns={COLUMNS}
            rowId={(part) => part.id}
            keys="page"
            defaultSorting={[{ id: "reference", desc: false }]}
            height="calc(100dvh - 19rem)"
            empty="No part fits these filters."
          />
        </>
      )}
    </div>
  );
}
