import "server-only";
import {
  appliedStatements,
  failImport,
  nextConfirmedImport,
  readImportText,
  type ClaimedImport,
} from "@/lib/db/import-batch";
import { applyLayoutLists } from "@/lib/db/layout-lists";
import { log } from "@/lib/db/log";
import { getDraft } from "@/lib/db/revision";
import { readTable } from "@/lib/formats/delimited/table";
import { ConflictError, NotFoundError, RefusedError } from "@/lib/schemas/errors";
import { keepPinRoles, readDraftContext, readList } from "./read-list";

const shared = globalThis as typeof globalThis & {
  __ringfenceImports?: { active: Promise<void> | null; again: boolean; progress: Map<string, number> };
};
const loop = () =>
  (shared.__ringfenceImports ??= { active: null, again: false, progress: new Map<string, number>() });

/** Share of the whole that reading takes; the rest is checking and writing. */
const READING = 0.3;

/**
 * Applies confirmed imports, one after the other, until none is left. Called after each confirmation and at start: an
 * import that a crash interrupted is read and written anew from its beginning, since nothing of it was written.
 */
export function wakeImportWorker(): void {
  const state = loop();
  state.again = true;
  state.active ??= work()
    .catch((error: unknown) => log().error({ err: error }, "Imports stopped; the next one wakes them."))
    .finally(() => {
      state.active = null;
      if (state.again) wakeImportWorker();
    });
}

/** Settles when nothing is being imported; for scripts and tests. */
export async function importWorkerIdle(): Promise<void> {
  while (loop().active) await loop().active;
}

/** 0 to 1 of an import that this process applies. */
export function importProgress(importId: string): number {
  return loop().progress.get(importId) ?? 0;
}

async function work(): Promise<void> {
  const state = loop();
  while (state.again) {
    state.again = false;
    for (let claimed = await nextConfirmedImport(); claimed; claimed = await nextConfirmedImport()) {
      await applyOne(claimed);
      state.progress.delete(claimed.row.id);
    }
  }
}

async function applyOne({ row, projectId, actor }: ClaimedImport): Promise<void> {
  const progress = (share: number) => loop().progress.set(row.id, share);
  try {
    if (!actor)
      throw new RefusedError(
        "Whoever confirmed this list is no longer in the team. Confirm it again.",
        "no-actor",
      );
    const draft = await getDraft(actor, projectId);
    if (draft.id !== row.revisionId)
      throw new RefusedError(
        "The draft this list was meant for is released. Import the list into the new draft.",
        "no-draft",
      );
    progress(0.02);
    const { mapping, mode } = row.settings;
    const table = readTable(await readImportText(actor, projectId, row.id), { delimiter: mapping.delimiter });
    const context = await readDraftContext(actor, draft);
    const read = await readList(table, mapping, context);
    progress(READING);
    const { preview, effect } = read;
    const report = {
      total: preview.total,
      good: preview.good.length,
      badRows: preview.badRows,
      duplicates: preview.duplicates.length,
      added: effect.added,
      updated: effect.present,
      removed: mode === "replace" ? effect.absent : 0,
      incomplete: effect.incomplete,
    };
    await applyLayoutLists(actor, projectId, await keepPinRoles(actor, draft, read.lists), {
      mode,
      summary: `Imported ${row.kind} ${row.fileName}: ${report.good} of ${report.total} rows`.slice(0, 300),
      also: await appliedStatements(row.id, report),
      onProgress: (share) => progress(READING + (0.95 - READING) * share),
    });
  } catch (error) {
    await failImport(row.id, sentenceOf(error));
  }
}

function sentenceOf(error: unknown): string {
  if (error instanceof RefusedError || error instanceof ConflictError || error instanceof NotFoundError)
    return error.message;
  log().error({ err: error }, "An import failed");
  return "The server failed at this import; nothing of it was written. Try again; if it fails once more, tell whoever runs it.";
}
