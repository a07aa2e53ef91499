"use client";

import { Plus } from "lucide-react";
import { useMemo, useState } from "react";
import { useLengthUnit } from "@/components/shell/length-unit";
import { Button } from "@/components/ui/button";
import { DataTable, type RowSelectionState } from "@/components/ui/data-table";
import { EmptyState } from "@/components/ui/empty-state";
import { WithSidePanel } from "@/components/ui/side-panel";
import type { NetClassRow } from "@/lib/client/net-classes";
import { REVISION_PARAM } from "@/lib/client/revision-param";
import { BulkClasses } from "./bulk-classes";
import { classColumns } from "./class-columns";
import { ClassPanel } from "./class-panel";
import { useClassesDesk } from "./classes-desk";
import { NewClass } from "./new-class";
import { useChangeClasses } from "./use-change-classes";
import { useListCursor } from "./use-list-cursor";

/** The classes of the revision; one is edited beside the table, several ticked ones at once. */
export function ClassesTab({ classes }: { classes: readonly NetClassRow[] }) {
  const desk = useClassesDesk();
  const { projectId, search, layers, models, mayEdit } = desk;
  const { unit } = useLengthUnit();
  const cursor = useListCursor();
  const [ticked, setTicked] = useState<RowSelectionState>({});
  const [making, setMaking] = useState(false);
  const change = useChangeClasses();
  const open = classes.find(({ lineageId }) => lineageId === cursor.openId);
  const beside = open !== undefined;
  const columns = useMemo(
    () =>
      classColumns({
        beside,
        layers,
        models,
        unit,
        netsOf: ({ lineageId }) => {
          const letter = new URLSearchParams(search).get(REVISION_PARAM);
          const query = new URLSearchParams({
            class: lineageId,
            ...(letter ? { [REVISION_PARAM]: letter } : {}),
          });
          return `/projects/${projectId}/nets?${query.toString()}`;
        },
      }),
    [beside, layers, models, unit, projectId, search],
  );
  const chosen = classes.filter(({ lineageId }) => ticked[lineageId]);

  const make = mayEdit ? (
    <Button variant="primary" onClick={() => desk.leave(() => setMaking(true))}>
      <Plus size={14} aria-hidden="true" />
      New class
    </Button>
  ) : null;
  const dialog = making ? (
    <NewClass
      classes={classes}
      onClose={() => setMaking(false)}
      onMade={(made) => {
        setMaking(false);
        cursor.open(made.lineageId);
      }}
    />
  ) : null;

  if (classes.length === 0)
    return (
      <>
        <EmptyState title="No classes yet" actions={make}>
          {mayEdit
            ? "A class says what its nets must be: target impedance, layers with their widths, driver, edge and end. Start from a technology, then put in your own values; nets join it by their names at import."
            : "This revision has no classes."}
        </EmptyState>
        {dialog}
      </>
    );
  return (
    <>
      <WithSidePanel
        panel={
          open ? (
            <ClassPanel
              key={`${open.lineageId} ${desk.epoch}`}
              row={open}
              classes={classes}
              onClose={cursor.close}
              onGone={cursor.drop}
              onOpen={cursor.open}
            />
          ) : null
        }
      >
        {make ? <div className="mb-3 flex flex-wrap justify-between gap-2">{make}</div> : null}
        {chosen.length > 0 && mayEdit ? (
          <BulkClasses
            rows={chosen}
            busy={change.isPending}
            onApply={(changes) =>
              desk.leave(() => {
                cursor.drop();
                change.mutate(changes, { onSuccess: ({ refused }) => refused.length === 0 && setTicked({}) });
              })
            }
            onClear={() => setTicked({})}
          />
        ) : null}
        <DataTable
          label="Classes"
          keys="page"
          rows={classes}
          columns={columns}
          rowId={({ lineageId }) => lineageId}
          activeId={cursor.openId ?? cursor.activeId}
          onActiveChange={cursor.move}
          onOpen={({ lineageId }) => cursor.open(lineageId)}
          selection={mayEdit ? ticked : undefined}
          onSelectionChange={mayEdit ? setTicked : undefined}
          height="calc(100dvh - 15rem)"
        />
        <p className="text-ink-soft mt-2 text-xs max-sm:hidden print:hidden">
          j and k go from row to row, Enter opens one beside the table, Esc closes it
          {mayEdit ? ", Space ticks it for a change to several" : ""}.
        </p>
      </WithSidePanel>
      {dialog}
    </>
  );
}
