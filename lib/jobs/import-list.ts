import "server-only";
import { setImmediate } from "node:timers/promises";
import {
  beginImport,
  createImport,
  getImport,
  readImportText,
  saveImportSettings,
  type ImportRow,
} from "@/lib/db/import-batch";
import { findRevision, getDraft } from "@/lib/db/revision";
import { decodeText } from "@/lib/formats/delimited/decode";
import { DelimitedError } from "@/lib/formats/delimited/errors";
import { readTable, type DelimitedTable } from "@/lib/formats/delimited/table";
import { badRowsCsv } from "@/lib/formats/lists/bad-rows";
import { guessKind, guessMapping } from "@/lib/formats/lists/guess-mapping";
import { proposeLayer } from "@/lib/formats/lists/layer-names";
import { listFormats } from "@/lib/formats/lists/list-formats";
import { previewInTurns } from "@/lib/formats/lists/preview";
import type { Actor } from "@/lib/schemas/actor";
import { RefusedError } from "@/lib/schemas/errors";
import type { ImportMode, ImportPreview, ImportView, ListKind, ListMapping } from "@/lib/schemas/import-list";
import { importProgress, wakeImportWorker } from "./import-worker";
import { readDraftContext, readList, type DraftContext, type ReadList } from "./read-list";

/** Remarks sent to the page; the report holds them all. */
const SHOWN_REMARKS = 200;
const SAMPLE_ROWS = 8;

export interface ReceivedList {
  import: ImportView;
  preview: ImportPreview;
}

/** Takes in a file or a paste: decodes it, guesses its kind and its columns, and keeps it until it is confirmed. */
export async function receiveList(
  actor: Actor,
  projectId: string,
  list: { bytes: Uint8Array; fileName: string; kind?: ListKind },
): Promise<ReceivedList> {
  const draft = await getDraft(actor, projectId);
  const { text, notices } = refuseUnreadable(() => decodeText(list.bytes));
  const table = refuseUnreadable(() => readTable(text));
  const kind = list.kind ?? guessKind(table) ?? "section list";
  const context = await readDraftContext(actor, draft);
  const mapping = withLayers(table, guessMapping(table, kind, draft.projectUnit), context);
  const read = await readList(table, mapping, context);
  const importId = await createImport(actor, draft, {
    fileName: list.fileName,
    text,
    total: read.preview.total,
    settings: { mapping, notices, mode: "merge", confirmedBy: null },
  });
  return {
    import: viewOf(await getImport(actor, projectId, importId)),
    preview: previewOf(table, mapping, read, context),
  };
}

/** An import as it stands, with its preview while it can still be changed. */
export async function showImport(
  actor: Actor,
  projectId: string,
  importId: string,
): Promise<{ import: ImportView; preview: ImportPreview | null }> {
  const row = await getImport(actor, projectId, importId);
  if (row.state === "applying") wakeImportWorker();
  if (row.state !== "parsed" && row.state !== "failed") return { import: viewOf(row), preview: null };
  const { preview } = await readAgain(actor, projectId, row, row.settings.mapping);
  return { import: viewOf(row), preview };
}

/** Reads the list with other columns, units, layers, or as another kind of list. */
export async function remapImport(
  actor: Actor,
  projectId: string,
  importId: string,
  mapping: ListMapping,
): Promise<ReceivedList> {
  const row = await getImport(actor, projectId, importId);
  const again = await readAgain(actor, projectId, row, mapping);
  await saveImportSettings(
    actor,
    projectId,
    importId,
    { ...row.settings, mapping: again.mapping },
    again.read.preview.total,
  );
  return { import: viewOf(await getImport(actor, projectId, importId)), preview: again.preview };
}

/** Confirms the good rows; they are written behind the answer and appear all at once. */
export async function confirmImport(
  actor: Actor,
  projectId: string,
  importId: string,
  mode: ImportMode,
): Promise<ImportView> {
  await getDraft(actor, projectId);
  const row = await getImport(actor, projectId, importId);
  const missing = listFormats[row.kind].fields.filter(
    (field) => field.required && (row.settings.mapping.fields[field.id]?.column ?? null) === null,
  );
  if (missing.length > 0)
    throw new RefusedError(
      `No column is chosen for ${missing.map(({ label }) => label.toLowerCase()).join(" and ")}. Choose one, then import.`,
      "mapping-incomplete",
    );
  await beginImport(actor, projectId, importId, { ...row.settings, mode });
  wakeImportWorker();
  return viewOf(await getImport(actor, projectId, importId));
}

/** The rows that were not taken and those given twice, as CSV. */
export async function importProblemsCsv(actor: Actor, projectId: string, importId: string): Promise<string> {
  const { settings } = await getImport(actor, projectId, importId);
  const text = await readImportText(actor, projectId, importId);
  const table = refuseUnreadable(() => readTable(text, { delimiter: settings.mapping.delimiter }));
  return badRowsCsv(await previewInTurns(table, settings.mapping, () => setImmediate()));
}

export function viewOf(row: ImportRow): ImportView {
  return {
    id: row.id,
    kind: row.kind,
    fileName: row.fileName,
    state: row.state,
    progress: row.state === "applied" ? 1 : row.state === "applying" ? importProgress(row.id) : 0,
    total: row.total,
    mode: row.settings.mode,
    mapping: row.settings.mapping,
    notices: row.settings.notices,
    report: row.report,
    createdAt: row.createdAt,
    finishedAt: row.finishedAt,
    error: row.error,
  };
}

async function readAgain(actor: Actor, projectId: string, row: ImportRow, wanted: ListMapping) {
  const draft = await findRevision(actor, projectId);
  if (draft.id !== row.revisionId)
    throw new RefusedError(
      "The draft this list was meant for is released. Import the list into the new draft.",
      "no-draft",
    );
  const text = await readImportText(actor, projectId, row.id);
  const table = refuseUnreadable(() => readTable(text, { delimiter: wanted.delimiter }));
  const context = await readDraftContext(actor, draft);
  // Another kind or another delimiter is another table: its columns are guessed anew.
  const former = row.settings.mapping;
  const anew = wanted.kind !== former.kind || wanted.delimiter !== former.delimiter;
  const mapping = withLayers(
    table,
    anew
      ? { ...guessMapping(table, wanted.kind, draft.projectUnit), decimalComma: wanted.decimalComma }
      : wanted,
    context,
  );
  const read = await readList(table, mapping, context);
  return { mapping, read, preview: previewOf(table, mapping, read, context) };
}

/** Proposes a layer of the stackup for every layer name that is not mapped yet. */
function withLayers(table: DelimitedTable, mapping: ListMapping, context: DraftContext): ListMapping {
  const column = mapping.fields.layer?.column ?? null;
  if (column === null) return mapping;
  const layers: ListMapping["layers"] = {};
  for (const row of table.rows) {
    const name = (row.cells[column] ?? "").replace(/\s+/gu, " ");
    if (row.row <= (mapping.headerRow ?? 0) || name === "" || name.length > 60 || name in layers) continue;
    const chosen = mapping.layers[name];
    layers[name] = chosen === undefined ? proposeLayer(name, context.copper) : chosen;
  }
  return { ...mapping, layers };
}

function previewOf(
  table: DelimitedTable,
  mapping: ListMapping,
  read: ReadList,
  context: DraftContext,
): ImportPreview {
  const { preview } = read;
  const header = table.rows.find(({ row }) => row === mapping.headerRow);
  const cut = (text: string) => (text.length > 80 ? `${text.slice(0, 80)}…` : text);
  return {
    columns: Array.from(
      { length: table.columns },
      (_, index) => cut(header?.cells[index] ?? "") || `Column ${letter(index)}`,
    ),
    sample: table.rows
      .filter(({ row }) => row > (mapping.headerRow ?? 0))
      .slice(0, SAMPLE_ROWS)
      .map(({ row, cells }) => ({ row, cells: cells.map(cut) })),
    fields: listFormats[mapping.kind].fields.map(({ id, label, required, kind }) => ({
      id,
      label,
      required,
      isLength: kind === "length",
    })),
    missingFields: preview.missingFields,
    total: preview.total,
    good: preview.good.length,
    badRows: preview.badRows,
    blankRows: preview.blankRows,
    skippedRows: preview.skippedRows,
    problems: preview.problems.slice(0, SHOWN_REMARKS),
    problemCount: preview.problems.length,
    duplicates: preview.duplicates.slice(0, SHOWN_REMARKS),
    duplicateCount: preview.duplicates.length,
    warnings: read.warnings.slice(0, SHOWN_REMARKS),
    warningCount: read.warnings.length,
    layers: preview.layers.map((layer) => ({ ...layer, lineageId: mapping.layers[layer.name] ?? null })),
    copper: context.copper,
    unknownClasses: read.unknownClasses,
    effect: read.effect,
  };
}

/** A, B, … Z, AA as spreadsheets name columns. */
function letter(index: number): string {
  return index < 26
    ? String.fromCharCode(65 + index)
    : letter(Math.floor(index / 26) - 1) + letter(index % 26);
}

function refuseUnreadable<T>(read: () => T): T {
  try {
    return read();
  } catch (error) {
    if (!(error instanceof DelimitedError)) throw error;
    throw new RefusedError(
      error.message,
      "unreadable",
      { file: error.message },
      { row: error.row, kind: error.code },
    );
  }
}
