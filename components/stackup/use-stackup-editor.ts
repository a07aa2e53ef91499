"use client";

import { useQueryClient } from "@tanstack/react-query";
import { useCallback, useEffect, useMemo, useReducer, useRef } from "react";
import { putStackup, stackupQuery } from "@/lib/client/stackup";
import { undoKey } from "@/lib/client/undo";
import type { ProcessDoc } from "@/lib/schemas/process";
import type { StackupLayerDoc, StoredStackup } from "@/lib/schemas/stackup";
import { adoptIds, contentOf, type EditStackup, toDoc, toEdit } from "./edit-layer";
import { type Refusals, refusalsOf, stackupIssues } from "./stackup-issues";
import { useAutosave } from "./use-autosave";

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
  const [state, dispatch] = useReducer(
    (present: State, act: Action) => act(present),
    null,
    (): State => {
      const stackup = toEdit(stored);
      return { stackup, refusals: {}, selected: stackup.layers[0]?.key ?? null };
    },
  );
  const { stackup, refusals } = state;
  const version = useRef(stored.version);
  const latest = useRef(stackup);
  useEffect(() => {
    latest.current = stackup;
  });
  const issues = useMemo(() => stackupIssues(stackup, refusals), [stackup, refusals]);
  const content = useMemo(() => contentOf(stackup), [stackup]);

  const autosave = useAutosave({
    content,
    blocked: !readOnly && issues.length > 0,
    save: async () => {
      const sent = stackup;
      const saved = await putStackup(projectId, version.current, toDoc(sent));
      version.current = saved.version;
      dispatch((present) => ({ ...present, stackup: adoptIds(present.stackup, sent, saved) }));
      void client.invalidateQueries({ queryKey: undoKey(projectId) });
    },
  });
  const { settle, retry } = autosave;

  /** Puts what the server has in place of what is here. */
  const take = useCallback(
    (current: StoredStackup) => {
      version.current = current.version;
      const next = toEdit(current, latest.current.layers);
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
    [settle],
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
  }, [client, projectId, revision, take]);
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
    [],
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
    [],
  );
  const changeProcess = useCallback(
    (process: ProcessDoc) =>
      dispatch((present) => ({ ...present, stackup: { ...present.stackup, process } })),
    [],
  );
  const refuse = useCallback(
    (address: string, text: string, reason: string) =>
      dispatch((present) => ({ ...present, refusals: { ...present.refusals, [address]: { text, reason } } })),
    [],
  );
  const accept = useCallback(
    (address: string) =>
      dispatch((present) => {
        if (!(address in present.refusals)) return present;
        const { [address]: _gone, ...rest } = present.refusals;
        return { ...present, refusals: rest };
      }),
    [],
  );
  const select = useCallback(
    (key: string | null) => dispatch((present) => ({ ...present, selected: key })),
    [],
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
