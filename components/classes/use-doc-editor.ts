"use client";

import { useCallback, useEffect, useMemo, useRef, useState } from "react";
import { useAutosave } from "@/components/stackup/use-autosave";

/** A text that a field could not take: it stays in the field until it is mended or given up. */
export type Refusals = Readonly<Record<string, { text: string; reason: string }>>;

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
  const [doc, setDoc] = useState<Doc>(() => docOf(stored));
  const [refusals, setRefusals] = useState<Refusals>({});
  const version = useRef(stored.version);
  /** What the server has, as far as is known here. */
  const base = useRef(doc);
  const content = useMemo(() => JSON.stringify(doc), [doc]);
  const issues = useMemo(
    () => [...Object.values(refusals).map(({ reason }) => reason), ...problems(doc)],
    [refusals, problems, doc],
  );

  const autosave = useAutosave({
    content,
    blocked: !readOnly && issues.length > 0,
    save: async () => {
      const sent = doc;
      const saved = await save(version.current, sent);
      version.current = saved.version;
      base.current = sent;
    },
  });
  const { settle, flush } = autosave;

  /** Puts what the server has in place of what is here. */
  const take = useCallback(
    (current: Stored) => {
      version.current = current.version;
      const next = docOf(current);
      base.current = next;
      settle(JSON.stringify(next));
      setDoc(next);
      setRefusals({});
    },
    [docOf, settle],
  );
  /** Puts what was changed here over what somebody else saved meanwhile; what only they changed stays theirs. */
  const keepMine = useCallback(
    (current: Stored) => {
      version.current = current.version;
      const theirs = docOf(current);
      const before = base.current;
      base.current = theirs;
      settle(JSON.stringify(theirs));
      setDoc((mine) => merged(before, mine, theirs));
    },
    [docOf, settle],
  );
  const change = useCallback(
    (next: Partial<Doc> | ((doc: Doc) => Doc)) =>
      setDoc((present) => (typeof next === "function" ? next(present) : { ...present, ...next })),
    [],
  );
  const refuse = useCallback(
    (address: string, text: string, reason: string) =>
      setRefusals((present) => ({ ...present, [address]: { text, reason } })),
    [],
  );
  const accept = useCallback(
    (address: string) =>
      setRefusals((present) => {
        if (!(address in present)) return present;
        const { [address]: _gone, ...rest } = present;
        return rest;
      }),
    [],
  );
  /** Forgets the refused texts of fields that are no longer there. */
  const forget = useCallback(
    (gone: (address: string) => boolean) =>
      setRefusals((present) =>
        Object.fromEntries(Object.entries(present).filter(([address]) => !gone(address))),
      ),
    [],
  );

  useEffect(() => () => void flush(), [flush]);

  return { doc, change, refusals, refuse, accept, forget, issues, saving: autosave, take, keepMine };
}

function merged<Doc extends object>(before: Doc, mine: Doc, theirs: Doc): Doc {
  const next = { ...theirs };
  for (const key of Object.keys(mine) as (keyof Doc)[])
    if (JSON.stringify(mine[key]) !== JSON.stringify(before[key])) next[key] = mine[key];
  return next;
}
