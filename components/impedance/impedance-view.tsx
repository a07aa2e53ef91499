"use client";

import { useQuery } from "@tanstack/react-query";
import { useCallback, useEffect, useMemo, useState } from "react";
import { PageHeader } from "@/components/ui/page-header";
import { WithSidePanel } from "@/components/ui/side-panel";
import { UndoButtons } from "@/components/undo/undo-buttons";
import { useUndo } from "@/components/undo/use-undo";
import { backgroundEngine, type Engine, pageEngine } from "@/lib/client/engine";
import { netClassesQuery } from "@/lib/client/net-classes";
import { stackupQuery } from "@/lib/client/stackup";
import type { StoredNetClass } from "@/lib/schemas/net-class";
import { usualProcess } from "@/lib/schemas/process";
import type { StoredStackup } from "@/lib/schemas/stackup";
import { isSignal } from "@/lib/si/stackup/model";
import { stackupFromTyped } from "@/lib/si/stackup/typed-layers";
import { CopyMenu } from "./copy-menu";
import { FilterBar } from "./filter-bar";
import { gridStep } from "./grids";
import { ImpedancePanel } from "./impedance-panel";
import type { ImpedanceRow, RowInput } from "./impedance-rows";
import { ImpedanceTable } from "./impedance-table";
import { MissingInputs } from "./missing-inputs";
import { NO_TRIAL } from "./trial-address";
import { useClassWidth } from "./use-class-width";
import { type ImpedanceState, useImpedanceState } from "./use-impedance-state";
import { type ClassLimits, useRows } from "./use-rows";

interface Props {
  projectId: string;
  projectName: string;
  revision: string;
  stackup: StoredStackup;
  classes: StoredNetClass[];
  limits: ClassLimits;
  /** Why it is only shown; null where widths may be written into the classes. */
  readOnly: string | null;
  /** Kept by links to the other pages of this revision. */
  search: string;
  /** for what is dragged by hand, and for all the rest */
  engines?: { live: Engine; background: Engine };
}

export function ImpedanceView({
  projectId,
  projectName,
  revision,
  limits,
  readOnly,
  search,
  engines,
  ...initial
}: Props) {
  const [{ live, background }] = useState(
    () => engines ?? { live: pageEngine(), background: backgroundEngine() },
  );
  const state = useImpedanceState();
  const { unit, cell, set, class: onlyClass, layers: whichLayers } = state;
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
  const isWanted = useCallback(
    (row: RowInput) => row.id === cell || isAmong(row, { class: onlyClass, layers: whichLayers }),
    [cell, onlyClass, whichLayers],
  );
  const rows = useRows({
    engines: { live, background },
    panelOpen: cell !== null,
    stackup,
    si,
    classes,
    limits,
    grid,
    isWanted,
  });
  const { show } = state;
  const shown = useMemo(
    () => rows.filter((row) => isAmong(row, { class: onlyClass, layers: whichLayers }) && isShown(row, show)),
    [rows, onlyClass, whichLayers, show],
  );
  const open = rows.find((row) => row.id === cell) ?? null;
  const [active, setActive] = useState<string | null>(cell);

  const goTo = useCallback((id: string | null) => void set({ cell: id, ...NO_TRIAL }), [set]);
  const onOpen = useCallback((row: ImpedanceRow) => goTo(row.id), [goTo]);
  const isOpen = cell !== null;
  const onActiveChange = useCallback(
    (id: string | null) => {
      setActive(id);
      // With the panel open it follows the keyboard.
      if (isOpen && id !== null) goTo(id);
    },
    [isOpen, goTo],
  );
  const empty = useMemo(
    () => <NothingShown onAll={() => void set({ class: null, layers: "all", show: null })} />,
    [set],
  );
  useEscape(isOpen, goTo);

  const header = (
    <PageHeader
      title="Impedance"
      description={
        readOnly ??
        "What each class’s width gives on each layer, how production spreads, and the width that meets its target on the grid."
      }
      actions={
        <>
          {readOnly === null ? <UndoButtons undo={undo} /> : null}
          <CopyMenu
            rows={shown}
            unit={unit}
            fileName={`${projectName} widths`}
            engine={background}
            stackup={si}
            process={stackup.process ?? usualProcess}
          />
        </>
      }
    />
  );
  const signals = stackup.layers.filter(isSignal).length;
  const targets = classes.filter(({ targetImpedance }) => targetImpedance !== null);
  if (signals === 0 || targets.length === 0)
    return (
      <>
        {header}
        <MissingInputs
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
            key={open.id}
            row={open}
            stackup={si}
            process={stackup.process ?? usualProcess}
            limits={limits[open.netClass.lineageId] ?? {}}
            state={state}
            grid={grid}
            engines={{ live, background }}
            onClose={() => goTo(null)}
            onUse={
              readOnly === null
                ? (width, gap) =>
                    use.mutate(
                      { row: open, width, gap },
                      { onSuccess: () => void set({ width: null, gap: null }) },
                    )
                : null
            }
            busy={use.isPending}
          />
        ) : null
      }
    >
      {header}
      <FilterBar state={state} classes={targets} />
      <ImpedanceTable
        rows={shown}
        unit={unit}
        beside={open !== null}
        activeId={active}
        onActiveChange={onActiveChange}
        onOpen={onOpen}
        empty={empty}
      />
      <Reading process={stackup.process ? "given" : "usual"} />
    </WithSidePanel>
  );
}

function isAmong(row: RowInput, filter: Pick<ImpedanceState, "class" | "layers">): boolean {
  if (filter.class !== null && row.netClass.lineageId !== filter.class) return false;
  return filter.layers !== "allowed" || row.allowed;
}

function isShown(row: ImpedanceRow, show: ImpedanceState["show"]): boolean {
  if (show === "off") return row.centring === "fail" || row.centring === "near";
  if (show === "yield") return row.yielding === "fail" || row.yielding === "near";
  return show !== "none" || row.width === null;
}

function useEscape(isOpen: boolean, goTo: (id: null) => void): void {
  useEffect(() => {
    if (!isOpen) return;
    const listen = (event: KeyboardEvent) => {
      if (
        event.key !== "Escape" ||
        event.defaultPrevented ||
        document.querySelector("[role=dialog], [role=menu]")
      )
        return;
      goTo(null);
    };
    document.addEventListener("keydown", listen);
    return () => document.removeEventListener("keydown", listen);
  }, [isOpen, goTo]);
}

function NothingShown({ onAll }: { onAll: () => void }) {
  return (
    <>
      No row is left by these filters.{" "}
      <button type="button" className="prose-link" onClick={onAll}>
        Show every class on every signal layer
      </button>
    </>
  );
}

/** How the numbers came about, and what decides in the end. */
function Reading({ process }: { process: "given" | "usual" }) {
  return (
    <>
      <p className="text-ink-soft mt-3 max-w-prose text-xs">
        By a 2-D field solution of each cross-section: solder mask, copper thickness, sloped sides and mixed
        dielectrics included. “Formula” is the difference of the published closed form that fits best.{" "}
        {process === "given"
          ? "Spread and yield follow the tolerances of the fabricator’s process in the stackup."
          : "Spread and yield follow usual process tolerances until the fabricator’s own are in the stackup."}{" "}
        The fabricator’s process, the laminate’s data sheet and measurement on coupons decide, and no number
        here replaces the review of a qualified engineer.
      </p>
      <p className="text-ink-soft mt-2 text-xs max-sm:hidden print:hidden">
        j and k or arrows go through the rows, Enter opens one, Esc closes it.
      </p>
    </>
  );
}
