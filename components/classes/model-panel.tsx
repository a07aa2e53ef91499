"use client";

import { useMutation, useQueryClient } from "@tanstack/react-query";
import { Copy, Trash2 } from "lucide-react";
import { useMemo } from "react";
import { StackupFields } from "@/components/stackup/stackup-fields";
import { Button } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";
import { SidePanel } from "@/components/ui/side-panel";
import { toast } from "@/components/ui/toast";
import { ApiError, errorMessage } from "@/lib/client/api";
import { bindingMatchesKey, createModel, deleteModel, modelsKey, putModel } from "@/lib/client/models";
import { undoKey } from "@/lib/client/undo";
import { origin as originSchema, origins } from "@/lib/schemas/common";
import { modelDoc, type StoredModel } from "@/lib/schemas/model";
import { useClassesDesk, useEditorFlush } from "./classes-desk";
import { Choice, LineText } from "./doc-fields";
import { driverFields, type EditModel, editModelOf, modelDocOf, receiverFields } from "./edit-model";
import { checked } from "./field-words";
import { freeName } from "./free-name";
import { checkModel } from "./model-checks";
import { ModelPart } from "./model-part";
import type { ModelUse } from "./model-use";
import { SaveStatus, SaveTrouble } from "./save-notice";
import { useDocEditor } from "./use-doc-editor";

interface Props {
  model: StoredModel;
  use: ModelUse;
  onClose: () => void;
  onGone: () => void;
  onOpen: (lineageId: string) => void;
}

const { shape } = modelDoc;

/** One model, beside the table; what is changed is saved a moment later. */
export function ModelPanel({ model, use, onClose, onGone, onOpen }: Props) {
  const { projectId, revision, mayEdit, models, undo } = useClassesDesk();
  const client = useQueryClient();
  const key = useMemo(() => modelsKey(projectId, revision), [projectId, revision]);
  const editor = useDocEditor<EditModel, StoredModel>({
    stored: model,
    docOf: editModelOf,
    problems: modelProblems,
    readOnly: !mayEdit,
    save: async (version, edit) => {
      const whole = modelDocOf(edit);
      if ("lacks" in whole) throw new Error(whole.lacks[0]);
      const saved = await putModel(projectId, model.id, version, whole.doc);
      client.setQueryData<StoredModel[]>(key, (present) =>
        present?.map((entry) => (entry.lineageId === saved.lineageId ? saved : entry)),
      );
      void client.invalidateQueries({ queryKey: undoKey(projectId) });
      return saved;
    },
  });
  const { doc, change, saving } = editor;
  useEditorFlush(saving);
  const checks = useMemo(() => checkModel(doc), [doc]);
  const whole = useMemo(() => modelDocOf(doc), [doc]);

  const settled = async () => {
    await client.invalidateQueries({ queryKey: key });
    void client.invalidateQueries({ queryKey: undoKey(projectId) });
    void client.invalidateQueries({ queryKey: bindingMatchesKey(projectId) });
  };
  const duplicate = useMutation({
    mutationFn: async () => {
      if (!(await saving.flush()) || "lacks" in whole)
        throw new Error("This model is not saved yet. Mend it first, then copy it.");
      return createModel(projectId, {
        ...whole.doc,
        name: freeName(
          doc.name,
          models.map(({ name }) => name),
        ).slice(0, 80),
      });
    },
    onSuccess: async (made) => {
      await settled();
      toast.success(`${made.name} made`);
      onOpen(made.lineageId);
    },
    onError: (error) => toast.error(errorMessage(error)),
  });
  const remove = useMutation({
    mutationFn: () => deleteModel(projectId, model),
    onSuccess: async () => {
      await settled();
      toast.success(`${model.name} removed`, { action: { label: "Undo", onClick: undo } });
      editor.forget(() => true);
      saving.settle(JSON.stringify(doc));
      onGone();
    },
  });
  const used = use.classes.length + use.bindings;

  return (
    <SidePanel
      wide
      title={
        <span className="flex items-baseline gap-3">
          <span className="truncate">{doc.name}</span>
          {mayEdit ? <SaveStatus editor={editor} /> : null}
        </span>
      }
      onClose={onClose}
      footer={
        mayEdit ? (
          <>
            <Button variant="quiet" busy={remove.isPending} onClick={() => remove.mutate()}>
              <Trash2 size={14} aria-hidden="true" />
              Remove
            </Button>
            <Button busy={duplicate.isPending} onClick={() => duplicate.mutate()}>
              <Copy size={14} aria-hidden="true" />
              Duplicate
            </Button>
          </>
        ) : null
      }
    >
      <StackupFields
        refusals={editor.refusals}
        refuse={editor.refuse}
        accept={editor.accept}
        readOnly={!mayEdit}
      >
        <div className="relative flex flex-col gap-6">
          <SaveTrouble editor={editor} />
          {remove.error ? (
            <Notice tone="refusal" actions={<Button onClick={() => remove.reset()}>Keep it</Button>}>
              <p>{errorMessage(remove.error)}</p>
              {remove.error instanceof ApiError && remove.error.code === "model-in-use" ? (
                <p className="text-ink-soft mt-1">
                  Tick the classes on the Classes tab to change their models at once; bindings are changed on
                  the Bindings tab.
                </p>
              ) : null}
            </Notice>
          ) : null}
          {"lacks" in whole ? (
            <Notice tone="warning">
              <p>Not saved until it is whole:</p>
              <ul className="list-disc pl-5">
                {whole.lacks.map((text) => (
                  <li key={text}>{text}</li>
                ))}
              </ul>
            </Notice>
          ) : null}
          {checks.map(({ kind, text }) => (
            <Notice key={text} tone={kind === "error" ? "refusal" : "warning"}>
              {text}
            </Notice>
          ))}
          <div className="grid grid-cols-2 gap-x-4 gap-y-3">
            <LineText
              className="col-span-2"
              address="name"
              label="Name"
              value={doc.name}
              read={(text) => checked(shape.name, text)}
              onChange={(name) => change({ name })}
            />
            <LineText
              address="technology"
              label="Technology"
              placeholder="3.3 V CMOS"
              value={doc.technology}
              read={(text) => checked(shape.technology, text)}
              onChange={(technology) => change({ technology })}
            />
            <Choice
              label="Origin of the values"
              options={origins.map((value) => ({
                value,
                label: value.charAt(0).toUpperCase() + value.slice(1),
              }))}
              value={doc.origin}
              onChange={(chosen) => change({ origin: checked(originSchema, chosen) })}
            />
            <LineText
              className="col-span-2"
              address="note"
              label="Note"
              placeholder="Data sheet, page, drive setting"
              value={doc.note}
              read={(text) => checked(shape.note, text)}
              onChange={(note) => change({ note })}
            />
          </div>
          <ModelPart
            title="Drives"
            about="Levels, output resistance and edge of the open-circuit wave; slow is the weak driver with the long edge."
            part="driver"
            fields={driverFields}
            values={doc.driver}
            readOnly={!mayEdit}
            onChange={(driver) => {
              if (driver === null) editor.forget((address) => address.startsWith("driver."));
              change({ driver });
            }}
          />
          <ModelPart
            title="Receives"
            about="Load, thresholds and how far beyond the rails the pin may go. Vmeas is half of the supply where it is empty."
            part="receiver"
            fields={receiverFields}
            values={doc.receiver}
            readOnly={!mayEdit}
            onChange={(receiver) => {
              if (receiver === null) editor.forget((address) => address.startsWith("receiver."));
              change({ receiver });
            }}
          />
          <p className="text-ink-soft text-sm">
            {used === 0
              ? "Nothing uses this model yet: bind it to pins, or give it to a class."
              : `Used by ${[
                  ...use.classes.map((name) => `class ${name}`),
                  ...(use.bindings > 0
                    ? [use.bindings === 1 ? "1 binding" : `${use.bindings} bindings`]
                    : []),
                ].join(", ")}.`}
          </p>
        </div>
      </StackupFields>
    </SidePanel>
  );
}

function modelProblems(edit: EditModel): readonly string[] {
  const whole = modelDocOf(edit);
  return [
    ...("lacks" in whole ? whole.lacks : []),
    ...checkModel(edit)
      .filter(({ kind }) => kind === "error")
      .map(({ text }) => text),
  ];
}
