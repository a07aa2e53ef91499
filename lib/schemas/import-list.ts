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
