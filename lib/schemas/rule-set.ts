import { z } from "zod";
import { version } from "./common";
import { decimalText } from "./quantity";
import { sensibleLimits } from "./sensible-limits";

/** One rule's setting in a project; ids and units come from the catalogue in lib/si/rules. */
export const ruleSetting = z.object({
  enabled: z.boolean(),
  limit: decimalText.nullable(),
  severity: z.enum(["error", "warning", "info"]),
});
export const ruleSetDoc = z.object({
  rules: z.record(z.string().max(60), ruleSetting),
  /** Die or pin: where receivers are judged. */
  judgedAt: z.enum(["pin", "die"]).default("pin"),
});
export type RuleSetDoc = z.infer<typeof ruleSetDoc>;
export interface StoredRuleSet extends RuleSetDoc {
  version: number;
}
export const ruleSetUpdate = z.object({
  version,
  ruleSet: ruleSetDoc.superRefine(({ rules }, ctx) => sensibleLimits(rules, ctx, "rules")),
});
