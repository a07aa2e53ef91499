"use client";

import { ClipboardPaste, Plus } from "lucide-react";
import { useMemo, useState } from "react";
import { Button } from "@/components/ui/button";
import { DataTable } from "@/components/ui/data-table";
import { EmptyState } from "@/components/ui/empty-state";
import { WithSidePanel } from "@/components/ui/side-panel";
import type { NetClassRow } from "@/lib/client/net-classes";
import type { StoredBinding } from "@/lib/schemas/model";
import { useClassesDesk } from "./classes-desk";
import { modelColumns } from "./model-columns";
import { ModelPanel } from "./model-panel";
import { modelUses, NO_USE } from "./model-use";
import { NewModel } from "./new-model";
import { PasteModels } from "./paste-models";
import { useListCursor } from "./use-list-cursor";

interface Props {
  classes: readonly NetClassRow[];
  bindings: readonly StoredBinding[];
}

/** Models of drivers and receivers, edited beside their table. */
export function ModelsTab({ classes, bindings }: Props) {
  const desk = useClassesDesk();
  const { models, mayEdit } = desk;
  const cursor = useListCursor();
  const [dialog, setDialog] = useState<"new" | "paste" | null>(null);
  const uses = useMemo(() => modelUses(classes, bindings), [classes, bindings]);
  const open = models.find(({ lineageId }) => lineageId === cursor.openId);
  const beside = open !== undefined;
  const columns = useMemo(() => modelColumns(uses, beside), [uses, beside]);

  const acts = mayEdit ? (
    <div className="flex flex-wrap gap-2">
      <Button variant="primary" onClick={() => desk.leave(() => setDialog("new"))}>
        <Plus size={14} aria-hidden="true" />
        New model
      </Button>
      <Button onClick={() => desk.leave(() => setDialog("paste"))}>
        <ClipboardPaste size={14} aria-hidden="true" />
        Paste rows
      </Button>
    </div>
  ) : null;
  const dialogs =
    dialog === "new" ? (
      <NewModel
        onClose={() => setDialog(null)}
        onMade={(made) => {
          setDialog(null);
          cursor.open(made.lineageId);
        }}
      />
    ) : dialog === "paste" ? (
      <PasteModels onClose={() => setDialog(null)} />
    ) : null;

  if (models.length === 0)
    return (
      <>
        <EmptyState title="No models yet" actions={acts}>
          {mayEdit
            ? "A model says how a pin drives (resistance, edge) and what it needs where it receives (capacitance, thresholds). Start from a technology, or paste the rows of your own list; then bind them to pins."
            : "This revision has no models."}
        </EmptyState>
        {dialogs}
      </>
    );
  return (
    <>
      <WithSidePanel
        panel={
          open ? (
            <ModelPanel
              key={`${open.lineageId} ${desk.epoch}`}
              model={open}
              use={uses.get(open.lineageId) ?? NO_USE}
              onClose={cursor.close}
              onGone={cursor.drop}
              onOpen={cursor.open}
            />
          ) : null
        }
      >
        {acts ? <div className="mb-3">{acts}</div> : null}
        <DataTable
          label="Models"
          keys="page"
          rows={models}
          columns={columns}
          rowId={({ lineageId }) => lineageId}
          activeId={cursor.openId ?? cursor.activeId}
          onActiveChange={cursor.move}
          onOpen={({ lineageId }) => cursor.open(lineageId)}
          height="calc(100dvh - 15rem)"
        />
        <p className="text-ink-soft mt-2 text-xs max-sm:hidden print:hidden">
          j and k go from row to row, Enter opens one beside the table, Esc closes it. Findings that rest on
          an assumed model are counted apart.
        </p>
      </WithSidePanel>
      {dialogs}
    </>
  );
}
