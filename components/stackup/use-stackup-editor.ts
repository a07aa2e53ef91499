"use client";

import { useQueryClient } from "@tanstack/react-query";
import { useCallback, useEffect, useMemo, useRef, useState } from "react";
import { toast } from "@/components/ui/toast";
import { putStackup, stackupQuery } from "@/lib/client/stackup";
import { undoKey } from "@/lib/client/undo";
import type { ProcessDoc } from "@/lib/schemas/process";
import type { StackupLayerDoc, StoredStackup } from "@/lib/schemas/stackup";
import { adoptIds, contentOf, type EditStackup, documentOf, toEdit } from "./edit-layer";
import { keepUnless, takeKept } from "./kept-draft";
import { type Refusals, refusalsOf, stackupIssues } from "./stackup-issues";
import { restored, type UnsavedStackup, unsavedOf } from "./unsaved-stackup";
import { useAutosave } from "./use-autosave";
import { useLeaveGuard } from "./use-leave-guard";

interface State {
  stackup: EditStackup;
  refusals: Refusals;
  selected: string | null;
}

type Action = (state: State) => State;

export type StackupEditor = ReturnType<typeof useStackupEditor>;

/** The stackup under edit: every change is on screen at once and saved a moment later, unless something is wrong. */
export function useStackupEditor(
  projectId: string,
  revision: string,
  stored: StoredStackup,
  readOnly: boolean,
) {
  const client = useQueryClient();
  const [state, setState] = useState((): State => {
    const stackup = toEdit(stored);
    return { stackup, refusals: {}, selected: stackup.layers[0]?.key ?? null };
  });
  /** The state ahead of its drawing: what is saved as the page goes away includes the last text. */
  const now = useRef(state);
  const dispatch = useCallback((act: Action) => {
    now.current = act(now.current);
    setState(now.current);
  }, []);
  const { stackup, refusals } = state;
  const version = useRef(stored.version);
  const issues = useMemo(() => stackupIssues(stackup, refusals), [stackup, refusals]);
  const content = useMemo(() => contentOf(stackup), [stackup]);
  const kept = `stackup:${projectId}:${revision}`;

  const autosave = useAutosave({
    content,
    blocked: !readOnly && issues.length > 0,
    read: () => ({
      content: contentOf(now.current.stackup),
      blocked: !readOnly && stackupIssues(now.current.stackup, now.current.refusals).length > 0,
    }),
    save: async () => {
      const sent = now.current.stackup;
      const saved = await putStackup(projectId, version.current, documentOf(sent));
      version.current = saved.version;
      dispatch((present) => ({ ...present, stackup: adoptIds(present.stackup, sent, saved) }));
      void client.invalidateQueries({ queryKey: undoKey(projectId) });
    },
    left: (saved) =>
      keepUnless(
        kept,
        saved,
        () => unsavedOf(version.current, now.current.stackup, now.current.refusals),
        () => {
          const why = stackupIssues(now.current.stackup, now.current.refusals)[0]?.message;
          toast.error(why ? `The stackup is not saved. ${why}` : "The stackup could not be saved.", {
            description: "What you typed is kept in this tab. Go back to the stackup to mend it.",
          });
        },
      ),
  });
  const { settle, retry } = autosave;
  const why = useCallback(
    () => stackupIssues(now.current.stackup, now.current.refusals)[0]?.message ?? null,
    [],
  );
  const giveUp = useCallback(() => dispatch((present) => ({ ...present, refusals: {} })), [dispatch]);
  useLeaveGuard({ unsaved: autosave.unsaved, flush: autosave.flush, why, giveUp });

  /** Puts what the server has in place of what is here. */
  const take = useCallback(
    (current: StoredStackup) => {
      version.current = current.version;
      const next = toEdit(current, now.current.stackup.layers);
      settle(contentOf(next));
      dispatch((present) => {
        const kept = next.layers.some(({ key }) => key === present.selected);
        return {
          stackup: next,
          refusals: {},
          selected: kept ? present.selected : (next.layers[0]?.key ?? null),
        };
      });
    },
    [settle, dispatch],
  );
  /** Reads the stackup anew. */
  const reload = useCallback(
    async () => take(await client.fetchQuery(stackupQuery(projectId, revision))),
    [client, take, projectId, revision],
  );
  const untouched = autosave.state === "saved";
  const mayTake = useRef(untouched);
  useEffect(() => {
    mayTake.current = untouched;
  });
  // A page that one comes back to is the one that was left: what was saved since is taken while nothing is under edit.
  useEffect(() => {
    let here = true;
    const catchUp = async () => {
      const unsaved = (await takeKept(kept)) as UnsavedStackup | null;
      if (unsaved && here && !readOnly) {
        version.current = unsaved.version;
        dispatch((present) => restored(present, unsaved));
        toast("Brought back what was not saved when you left the stackup.");
        return;
      }
      const current = await client.fetchQuery(stackupQuery(projectId, revision)).catch(() => null);
      if (here && current && current.version > version.current && mayTake.current) take(current);
    };
    void catchUp();
    const onFocus = () => void catchUp();
    window.addEventListener("focus", onFocus);
    return () => {
      here = false;
      window.removeEventListener("focus", onFocus);
    };
  }, [client, projectId, revision, take, kept, readOnly, dispatch]);
  /** Saves what is here over what somebody else saved meanwhile. */
  const keepMine = useCallback(
    (currentVersion: number) => {
      version.current = currentVersion;
      retry();
    },
    [retry],
  );

  const changeLayers = useCallback(
    (act: (layers: EditStackup["layers"]) => EditStackup["layers"], select?: string | null) =>
      dispatch((present) => {
        const layers = act(present.stackup.layers);
        const wanted = select === undefined ? present.selected : select;
        const selected = layers.some(({ key }) => key === wanted) ? wanted : null;
        return {
          stackup: { ...present.stackup, layers },
          refusals: refusalsOf(layers, present.refusals),
          selected,
        };
      }),
    [dispatch],
  );
  const changeLayer = useCallback(
    (
      key: string,
      change:
        Partial<StackupLayerDoc> | ((layer: EditStackup["layers"][number]) => EditStackup["layers"][number]),
    ) =>
      changeLayers((layers) =>
        layers.map((layer) =>
          layer.key !== key ? layer : typeof change === "function" ? change(layer) : { ...layer, ...change },
        ),
      ),
    [changeLayers],
  );
  const rename = useCallback(
    (name: string) => dispatch((present) => ({ ...present, stackup: { ...present.stackup, name } })),
    [dispatch],
  );
  const changeProcess = useCallback(
    (process: ProcessDoc) =>
      dispatch((present) => ({ ...present, stackup: { ...present.stackup, process } })),
    [dispatch],
  );
  const refuse = useCallback(
    (address: string, text: string, reason: string) =>
      dispatch((present) => ({
        ...present,
        refusals: refusalsOf(present.stackup.layers, { ...present.refusals, [address]: { text, reason } }),
      })),
    [dispatch],
  );
  const accept = useCallback(
    (address: string) =>
      dispatch((present) => {
        if (!(address in present.refusals)) return present;
        const { [address]: _gone, ...rest } = present.refusals;
        return { ...present, refusals: rest };
      }),
    [dispatch],
  );
  const select = useCallback(
    (key: string | null) => dispatch((present) => ({ ...present, selected: key })),
    [dispatch],
  );

  return {
    ...state,
    issues,
    saving: autosave,
    flush: autosave.flush,
    take,
    reload,
    keepMine,
    changeLayers,
    changeLayer,
    rename,
    changeProcess,
    refuse,
    accept,
    select,
  };
}
