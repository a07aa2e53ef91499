import { z } from "zod";
import { id } from "./common";

export const listKinds = ["net list", "section list", "parts list", "neighbour list"] as const;
export const listKind = z.enum(listKinds);
export type ListKind = z.infer<typeof listKind>;

/** Which column holds a field, and the unit of its bare numbers. */
export const fieldMapping = z.object({
  column: z.number().int().min(0).max(255).nullable(),
  unit: z.string().trim().max(12).nullable().default(null),
});

/** How a list is read; guessed from it, edited by the person. */
export const listMapping = z.object({
  kind: listKind,
  delimiter: z.enum([",", ";", "\t"]),
  decimalComma: z.boolean(),
  /** Row that names the columns, as a spreadsheet counts; null: there is none. */
  headerRow: z.number().int().min(1).max(1000).nullable(),
  fields: z.record(z.string().max(30), fieldMapping),
  /** Layer name in the list → layer of the stackup; null: left open. */
  layers: z.record(z.string().max(60), id.nullable()).default({}),
});
export type ListMapping = z.infer<typeof listMapping>;

export const importModes = ["merge", "replace"] as const;
export const importMode = z.enum(importModes);
export type ImportMode = z.infer<typeof importMode>;

/** What an import remembers beside its text: how it is read, and who confirmed what. */
export const importSettings = z.object({
  mapping: listMapping,
  /** How the file was read, in sentences for the person. */
  notices: z.array(z.string().max(300)).max(20).default([]),
  mode: importMode.default("merge"),
  confirmedBy: z.string().max(80).nullable().default(null),
});
export type ImportSettings = z.infer<typeof importSettings>;

export const importStates = ["parsed", "applying", "applied", "cancelled", "failed"] as const;
export type ImportState = (typeof importStates)[number];

/** What became of a list. */
export const importReport = z.object({
  total: z.number().int(),
  good: z.number().int(),
  badRows: z.number().int(),
  duplicates: z.number().int(),
  added: z.number().int(),
  updated: z.number().int(),
  removed: z.number().int(),
  /** Nets that came in as incomplete routes. */
  incomplete: z.number().int(),
});
export type ImportReport = z.infer<typeof importReport>;

export interface ImportView {
  id: string;
  kind: ListKind;
  fileName: string;
  state: ImportState;
  /** 0 to 1 while it is applied. */
  progress: number;
  total: number;
  mode: ImportMode;
  mapping: ListMapping;
  notices: string[];
  report: ImportReport | null;
  createdAt: number;
  finishedAt: number | null;
  error: string | null;
}

export interface ImportRemark {
  row: number;
  column: string;
  value: string;
  reason: string;
}

/** A list as it would come in; long lists of remarks are cut, the counts are whole. */
export interface ImportPreview {
  /** Names of the columns: the header's, else their letters. */
  columns: string[];
  sample: { row: number; cells: string[] }[];
  fields: { id: string; label: string; required: boolean; isLength: boolean }[];
  missingFields: string[];
  total: number;
  good: number;
  badRows: number;
  blankRows: number;
  skippedRows: number;
  problems: ImportRemark[];
  problemCount: number;
  duplicates: { row: number; firstRow: number; text: string }[];
  duplicateCount: number;
  warnings: ImportRemark[];
  warningCount: number;
  layers: { name: string; rows: number; lineageId: string | null }[];
  copper: { lineageId: string; name: string }[];
  unknownClasses: { name: string; rows: number }[];
  /** Nets, parts or neighbour rows: how many are new, how many there already, how many a replacement would remove. */
  effect: { things: string; added: number; present: number; absent: number; incomplete: number };
}

export const importUpload = z.object({
  name: z.string().trim().min(1).max(200).default("Pasted list"),
  kind: listKind.optional(),
});
export const importConfirm = z.object({ mode: importMode });
export const importMappingUpdate = z.object({ mapping: listMapping });
