"use client";

import { useQuery, useQueryClient } from "@tanstack/react-query";
import { useCallback, useMemo, useRef, useState } from "react";
import { useAutosave } from "@/components/stackup/use-autosave";
import { useLeaveGuard } from "@/components/stackup/use-leave-guard";
import { toast } from "@/components/ui/toast";
import { ApiError, errorMessage } from "@/lib/client/api";
import { reviewKey } from "@/lib/client/review";
import { fetchRules, putRules, rulesQuery } from "@/lib/client/rules";
import { undoKey } from "@/lib/client/undo";
import type { RuleSetDoc, StoredRuleSet } from "@/lib/schemas/rule-set";

export type RuleSetEditor = ReturnType<typeof useRuleSetEditor>;

/** The rule set as it is on the server, of a revision. */
export function useRuleSet(projectId: string, revision: string | null) {
  return useQuery(rulesQuery(projectId, revision));
}

const bare = ({ rules, judgedAt }: RuleSetDoc): RuleSetDoc => ({ rules, judgedAt });

/** A rule set being edited: saved a moment after each change, one request at a time, with the version it was read at. */
export function useRuleSetEditor(projectId: string, stored: StoredRuleSet) {
  const client = useQueryClient();
  const [doc, setDoc] = useState<RuleSetDoc>(() => bare(stored));
  const version = useRef(stored.version);
  const latest = useRef(doc);
  const content = useMemo(() => JSON.stringify(doc), [doc]);

  const change = useCallback((next: RuleSetDoc) => {
    latest.current = next;
    setDoc(next);
  }, []);

  const save = useCallback(async () => {
    const saved = await putRules(projectId, version.current, latest.current);
    version.current = saved.version;
    void client.invalidateQueries({ queryKey: undoKey(projectId) });
    void client.invalidateQueries({ queryKey: reviewKey(projectId) });
  }, [client, projectId]);

  const autosave = useAutosave({
    content,
    blocked: false,
    save,
    read: () => ({ content: JSON.stringify(latest.current), blocked: false }),
    left: (saved) =>
      void saved.then((done) => {
        if (!done) toast.error("The rules were not saved as you left them. Open them and look once more.");
      }),
  });
  useLeaveGuard({
    unsaved: autosave.unsaved,
    flush: autosave.flush,
    why: () => null,
    giveUp: () => undefined,
  });

  /** Takes the server's state in place of what is on screen. */
  const reload = useCallback(async () => {
    const now = await fetchRules(projectId);
    version.current = now.version;
    latest.current = bare(now);
    setDoc(latest.current);
    autosave.settle(JSON.stringify(latest.current));
    void client.invalidateQueries({ queryKey: rulesQuery(projectId, null).queryKey });
  }, [autosave, client, projectId]);

  /** Saves what is on screen over what somebody else saved meanwhile. */
  const keepMine = useCallback(async () => {
    version.current = (await fetchRules(projectId)).version;
    autosave.retry();
  }, [autosave, projectId]);

  const conflict = autosave.error instanceof ApiError && autosave.error.isConflict;
  return {
    doc,
    change,
    state: autosave.state,
    flush: autosave.flush,
    retry: autosave.retry,
    reload,
    keepMine,
    conflict,
    refusal: autosave.error ? errorMessage(autosave.error) : null,
  };
}
