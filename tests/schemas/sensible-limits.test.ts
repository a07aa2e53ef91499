import { describe, expect, it } from "vitest";
import { netClassUpdate } from "@/lib/schemas/net-class";
import { netsPatch } from "@/lib/schemas/project-query";
import { ruleSetUpdate } from "@/lib/schemas/rule-set";
import { defaultRuleSet } from "@/lib/si/rules";
import { aClass } from "../support/documents";

const setting = (limit: string | null) => ({ enabled: true, limit, severity: "error" });
const update = (rules: Record<string, unknown>) =>
  ruleSetUpdate.safeParse({ version: 0, ruleSet: { rules, judgedAt: "pin" } });

// What a limit can mean is judged by sense, no source.
describe("limits that are sent", () => {
  it("are taken as a new project has them", () => {
    expect(update(defaultRuleSet().rules).success).toBe(true);
    expect(update({ "above-rail": setting(null), ringback: setting("-50") }).success).toBe(true);
  });

  it.each([
    ["above-rail", "-1", "Above rail: a limit of -1 V makes no sense. Write one from 0 to 10 V."],
    ["overshoot", "1e9", "Overshoot, relative: a limit of 1e9 % makes no sense. Write one from 0 to 200 %."],
    ["settling", "0", "Settling: a limit of 0 % of bit makes no sense. Write one above 0 to 1000 % of bit."],
    ["nonsense", "1", "There is no rule 'nonsense'."],
  ])("are refused in a rule set, a class and a net: %s %s", (rule, limit, message) => {
    const override = { enabled: true, limit, note: "" };
    const answers = [
      update({ [rule]: setting(limit) }),
      netClassUpdate.safeParse({ version: 0, netClass: aClass("Data", { limits: { [rule]: override } }) }),
      netsPatch.safeParse({
        nets: [{ id: "0190a000-0000-7000-8000-000000000001", version: 0 }],
        change: { limits: { [rule]: override } },
      }),
    ];
    for (const { error } of answers)
      expect(error?.issues.map((issue) => issue.message)[0]).toContain(message);
  });
});
