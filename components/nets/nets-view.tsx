"use client";

import { useQuery, useQueryClient } from "@tanstack/react-query";
import { FileUp, Tags } from "lucide-react";
import type { Route } from "next";
import { useRouter } from "next/navigation";
import { parseAsBoolean, parseAsString, useQueryStates } from "nuqs";
import { useMemo, useState } from "react";
import { useLengthUnit } from "@/components/shell/length-unit";
import { DataTable, type RowSelectionState } from "@/components/ui/data-table";
import { EmptyState } from "@/components/ui/empty-state";
import { LinkButton } from "@/components/ui/link-button";
import { PageHeader } from "@/components/ui/page-header";
import { TableSkeleton } from "@/components/ui/skeleton";
import { errorMessage } from "@/lib/client/api";
import { classesQuery, netsKey, netsQuery, type NetRow } from "@/lib/client/nets";
import { REVISION_PARAM } from "@/lib/client/revision-param";
import { UndoButtons } from "@/components/undo/undo-buttons";
import { useUndo } from "@/components/undo/use-undo";
import { BulkEdit } from "./bulk-edit";
import { countScopes, filterNets, layerNames, type NetFilter } from "./filter-nets";
import { netColumns } from "./net-columns";
import { NetFilters } from "./net-filters";
import { NetPlaces } from "./net-places";
import { counted } from "./net-words";
import { useChangeNets } from "./use-change-nets";

interface Props {
  projectId: string;
  /** Letter of the revision looked at; undefined: the draft. */
  revision: string | undefined;
  /** Why nets are only shown; null where they are edited. */
  readOnly: string | null;
}

const NO_NETS: readonly NetRow[] = [];

/** All nets of a revision: searched, filtered and sorted at once, ticked and changed in bulk. */
export function NetsView({ projectId, revision, readOnly }: Props) {
  const router = useRouter();
  const client = useQueryClient();
  const { unit } = useLengthUnit();
  const [state, setState] = useQueryStates(
    {
      q: parseAsString.withDefault(""),
      class: parseAsString.withDefault(""),
      scope: parseAsString.withDefault(""),
      kind: parseAsString.withDefault(""),
      layer: parseAsString.withDefault(""),
      member: parseAsString.withDefault(""),
      sort: parseAsString.withDefault("name"),
      desc: parseAsBoolean.withDefault(false),
      at: parseAsString,
    },
    { history: "replace" },
  );
  const [ticked, setTicked] = useState<RowSelectionState>({});
  const { data, error, isPending } = useQuery(netsQuery(projectId, revision));
  const { data: classes = [] } = useQuery(classesQuery(projectId, revision));
  const undo = useUndo({
    projectId,
    enabled: readOnly === null,
    flush: () => Promise.resolve(true),
    reload: () => client.invalidateQueries({ queryKey: netsKey(projectId) }),
  });
  const change = useChangeNets(projectId, undo.undo);

  const nets = data?.nets ?? NO_NETS;
  const { q, class: netClass, scope, kind, layer, member, sort, desc, at } = state;
  const filter = useMemo<NetFilter>(
    () => ({ q, class: netClass, scope, kind, layer, member }),
    [q, netClass, scope, kind, layer, member],
  );
  const shown = useMemo(() => filterNets(nets, filter), [nets, filter]);
  const layers = useMemo(() => layerNames(nets), [nets]);
  const scopes = useMemo(() => countScopes(nets), [nets]);
  const chosen = useMemo(() => shown.filter(({ id }) => ticked[id]), [shown, ticked]);
  const suffix = revision ? `?${REVISION_PARAM}=${revision}` : "";
  const columns = useMemo(
    () => netColumns(unit, (net) => `/projects/${projectId}/nets/${net.lineageId}${suffix}`),
    [unit, projectId, suffix],
  );
  const sorting = useMemo(() => [{ id: sort, desc }], [sort, desc]);
  const base = `/projects/${projectId}/nets`;

  return (
    <>
      <PageHeader
        title="Nets"
        description={
          nets.length > 0
            ? `${counted(nets.length, "net")}: ${scopes.in.toLocaleString("en")} in scope, ${scopes.out.toLocaleString("en")} out of scope, ${scopes.incomplete.toLocaleString("en")} incomplete.`
            : "Routed nets come from the lists that a layout program exports."
        }
        actions={
          readOnly === null ? (
            <>
              <UndoButtons undo={undo} />
              <LinkButton href={`${base}/roles` as Route}>
                <Tags size={14} aria-hidden="true" />
                Roles and names
              </LinkButton>
              <LinkButton variant="primary" href={`${base}/import` as Route}>
                <FileUp size={14} aria-hidden="true" />
                Import a list
              </LinkButton>
            </>
          ) : null
        }
      />
      <div className="flex flex-col gap-4">
        <NetPlaces projectId={projectId} current="nets" search={suffix} />
        {readOnly ? <p className="text-ink-soft text-sm">{readOnly}</p> : null}
        {error ? (
          <p role="alert" className="text-fail text-sm">
            {errorMessage(error)}
          </p>
        ) : isPending ? (
          <TableSkeleton />
        ) : nets.length === 0 ? (
          <EmptyState
            title="No nets yet"
            actions={
              readOnly === null ? (
                <LinkButton variant="primary" href={`${base}/import` as Route}>
                  Import a list
                </LinkButton>
              ) : null
            }
          >
            Import a section list (one row a routed section) or a net list (one row a net), by file or by
            paste. Then say which pins drive, and the check has something to judge.
          </EmptyState>
        ) : (
          <>
            <NetFilters
              filter={filter}
              classes={classes}
              layers={layers}
              onChange={(next) =>
                void setState(
                  Object.fromEntries(Object.entries(next).map(([key, value]) => [key, value || null])),
                )
              }
            />
            {chosen.length > 0 && readOnly === null ? (
              <BulkEdit
                nets={chosen}
                classes={classes}
                busy={change.isPending}
                onApply={(fields) =>
                  change.mutate({ nets: chosen, change: fields }, { onSuccess: () => setTicked({}) })
                }
                onClear={() => setTicked({})}
              />
            ) : null}
            <p className="text-ink-soft text-xs" aria-live="polite">
              {shown.length === nets.length
                ? `All ${counted(nets.length, "net")}`
                : `${shown.length.toLocaleString("en")} of ${counted(nets.length, "net")}`}
              <span className="print:hidden">
                . j and k move, Enter opens{readOnly === null ? ", Space ticks" : ""}.
              </span>
            </p>
            <DataTable
              label="Nets"
              rows={shown}
              columns={columns}
              rowId={(net) => net.id}
              keys="page"
              activeId={at}
              onActiveChange={(id) => void setState({ at: id })}
              onOpen={(net) => router.push(`/projects/${projectId}/nets/${net.lineageId}${suffix}` as Route)}
              sorting={sorting}
              onSortingChange={(next) =>
                void setState({ sort: next[0]?.id ?? null, desc: next[0]?.desc ?? null })
              }
              selection={readOnly === null ? ticked : undefined}
              onSelectionChange={setTicked}
              height="calc(100dvh - 19rem)"
              empty="No net fits these filters. Show all, or shorten the search."
            />
          </>
        )}
      </div>
    </>
  );
}
