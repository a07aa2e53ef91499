import { z } from "zod";

/** The engine against published and independently computed values; made from the test data at build. */

const compared = z.object({
  /** "Z₀", "effective Dk", "RX1, largest difference" */
  quantity: z.string(),
  unit: z.string(),
  reference: z.number().nullable(),
  engine: z.number().nullable(),
  /** as a share; what of, says the chapter */
  error: z.number(),
});

const group = z.object({
  /** a structure, a formula, a kind of network */
  title: z.string(),
  /** numbers compared */
  values: z.number().int(),
  median: z.number(),
  worst: z.number(),
  /** what the engine has to hold, as a share; null where the figure only informs */
  allowed: z.number().nullable(),
  cases: z.array(z.object({ id: z.string(), values: z.number().int(), worst: compared })),
});

const chapter = z.object({
  id: z.string(),
  title: z.string(),
  /** what is compared with what, and what the errors are a share of */
  about: z.string(),
  /** where the values come from, and how exact they are themselves */
  source: z.string(),
  groups: z.array(group),
});

export const validationReportSchema = z.object({ engine: z.string(), chapters: z.array(chapter) });

export type ValidationReport = z.infer<typeof validationReportSchema>;
export type ValidationChapter = z.infer<typeof chapter>;
export type ValidationGroup = z.infer<typeof group>;
export type ValidationCompared = z.infer<typeof compared>;
