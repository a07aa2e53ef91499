"use client";

import { createContext, type ReactNode, useContext, useEffect } from "react";
import type { Autosave } from "@/components/stackup/use-autosave";
import type { StoredModel } from "@/lib/schemas/model";
import type { StoredRuleSet } from "@/lib/schemas/rule-set";
import type { SignalLayer } from "./class-words";

export interface ClassesDesk {
  projectId: string;
  /** Letter of the revision looked at. */
  revision: string;
  /** `?rev=A`, or nothing for the draft. */
  search: string;
  /** Classes, models and bindings may be edited. */
  mayEdit: boolean;
  /** A class's limits may be set. */
  mayLimit: boolean;
  /** Why limits are only shown. */
  limitsWhy: string;
  layers: readonly SignalLayer[];
  ruleSet: StoredRuleSet;
  models: readonly StoredModel[];
  /** Rises when what is shown was put back or taken from elsewhere: editors start anew. */
  epoch: number;
  /** Saves what the open editor holds, then acts; where it cannot be saved, says so and stays. */
  leave: (act: () => void) => void;
  /** Tells how the open editor is saved; null when it closes. */
  setFlush: (flush: (() => Promise<boolean>) | null) => void;
  /** Tells whether the open editor holds what the server does not know yet. */
  setUnsaved: (unsaved: boolean) => void;
  /** Takes back the last edit. */
  undo: () => void;
}

const Context = createContext<ClassesDesk | null>(null);

export function ClassesDeskProvider({ desk, children }: { desk: ClassesDesk; children: ReactNode }) {
  return <Context.Provider value={desk}>{children}</Context.Provider>;
}

export function useClassesDesk(): ClassesDesk {
  const desk = useContext(Context);
  if (!desk) throw new Error("This belongs on the Classes page.");
  return desk;
}

/** Lets the page save this editor before it leaves it. */
export function useEditorFlush({ flush, state }: Pick<Autosave, "flush" | "state">): void {
  const { setFlush, setUnsaved } = useClassesDesk();
  useEffect(() => {
    setFlush(flush);
    return () => setFlush(null);
  }, [flush, setFlush]);
  const unsaved = state !== "saved";
  useEffect(() => {
    setUnsaved(unsaved);
    return () => setUnsaved(false);
  }, [unsaved, setUnsaved]);
}
