"use client";

import { useQuery } from "@tanstack/react-query";
import type { Route } from "next";
import { useEffect, useMemo, useState } from "react";
import { DataTable } from "@/components/ui/data-table";
import { EmptyState } from "@/components/ui/empty-state";
import { LinkButton } from "@/components/ui/link-button";
import { PageHeader } from "@/components/ui/page-header";
import { WithSidePanel } from "@/components/ui/side-panel";
import { UndoButtons } from "@/components/undo/undo-buttons";
import { useUndo } from "@/components/undo/use-undo";
import { netClassesQuery } from "@/lib/client/net-classes";
import { stackupQuery } from "@/lib/client/stackup";
import type { StoredNetClass } from "@/lib/schemas/net-class";
import type { StoredStackup } from "@/lib/schemas/stackup";
import type { ResolvedLimit } from "@/lib/si/path/types";
import { isSignal, stackupFromTyped } from "@/lib/si/stackup";
import { CopyMenu } from "./copy-menu";
import { FilterBar } from "./filter-bar";
import { gridStep } from "./grids";
import { impedanceColumns } from "./impedance-columns";
import { ImpedancePanel } from "./impedance-panel";
import { type ImpedanceRow, impedanceRows } from "./impedance-rows";
import { useClassWidth } from "./use-class-width";
import { type ImpedanceState, useImpedanceState } from "./use-impedance-state";

interface Props {
  projectId: string;
  projectName: string;
  revision: string;
  stackup: StoredStackup;
  classes: StoredNetClass[];
  /** limit of impedance centring, by class lineage */
  limits: Record<string, ResolvedLimit>;
  /** Why it is only shown; null where widths may be written into the classes. */
  readOnly: string | null;
  /** Kept by links to the other pages of this revision. */
  search: string;
}

export function ImpedanceView({
  projectId,
  projectName,
  revision,
  limits,
  readOnly,
  search,
  ...initial
}: Props) {
  const state = useImpedanceState();
  const { unit, cell, set } = state;
  const { data: classes, refetch } = useQuery({
    ...netClassesQuery(projectId, revision),
    initialData: initial.classes,
  });
  const { data: stackup, refetch: refetchStackup } = useQuery({
    ...stackupQuery(projectId, revision),
    initialData: initial.stackup,
  });
  const undo = useUndo({
    projectId,
    enabled: readOnly === null,
    flush: () => Promise.resolve(true),
    reload: () => Promise.all([refetch(), refetchStackup()]),
  });
  const use = useClassWidth(projectId, revision, unit, undo.undo);

  const si = useMemo(() => stackupFromTyped(stackup.layers), [stackup]);
  const grid = gridStep(state.grid);
  const rows = useMemo(
    () => impedanceRows({ stackup: si, layers: stackup.layers, classes, limits, grid }),
    [si, stackup, classes, limits, grid],
  );
  const shown = useMemo(() => rows.filter((row) => isShown(row, state)), [rows, state]);
  const open = rows.find((row) => row.id === cell) ?? null;
  const columns = useMemo(() => impedanceColumns(unit, open !== null), [unit, open]);
  const [active, setActive] = useState<string | null>(cell);

  useEffect(() => {
    if (cell === null) return;
    const listen = (event: KeyboardEvent) => {
      if (
        event.key !== "Escape" ||
        event.defaultPrevented ||
        document.querySelector("[role=dialog], [role=menu]")
      )
        return;
      void set({ cell: null });
    };
    document.addEventListener("keydown", listen);
    return () => document.removeEventListener("keydown", listen);
  }, [cell, set]);

  const header = (
    <PageHeader
      title="Impedance"
      description={
        readOnly ??
        "What each class’s width gives on each layer, and the width that meets its target on the grid."
      }
      actions={
        <>
          {readOnly === null ? <UndoButtons undo={undo} /> : null}
          <CopyMenu rows={shown} unit={unit} fileName={`${projectName} widths`} />
        </>
      }
    />
  );
  const signals = stackup.layers.filter(isSignal).length;
  const targets = classes.filter(({ targetImpedance }) => targetImpedance !== null).length;
  if (signals === 0 || targets === 0)
    return (
      <>
        {header}
        <Missing
          projectId={projectId}
          search={search}
          what={signals === 0 ? "stackup" : classes.length === 0 ? "classes" : "targets"}
        />
      </>
    );

  return (
    <WithSidePanel
      panel={
        open ? (
          <ImpedancePanel
            key={`${open.id} ${open.netClass.version}`}
            row={open}
            stackup={si}
            limit={limits[open.netClass.lineageId]}
            unit={unit}
            grid={grid}
            onClose={() => void set({ cell: null })}
            onUse={readOnly === null ? (width, gap) => use.mutate({ row: open, width, gap }) : null}
            busy={use.isPending}
          />
        ) : null
      }
    >
      {header}
      <FilterBar state={state} classes={classes.filter(({ targetImpedance }) => targetImpedance !== null)} />
      <DataTable
        label="Impedance by class and layer"
        rows={shown}
        columns={columns}
        rowId={(row) => row.id}
        keys="page"
        activeId={active}
        onActiveChange={(id) => {
          setActive(id);
          // With the panel open it follows the keyboard.
          if (cell !== null && id !== null) void set({ cell: id });
        }}
        onOpen={(row) => void set({ cell: row.id })}
        height="none"
        empty={<NothingShown state={state} />}
      />
      <p className="text-ink-soft mt-3 max-w-prose text-xs">
        Estimates by published closed forms; where one does not see the solder mask, an outer trace comes out
        some per cent lower than shown. The fabricator’s process, the laminate’s data sheet and measurement on
        coupons decide, and no number here replaces the review of a qualified engineer.
      </p>
      <p className="text-ink-soft mt-2 text-xs print:hidden">
        j and k or arrows go through the rows, Enter opens one, Esc closes it.
      </p>
    </WithSidePanel>
  );
}

function isShown(row: ImpedanceRow, state: ImpedanceState): boolean {
  if (state.class !== null && row.netClass.lineageId !== state.class) return false;
  if (state.layers === "allowed" && !row.allowed) return false;
  if (state.show === "off") return row.verdict === "fail" || row.verdict === "near";
  return state.show !== "none" || row.width === null;
}

function NothingShown({ state }: { state: ImpedanceState }) {
  return (
    <>
      No row is left by these filters.{" "}
      <button
        type="button"
        className="prose-link"
        onClick={() => void state.set({ class: null, layers: "all", show: null })}
      >
        Show every class on every signal layer
      </button>
    </>
  );
}

const MISSING = {
  stackup: {
    title: "No signal layers yet",
    words:
      "An impedance needs a trace on a layer and a plane beside it. Start the stackup from a template of 2 to 18 layers.",
    verb: "Go to the stackup",
    place: "stackup",
  },
  classes: {
    title: "No classes yet",
    words:
      "A class says which impedance its nets need, how exactly, and on which layers. Define one with its target.",
    verb: "Go to the classes",
    place: "classes",
  },
  targets: {
    title: "No class has a target impedance",
    words:
      "Give a class its target, such as 50 Ω single-ended or 100 Ω differential, and its widths appear here.",
    verb: "Go to the classes",
    place: "classes",
  },
} as const;

function Missing({
  projectId,
  search,
  what,
}: {
  projectId: string;
  search: string;
  what: keyof typeof MISSING;
}) {
  const { title, words, verb, place } = MISSING[what];
  return (
    <EmptyState
      title={title}
      actions={
        <LinkButton variant="primary" href={`/projects/${projectId}/${place}${search}` as Route}>
          {verb}
        </LinkButton>
      }
    >
      {words}
    </EmptyState>
  );
}
