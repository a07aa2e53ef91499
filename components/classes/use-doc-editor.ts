"use client";

import { useCallback, useMemo, useRef, useState } from "react";
import { useAutosave } from "@/components/stackup/use-autosave";
import { useLeaveGuard } from "@/components/stackup/use-leave-guard";
import { toast } from "@/components/ui/toast";

/** A text that a field could not take: it stays in the field until it is mended or given up. */
export type Refusals = Readonly<Record<string, { text: string; reason: string }>>;

interface State<Doc> {
  doc: Doc;
  refusals: Refusals;
}

interface Options<Doc extends object, Stored extends { version: number }> {
  stored: Stored;
  docOf: (stored: Stored) => Doc;
  /** Why it cannot be saved as it is, beyond texts that could not be read; one sentence each. */
  problems: (doc: Doc) => readonly string[];
  /** @throws ApiError, a conflict where it was changed since `version` */
  save: (version: number, doc: Doc) => Promise<Stored>;
  readOnly: boolean;
}

export type DocEditor<Doc extends object, Stored extends { version: number }> = ReturnType<
  typeof useDocEditor<Doc, Stored>
>;

/**
 * A document under edit: every change is on screen at once and saved a moment later, unless something is wrong.
 * Leaving it saves what waits.
 */
export function useDocEditor<Doc extends object, Stored extends { version: number }>(
  options: Options<Doc, Stored>,
) {
  const { stored, docOf, problems, save, readOnly } = options;
  const [{ doc, refusals }, setState] = useState<State<Doc>>(() => ({ doc: docOf(stored), refusals: {} }));
  /** The state ahead of its drawing: what is saved as the page goes away includes the last text. */
  const now = useRef<State<Doc>>({ doc, refusals });
  const dispatch = useCallback((act: (present: State<Doc>) => Partial<State<Doc>>) => {
    now.current = { ...now.current, ...act(now.current) };
    setState(now.current);
  }, []);
  const version = useRef(stored.version);
  /** What the server has, as far as is known here. */
  const base = useRef(doc);
  const content = useMemo(() => JSON.stringify(doc), [doc]);
  const issuesOf = useCallback(
    (present: State<Doc>) => [
      ...Object.values(present.refusals).map(({ reason }) => reason),
      ...problems(present.doc),
    ],
    [problems],
  );
  const issues = useMemo(() => issuesOf({ doc, refusals }), [issuesOf, doc, refusals]);
  const why = useCallback(() => issuesOf(now.current)[0] ?? null, [issuesOf]);

  const autosave = useAutosave({
    content,
    blocked: !readOnly && issues.length > 0,
    read: () => ({
      content: JSON.stringify(now.current.doc),
      blocked: !readOnly && issuesOf(now.current).length > 0,
    }),
    save: async () => {
      const sent = now.current.doc;
      const saved = await save(version.current, sent);
      version.current = saved.version;
      base.current = sent;
    },
    left: (saved) =>
      void saved.then((done) => {
        if (!done) toast.error(`The last edits were not saved. ${why() ?? "The server did not take them."}`);
      }),
  });
  const { settle } = autosave;
  const giveUp = useCallback(() => dispatch(() => ({ refusals: {} })), [dispatch]);
  useLeaveGuard({ unsaved: autosave.unsaved, flush: autosave.flush, why, giveUp });

  /** Puts what the server has in place of what is here. */
  const take = useCallback(
    (current: Stored) => {
      version.current = current.version;
      const next = docOf(current);
      base.current = next;
      settle(JSON.stringify(next));
      dispatch(() => ({ doc: next, refusals: {} }));
    },
    [docOf, settle, dispatch],
  );
  /** Puts what was changed here over what somebody else saved meanwhile; what only they changed stays theirs. */
  const keepMine = useCallback(
    (current: Stored) => {
      version.current = current.version;
      const theirs = docOf(current);
      const before = base.current;
      base.current = theirs;
      settle(JSON.stringify(theirs));
      dispatch(({ doc: mine }) => ({ doc: merged(before, mine, theirs) }));
    },
    [docOf, settle, dispatch],
  );
  const change = useCallback(
    (next: Partial<Doc> | ((doc: Doc) => Doc)) =>
      dispatch(({ doc: present }) => ({
        doc: typeof next === "function" ? next(present) : { ...present, ...next },
      })),
    [dispatch],
  );
  const refuse = useCallback(
    (address: string, text: string, reason: string) =>
      dispatch((present) => ({ refusals: { ...present.refusals, [address]: { text, reason } } })),
    [dispatch],
  );
  /** Forgets the refused texts of fields that are no longer there. */
  const forget = useCallback(
    (gone: (address: string) => boolean) =>
      dispatch((present) =>
        Object.keys(present.refusals).some(gone)
          ? {
              refusals: Object.fromEntries(
                Object.entries(present.refusals).filter(([address]) => !gone(address)),
              ),
            }
          : {},
      ),
    [dispatch],
  );
  const accept = useCallback((address: string) => forget((refused) => refused === address), [forget]);

  return { doc, change, refusals, refuse, accept, forget, issues, saving: autosave, take, keepMine };
}

function merged<Doc extends object>(before: Doc, mine: Doc, theirs: Doc): Doc {
  const next = { ...theirs };
  for (const key of Object.keys(mine) as (keyof Doc)[])
    if (JSON.stringify(mine[key]) !== JSON.stringify(before[key])) next[key] = mine[key];
  return next;
}
