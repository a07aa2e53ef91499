"use client";

import { useQuery, useQueryClient } from "@tanstack/react-query";
import { Plus } from "lucide-react";
import { parseAsBoolean, parseAsString, useQueryStates } from "nuqs";
import { useMemo, useState } from "react";
import { useLengthUnit } from "@/components/shell/length-unit";
import { Button } from "@/components/ui/button";
import { CopyButton } from "@/components/ui/copy-button";
import { DataTable } from "@/components/ui/data-table";
import { Input } from "@/components/ui/input";
import { PageHeader } from "@/components/ui/page-header";
import { Select } from "@/components/ui/select";
import { toast } from "@/components/ui/toast";
import { errorMessage } from "@/lib/client/api";
import { materialsKey, materialsQuery, removeMaterial, restoreMaterial } from "@/lib/client/materials";
import { materialKinds, type StoredMaterial } from "@/lib/schemas/material";
import { type MaterialActs, materialColumns } from "./material-columns";
import { MaterialDialog, type MaterialStart } from "./material-dialog";
import { filterMaterials, materialRows, materialsCsv } from "./material-rows";

interface Props {
  initial: StoredMaterial[];
  mayEdit: boolean;
}

/** The library of materials: the team's own entries first, then the generic ones. The address keeps the filter. */
export function MaterialsView({ initial, mayEdit }: Props) {
  const client = useQueryClient();
  const { unit } = useLengthUnit();
  const [state, setState] = useQueryStates(
    {
      q: parseAsString.withDefault(""),
      kind: parseAsString.withDefault(""),
      whose: parseAsString.withDefault(""),
      sort: parseAsString,
      desc: parseAsBoolean.withDefault(false),
      at: parseAsString,
    },
    { history: "replace" },
  );
  const { data = initial, error } = useQuery({ ...materialsQuery(), initialData: initial });
  const [start, setStart] = useState<MaterialStart | null>(null);

  const rows = useMemo(() => materialRows(data), [data]);
  const { q, kind, whose } = state;
  const shown = useMemo(() => filterMaterials(rows, { q, kind, whose }), [rows, q, kind, whose]);
  const columns = useMemo(() => {
    const reload = () => client.invalidateQueries({ queryKey: materialsKey });
    const restore = (entry: StoredMaterial) =>
      restoreMaterial(entry.id)
        .then(
          () => toast.success(`${entry.name} is back among the materials.`),
          (failure: unknown) => toast.error(errorMessage(failure)),
        )
        .then(reload);
    const acts: MaterialActs = {
      edit: ({ own }) => {
        if (own) setStart({ editing: own, from: own });
      },
      copy: ({ material, own }) =>
        setStart({
          editing: null,
          from: {
            ...material,
            name: own ? `${material.name}, copy` : material.name,
            origin: own?.origin ?? "assumed",
          },
        }),
      remove: ({ own }) => {
        if (!own) return;
        void removeMaterial(own)
          .then(
            () =>
              toast.success(`${own.name} is removed.`, {
                action: { label: "Undo", onClick: () => void restore(own) },
              }),
            (failure: unknown) => toast.error(errorMessage(failure)),
          )
          .then(reload);
      },
    };
    return materialColumns(unit, mayEdit ? acts : null);
  }, [client, unit, mayEdit]);

  const narrowed = q !== "" || kind !== "" || whose !== "";
  return (
    <>
      <PageHeader
        title="Materials"
        description="Generic laminates, prepregs, foils and masks, without brands, and the team’s own. The laminate’s data sheet decides."
        actions={
          <>
            <CopyButton label="Copy as CSV" text={() => materialsCsv(shown)} />
            {mayEdit ? (
              <Button variant="primary" onClick={() => setStart({ editing: null, from: {} })}>
                <Plus size={14} aria-hidden="true" />
                Add a material
              </Button>
            ) : null}
          </>
        }
      />
      <div className="flex flex-col gap-4">
        <div role="search" aria-label="Materials" className="flex flex-wrap items-end gap-3 print:hidden">
          <Input
            label="Search"
            type="search"
            placeholder="name, glass style or source"
            fieldClassName="w-full sm:w-64"
            value={q}
            onChange={(event) => void setState({ q: event.target.value || null })}
          />
          <Select
            label="Kind"
            fieldClassName="w-[calc(50%-0.375rem)] sm:w-36"
            placeholder="All kinds"
            options={materialKinds.map((value) => ({ value, label: value }))}
            value={kind}
            onChange={(event) => void setState({ kind: event.target.value || null })}
          />
          <Select
            label="Whose"
            fieldClassName="w-[calc(50%-0.375rem)] sm:w-40"
            placeholder="Team and generic"
            options={[
              { value: "team", label: "The team’s own" },
              { value: "generic", label: "Generic" },
            ]}
            value={whose}
            onChange={(event) => void setState({ whose: event.target.value || null })}
          />
          {narrowed ? (
            <Button variant="quiet" onClick={() => void setState({ q: null, kind: null, whose: null })}>
              Show all
            </Button>
          ) : null}
        </div>
        {error ? (
          <p role="alert" className="text-fail text-sm">
            {errorMessage(error)}
          </p>
        ) : null}
        <p className="text-ink-soft text-xs" aria-live="polite">
          {shown.length} of {rows.length} materials, {data.length === 0 ? "none" : data.length} of the team’s
          own
        </p>
        <DataTable
          label="Materials"
          rows={shown}
          columns={columns}
          rowId={({ id }) => id}
          keys="page"
          activeId={state.at}
          onActiveChange={(id) => void setState({ at: id })}
          onOpen={
            mayEdit
              ? ({ own }) => {
                  if (own) setStart({ editing: own, from: own });
                }
              : undefined
          }
          sorting={state.sort ? [{ id: state.sort, desc: state.desc }] : []}
          onSortingChange={([sort]) => void setState({ sort: sort?.id ?? null, desc: sort?.desc ?? null })}
          height="calc(100dvh - 19rem)"
          empty={
            whose === "team" && data.length === 0
              ? "The team has no materials of its own yet. Add one, or copy one of the generic library."
              : "No material fits these filters."
          }
        />
      </div>
      {start ? (
        <MaterialDialog
          key={start.editing?.id ?? "new"}
          start={start}
          onClose={() => setStart(null)}
          onSaved={(saved, made) => {
            setStart(null);
            toast.success(made ? `${saved.name} is added.` : `${saved.name} is saved.`);
            void client.invalidateQueries({ queryKey: materialsKey });
            void setState({ at: saved.id });
          }}
        />
      ) : null}
    </>
  );
}
