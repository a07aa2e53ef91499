import { z } from "zod";
import { proseText, resultKey, version } from "./common";

export const flagStates = ["open", "resolved"] as const;
export const flagSubjects = ["problem", "path", "layer"] as const;

/** What a flag or waiver is about; keys survive revisions (lineage ids). */
export const subject = z.object({
  kind: z.enum(flagSubjects),
  /** path or layer lineage id, or a controlled line's: "line", its class's and its layer's */
  lineageId: resultKey,
  /** problem only: its mechanism */
  mechanism: z.string().max(60).nullable().default(null),
});
export const flagInput = z.object({
  subject,
  comment: proseText(4000),
  assigneeUserId: z.string().max(60).nullable().default(null),
});
export const flagComment = z.object({ comment: proseText(4000) });
export const flagUpdate = z.object({
  version,
  state: z.enum(flagStates).optional(),
  assigneeUserId: z.string().max(60).nullable().optional(),
});

const dayMs = 86_400_000;
export const waiverInput = z.object({
  subject: subject.refine((s) => s.kind === "problem" && s.mechanism, "A waiver is about one problem."),
  reason: proseText(2000).refine((t) => t.length >= 10, "Give the reason in a sentence."),
  /** ms UTC; at most two years ahead */
  expiresAt: z.number().int(),
});
export const maxWaiverMs = 730 * dayMs;
/** What a path lacks that no enabled rule speaks of: it has no data, and no problem says why. */
export const noRuleJudges = "a rule that judges the path";
const missingName = z.string().min(1).max(300);
export const noDataAcceptanceInput = z.object({
  /** the missing input that groups the findings, as the run names it, or several of them */
  missing: z.union([missingName, z.array(missingName).min(1).max(2000)]),
  reason: proseText(2000).refine((t) => t.length >= 10, "Give the reason in a sentence."),
});
export type Subject = z.infer<typeof subject>;
export type WaiverState = "active" | "carried" | "look again" | "void" | "expired" | "revoked";
