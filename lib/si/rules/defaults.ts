import { ruleCatalogue } from "./catalogue";

export interface DefaultRuleSetting {
  enabled: boolean;
  /** decimal text in the rule's unit; null: the class or the part sets it */
  limit: string | null;
  severity: "error" | "warning" | "info";
}

/** The settings of a new project. */
export function defaultRuleSet(): { rules: Record<string, DefaultRuleSetting>; judgedAt: "pin" | "die" } {
  const rules: Record<string, DefaultRuleSetting> = {};
  for (const rule of ruleCatalogue)
    rules[rule.id] = {
      enabled: rule.enabledByDefault,
      limit: rule.defaultLimit === null ? null : String(Number(rule.defaultLimit.toPrecision(4))),
      severity: rule.severity,
    };
  return { rules, judgedAt: "pin" };
}
