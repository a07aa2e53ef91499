"use client";

import { useMutation, useQueryClient } from "@tanstack/react-query";
import { Copy, Trash2 } from "lucide-react";
import { useCallback, useMemo, useState } from "react";
import { StackupFields } from "@/components/stackup/stackup-fields";
import { Button } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";
import { SidePanel } from "@/components/ui/side-panel";
import { toast } from "@/components/ui/toast";
import { errorMessage } from "@/lib/client/api";
import { createNetClass, netClassesKey, type NetClassRow, putNetClass } from "@/lib/client/net-classes";
import { undoKey } from "@/lib/client/undo";
import { netClassDoc, type NetClassDoc, type StoredNetClass } from "@/lib/schemas/net-class";
import { ClassFields } from "./class-fields";
import { ClassLayers } from "./class-layers";
import { ClassLimits } from "./class-limits";
import { classWarnings } from "./class-words";
import { useClassesDesk, useEditorFlush } from "./classes-desk";
import { ClassTermination } from "./class-termination";
import { DeleteClass } from "./delete-class";
import { freeName } from "./free-name";
import { SaveStatus, SaveTrouble } from "./save-notice";
import { classDocOf } from "./use-change-classes";
import { useDocEditor } from "./use-doc-editor";

interface Props {
  row: NetClassRow;
  classes: readonly NetClassRow[];
  onClose: () => void;
  /** It was taken away. */
  onGone: () => void;
  onOpen: (lineageId: string) => void;
}

/** One class, beside the table; what is changed is saved a moment later. */
export function ClassPanel({ row, classes, onClose, onGone, onOpen }: Props) {
  const desk = useClassesDesk();
  const { projectId, revision, mayEdit, mayLimit, layers } = desk;
  const client = useQueryClient();
  const key = useMemo(() => netClassesKey(projectId, revision), [projectId, revision]);
  const editor = useDocEditor<NetClassDoc, StoredNetClass>({
    stored: row,
    docOf: classDocOf,
    problems: noProblems,
    readOnly: !mayEdit && !mayLimit,
    save: async (version, doc) => {
      const saved = await putNetClass(projectId, { ...row, version }, doc);
      client.setQueryData<NetClassRow[]>(key, (present) =>
        present?.map((entry) => (entry.lineageId === saved.lineageId ? { ...entry, ...saved } : entry)),
      );
      void client.invalidateQueries({ queryKey: undoKey(projectId) });
      return saved;
    },
  });
  const { doc, change, saving } = editor;
  useEditorFlush(saving);
  const [deleting, setDeleting] = useState(false);

  const duplicate = useMutation({
    mutationFn: async () => {
      if (!(await saving.flush()))
        throw new Error("This class is not saved yet. Mend it first, then copy it.");
      const name = freeName(
        doc.name,
        classes.map((entry) => entry.name),
      ).slice(0, 60);
      return createNetClass(projectId, { ...doc, name, limits: mayLimit ? doc.limits : {}, netPatterns: [] });
    },
    onSuccess: async (made) => {
      await client.invalidateQueries({ queryKey: key });
      void client.invalidateQueries({ queryKey: undoKey(projectId) });
      const left = [
        doc.netPatterns.length > 0 ? "its name patterns" : null,
        !mayLimit && Object.keys(doc.limits).length > 0 ? "its limits, which a reviewer sets" : null,
      ].filter((part) => part !== null);
      toast.success(`${made.name} made${left.length > 0 ? `, without ${left.join(" and ")}` : ""}`);
      onOpen(made.lineageId);
    },
    onError: (error) => toast.error(errorMessage(error)),
  });

  const warnings = useMemo(() => classWarnings(doc, layers), [doc, layers]);
  const changeLayers = useCallback((next: NetClassDoc["layers"]) => change({ layers: next }), [change]);
  const fields = {
    refusals: editor.refusals,
    refuse: editor.refuse,
    accept: editor.accept,
  };
  return (
    <SidePanel
      wide
      title={
        <span className="flex items-baseline gap-3">
          <span className="truncate">{doc.name}</span>
          {mayEdit || mayLimit ? <SaveStatus editor={editor} /> : null}
        </span>
      }
      onClose={onClose}
      footer={
        mayEdit ? (
          <>
            <Button variant="quiet" onClick={() => setDeleting(true)}>
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
      <div className="relative flex flex-col gap-6">
        <SaveTrouble editor={editor} />
        {warnings.length > 0 ? (
          <div className="flex flex-col gap-2">
            {warnings.map((warning) => (
              <Notice key={warning} tone="warning">
                {warning}
              </Notice>
            ))}
          </div>
        ) : null}
        <StackupFields {...fields} readOnly={!mayEdit}>
          <ClassFields doc={doc} onChange={change} />
          <ClassLayers
            doc={doc}
            onChange={changeLayers}
            readOnly={!mayEdit}
            onUntick={(lineageId) => editor.forget((address) => address.startsWith(`layer.${lineageId}.`))}
          />
          <ClassTermination
            doc={doc}
            readOnly={!mayEdit}
            onChange={(termination) => {
              editor.forget((address) => address.startsWith("termination."));
              change({ termination });
            }}
          />
        </StackupFields>
        <StackupFields {...fields} readOnly={!mayLimit}>
          <ClassLimits
            doc={doc}
            readOnly={!mayLimit}
            onChange={(limits) => change({ limits })}
            onDrop={(rule) => editor.forget((address) => address.startsWith(`limit.${rule}.`))}
          />
        </StackupFields>
      </div>
      {deleting ? (
        <DeleteClass
          row={row}
          classes={classes}
          onClose={() => setDeleting(false)}
          onGone={() => {
            setDeleting(false);
            editor.forget(() => true);
            saving.settle(JSON.stringify(doc));
            onGone();
          }}
        />
      ) : null}
    </SidePanel>
  );
}

/** Fields refuse what the shared schema refuses; the whole is checked once more before it goes out. */
function noProblems(doc: NetClassDoc): readonly string[] {
  const parsed = netClassDoc.safeParse(doc);
  return parsed.success ? [] : parsed.error.issues.map(({ message }) => message);
}
