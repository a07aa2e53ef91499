"use client";

import { Download, FileUp, LayoutTemplate } from "lucide-react";
import { useMemo, useState } from "react";
import { save } from "@/components/charts/save-file";
import { StackupSection } from "@/components/charts/stackup-section";
import { UndoButtons } from "@/components/undo/undo-buttons";
import { useUndo } from "@/components/undo/use-undo";
import { Button } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/empty-state";
import { PageHeader } from "@/components/ui/page-header";
import { toast } from "@/components/ui/toast";
import type { LengthUnit } from "@/lib/client/preferences";
import { writeStackupList } from "@/lib/formats/stackup-list/write";
import type { StackupLayerDoc, StoredStackup } from "@/lib/schemas/stackup";
import { stackupFromTyped, stackupWarnings } from "@/lib/si/stackup";
import { documentOf } from "./edit-layer";
import { ImportDialog } from "./import-dialog";
import { LayerDetails } from "./layer-details";
import { removeLayer } from "./layer-edits";
import { LayerTable } from "./layer-table";
import { LayerToolbar } from "./layer-toolbar";
import { ProcessFields } from "./process-fields";
import { SaveStatus, SaveTrouble } from "./save-status";
import { sectionLayers } from "./section-layers";
import { StackupFacts } from "./stackup-facts";
import { StackupFields } from "./stackup-fields";
import { StackupName } from "./stackup-name";
import { StackupUnits, useStackupUnits } from "./stackup-units";
import { TemplateDialog } from "./template-dialog";
import { useStackupEditor } from "./use-stackup-editor";
import { WarningsList } from "./warnings-list";

interface Props {
  projectId: string;
  projectName: string;
  /** its letter */
  revision: string;
  /** the project's, in which bare numbers of a list are read */
  unit: LengthUnit;
  stackup: StoredStackup;
  /** Why it is only shown; null where it is edited. */
  readOnly: string | null;
}

export function StackupEditor(props: Props) {
  return (
    <StackupUnits project={props.unit}>
      <Editor {...props} />
    </StackupUnits>
  );
}

function Editor({ projectId, projectName, revision, stackup: stored, readOnly }: Props) {
  const { reader } = useStackupUnits();
  const editor = useStackupEditor(projectId, revision, stored, readOnly !== null);
  const { stackup, selected, select, changeLayers } = editor;
  const [pointed, setPointed] = useState<string | null>(null);
  const [said, setSaid] = useState("");
  const [dialog, setDialog] = useState<"template" | "import" | null>(null);
  const undo = useUndo({
    projectId,
    enabled: readOnly === null,
    flush: editor.flush,
    reload: editor.reload,
  });

  const drawn = useMemo(() => sectionLayers(stackup), [stackup]);
  const warnings = useMemo(() => stackupWarnings(stackupFromTyped(documentOf(stackup).layers)), [stackup]);
  const layer = stackup.layers.find(({ key }) => key === selected);
  const empty = stackup.layers.length === 0;

  function replaceBy(layers: readonly StackupLayerDoc[], name: string): void {
    // Without ids: the server knows a layer again by its name.
    const fresh = layers.map(({ id: _id, lineageId: _lineage, ...doc }) => ({
      ...doc,
      key: crypto.randomUUID(),
    }));
    editor.rename(name);
    changeLayers(() => fresh, fresh[0]?.key ?? null);
  }
  function remove(key: string): void {
    const at = stackup.layers.findIndex((candidate) => candidate.key === key);
    const gone = stackup.layers[at];
    const next = stackup.layers[at + 1] ?? stackup.layers[at - 1];
    if (!gone) return;
    changeLayers((present) => removeLayer(present, key), next?.key ?? null);
    setSaid(`${gone.name} was removed.`);
    toast(`${gone.name} removed`, {
      action: {
        label: "Put it back",
        onClick: () =>
          changeLayers((present) => [...present.slice(0, at), gone, ...present.slice(at)], gone.key),
      },
    });
  }

  return (
    <StackupFields
      refusals={editor.refusals}
      refuse={editor.refuse}
      accept={editor.accept}
      readOnly={readOnly !== null}
    >
      <PageHeader
        title="Stackup"
        description={
          readOnly ??
          `Layers from top to bottom. Lengths without a unit are read as ${reader}, the unit they are shown in.`
        }
        actions={
          <>
            {readOnly === null ? (
              <>
                <UndoButtons undo={undo} unsaved={editor.saving.state !== "saved"} />
                <Button onClick={() => setDialog("template")}>
                  <LayoutTemplate size={14} aria-hidden="true" />
                  Templates
                </Button>
                <Button onClick={() => setDialog("import")}>
                  <FileUp size={14} aria-hidden="true" />
                  Import
                </Button>
              </>
            ) : null}
            <Button
              disabled={empty}
              onClick={() =>
                save(
                  `${projectName} stackup.csv`,
                  new Blob([writeStackupList(documentOf(stackup))], { type: "text/csv;charset=utf-8" }),
                )
              }
            >
              <Download size={14} aria-hidden="true" />
              Export CSV
            </Button>
          </>
        }
      />
      <SaveTrouble editor={editor} />
      <p className="sr-only" aria-live="polite">
        {said}
      </p>
      {empty ? (
        <EmptyState
          title="No layers yet"
          actions={
            readOnly === null ? (
              <>
                <Button variant="primary" onClick={() => setDialog("template")}>
                  Start from a template
                </Button>
                <Button onClick={() => setDialog("import")}>Import a CSV</Button>
              </>
            ) : undefined
          }
        >
          {readOnly === null
            ? "The stackup tells every impedance, delay and reflection that is computed here. Take a template of 2 to 18 layers and put in your laminate’s values, or read it from a list."
            : "This revision has no stackup."}
        </EmptyState>
      ) : (
        <>
          <div className="flex flex-wrap items-end justify-between gap-x-6 gap-y-1">
            <StackupName name={stackup.name} onRename={editor.rename} />
            {readOnly === null ? <SaveStatus editor={editor} /> : null}
          </div>
          <StackupFacts stackup={stackup} />
          <div className="grid gap-x-8 gap-y-6 min-[1180px]:grid-cols-[minmax(620px,1.1fr)_minmax(480px,1fr)]">
            <div className="min-w-0">
              {readOnly === null ? <LayerToolbar editor={editor} onSaid={setSaid} onRemove={remove} /> : null}
              <LayerTable
                editor={editor}
                warnings={warnings}
                pointed={pointed}
                onPoint={setPointed}
                onMoved={setSaid}
                onRemove={remove}
              />
              {readOnly === null ? (
                <p className="text-ink-soft mt-2 text-xs print:hidden">
                  Arrows go from row to row; Alt and an arrow move the layer. Esc gives up a text, Ctrl Z
                  takes back an edit.
                </p>
              ) : null}
              <WarningsList
                warnings={warnings}
                onPick={(index) => select(stackup.layers[index]?.key ?? null)}
              />
            </div>
            <div className="min-w-0">
              <StackupSection
                layers={drawn}
                unit={reader}
                highlight={pointed ?? selected}
                onPoint={setPointed}
                onPick={select}
              />
              <div className="mt-4">
                {layer ? (
                  <LayerDetails key={layer.key} editor={editor} layer={layer} />
                ) : (
                  <p className="text-ink-soft text-sm">Choose a layer to see all of its values.</p>
                )}
              </div>
            </div>
          </div>
          <ProcessFields process={stackup.process} onChange={editor.changeProcess} />
        </>
      )}
      {readOnly === null ? (
        <>
          <TemplateDialog
            open={dialog === "template"}
            onOpenChange={(open) => setDialog(open ? "template" : null)}
            present={stackup}
            onTake={(template) => replaceBy(template.layers, `${template.title}, generic`)}
          />
          <ImportDialog
            open={dialog === "import"}
            onOpenChange={(open) => setDialog(open ? "import" : null)}
            present={stackup}
            onTake={(doc) => replaceBy(doc.layers, doc.name)}
          />
        </>
      ) : null}
    </StackupFields>
  );
}
