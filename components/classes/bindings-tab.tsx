"use client";

import { useQuery, useQueryClient } from "@tanstack/react-query";
import { ClipboardPaste, Plus } from "lucide-react";
import { useMemo, useState } from "react";
import { StackupFields } from "@/components/stackup/stackup-fields";
import { Button } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/empty-state";
import {
  type BindingList,
  bindingMatchesKey,
  bindingMatchesQuery,
  bindingsKey,
  putBindings,
} from "@/lib/client/models";
import { undoKey } from "@/lib/client/undo";
import type { BindingDoc } from "@/lib/schemas/model";
import { BindingsTable } from "./bindings-table";
import { useClassesDesk, useEditorFlush } from "./classes-desk";
import { PasteBindings } from "./paste-bindings";
import { PinsWithoutModel } from "./pins-without-model";
import { SaveStatus, SaveTrouble } from "./save-notice";
import { useDocEditor } from "./use-doc-editor";

/** A binding on screen: known by its key while it moves. */
export type EditBinding = BindingDoc & { key: string };

interface EditBindings {
  lines: EditBinding[];
}

const NEW_LINE: BindingDoc = {
  referencePattern: "U1",
  partNumberPattern: "*",
  pinPattern: "*",
  netPattern: "*",
  role: "driver",
  modelLineageId: null,
};

/** Which pin has which role and model: an ordered list of patterns, the first that fits decides. */
export function BindingsTab({ stored }: { stored: BindingList }) {
  const { projectId, revision, mayEdit, search } = useClassesDesk();
  const client = useQueryClient();
  const [pasting, setPasting] = useState(false);
  const [selected, setSelected] = useState<string | null>(null);
  const key = useMemo(() => bindingsKey(projectId, revision), [projectId, revision]);
  const editor = useDocEditor<EditBindings, BindingList>({
    stored,
    docOf: editBindingsOf,
    problems: noProblems,
    readOnly: !mayEdit,
    save: async (version, { lines }) => {
      const saved = await putBindings(
        projectId,
        version,
        lines.map(({ key: _key, ...line }) => line),
      );
      client.setQueryData<BindingList>(key, saved);
      void client.invalidateQueries({ queryKey: bindingMatchesKey(projectId) });
      void client.invalidateQueries({ queryKey: undoKey(projectId) });
      return saved;
    },
  });
  const { doc, change, saving } = editor;
  useEditorFlush(saving);
  const { data: matches, isFetching } = useQuery(bindingMatchesQuery(projectId, revision));
  // Counts stand by position: they speak of this list only while it is the one that was counted.
  const counted = matches && saving.state === "saved" && !isFetching ? matches : null;

  const add = (lines: readonly BindingDoc[], before: string | null = null) => {
    const fresh = lines.map((line) => ({ ...line, key: crypto.randomUUID() }));
    change(({ lines: present }) => {
      const at = before === null ? present.length : present.findIndex((line) => line.key === before);
      return { lines: [...present.slice(0, at), ...fresh, ...present.slice(at)] };
    });
    setSelected(fresh[0]?.key ?? null);
  };
  const acts = mayEdit ? (
    <div className="flex flex-wrap items-center gap-2">
      <Button variant="primary" onClick={() => add([NEW_LINE], selected)}>
        <Plus size={14} aria-hidden="true" />
        {selected ? "New row above" : "New row"}
      </Button>
      <Button onClick={() => setPasting(true)}>
        <ClipboardPaste size={14} aria-hidden="true" />
        Paste rows
      </Button>
    </div>
  ) : null;
  const paste = pasting ? (
    <PasteBindings present={doc.lines} onTake={(added) => add(added)} onClose={() => setPasting(false)} />
  ) : null;

  return (
    <StackupFields
      refusals={editor.refusals}
      refuse={editor.refuse}
      accept={editor.accept}
      readOnly={!mayEdit}
    >
      <div className="flex flex-col gap-4">
        {doc.lines.length > 0 && mayEdit ? (
          <div className="flex flex-wrap items-center justify-between gap-2">
            {acts}
            <SaveStatus editor={editor} />
          </div>
        ) : null}
        <SaveTrouble editor={editor} />
        {doc.lines.length === 0 ? (
          <EmptyState title="No bindings yet" actions={acts}>
            {mayEdit
              ? "A binding gives pins a role and a model by pattern: all pins of U1 drive, pins of SDR-* receive. Without one, nobody knows who drives and nothing can be simulated. The first row that fits a pin decides."
              : "This revision has no bindings."}
          </EmptyState>
        ) : (
          <BindingsTable
            lines={doc.lines}
            counts={counted?.lines ?? null}
            selected={selected}
            onSelect={setSelected}
            onChange={(lineKey, part) =>
              change(({ lines }) => ({
                lines: lines.map((line) => (line.key === lineKey ? { ...line, ...part } : line)),
              }))
            }
            onMove={(lineKey, by) => change(({ lines }) => ({ lines: moved(lines, lineKey, by) }))}
            onRemove={(lineKey) => {
              editor.forget((address) => address.startsWith(`${lineKey}.`));
              const at = doc.lines.findIndex((line) => line.key === lineKey);
              setSelected((doc.lines[at + 1] ?? doc.lines[at - 1])?.key ?? null);
              change(({ lines }) => ({ lines: lines.filter((line) => line.key !== lineKey) }));
            }}
          />
        )}
        <PinsWithoutModel matches={matches ?? null} projectId={projectId} search={search} />
      </div>
      {paste}
    </StackupFields>
  );
}

function editBindingsOf({ bindings }: BindingList): EditBindings {
  return { lines: bindings.map(({ id, ...line }) => ({ ...line, key: id })) };
}

function noProblems(): readonly string[] {
  return [];
}

function moved(lines: readonly EditBinding[], key: string, by: number): EditBinding[] {
  const at = lines.findIndex((line) => line.key === key);
  const to = at + by;
  const line = lines[at];
  if (!line || to < 0 || to >= lines.length) return [...lines];
  const rest = lines.filter((entry) => entry.key !== key);
  return [...rest.slice(0, to), line, ...rest.slice(to)];
}
