"use client";

import { Checkbox } from "@/components/ui/checkbox";
import { cn } from "@/components/ui/class-names";
import { Select } from "@/components/ui/select";
import { unitText } from "@/components/runs/measure";
import type { RuleSetDoc } from "@/lib/schemas/rule-set";
import { defaultRuleSet, type RuleDefinition, ruleCatalogue } from "@/lib/si/rules";
import { LimitField } from "./limit-field";

interface Props {
  doc: RuleSetDoc;
  readOnly: boolean;
  onChange: (doc: RuleSetDoc) => void;
}

type Setting = RuleSetDoc["rules"][string];

const DEFAULTS = defaultRuleSet().rules;
const SEVERITIES = ["error", "warning", "info"] as const;
const HEAD =
  "border-field-line bg-sheet text-ink-soft sticky top-0 z-10 h-8 border-b px-2 text-left font-medium";
const CELL = "border-rule-line/60 border-b px-2 py-1.5 align-top";

/** Every rule of the catalogue: what it measures, its limit in its own unit, how grave it is, whether it counts. */
export function RulesTable({ doc, readOnly, onChange }: Props) {
  const set = (id: string, setting: Setting) => onChange({ ...doc, rules: { ...doc.rules, [id]: setting } });
  return (
    <div
      className="border-rule-line bg-sheet relative overflow-x-auto border-y"
      tabIndex={0}
      role="region"
      aria-label="Rules and their limits"
    >
      <table aria-label="Rules" className="w-full min-w-[860px] border-separate border-spacing-0 text-sm">
        <thead>
          <tr>
            <th scope="col" className={cn(HEAD, "w-14")}>
              On
            </th>
            <th scope="col" className={HEAD}>
              Rule
            </th>
            <th scope="col" className={cn(HEAD, "w-52")}>
              Limit
            </th>
            <th scope="col" className={cn(HEAD, "w-28")}>
              Near within
            </th>
            <th scope="col" className={cn(HEAD, "w-32")}>
              Severity
            </th>
            <th scope="col" className={cn(HEAD, "w-[26%]")}>
              Where the usual limit is from
            </th>
          </tr>
        </thead>
        <tbody>
          {ruleCatalogue.map((rule) => {
            const setting = doc.rules[rule.id] ?? DEFAULTS[rule.id];
            if (!setting) return null;
            return (
              <tr key={rule.id} className={setting.enabled ? undefined : "text-ink-soft"}>
                <td className={CELL}>
                  <Checkbox
                    label={`Judge ${rule.title}`}
                    labelHidden
                    checked={setting.enabled}
                    disabled={readOnly}
                    onCheckedChange={(enabled) => set(rule.id, { ...setting, enabled })}
                  />
                </td>
                <th scope="row" className={cn(CELL, "text-left font-normal")}>
                  <span className="font-medium">
                    {rule.title}
                    {rule.selector ? <span title="A selector"> ◇</span> : null}
                  </span>
                  <span className="text-ink-soft block max-w-[52ch]">{rule.measures}</span>
                </th>
                <td className={CELL}>
                  <LimitField
                    rule={rule}
                    limit={setting.limit}
                    disabled={readOnly || !setting.enabled}
                    onChange={(limit) => set(rule.id, { ...setting, limit })}
                  />
                  <Usual rule={rule} limit={setting.limit} />
                </td>
                <td className={cn(CELL, "whitespace-nowrap")}>{nearText(rule)}</td>
                <td className={CELL}>
                  <Select
                    label={`Severity of ${rule.title}`}
                    labelHidden
                    className="h-7"
                    disabled={readOnly || !setting.enabled}
                    options={SEVERITIES.map((value) => ({ value, label: value }))}
                    value={setting.severity}
                    onChange={(event) => {
                      const severity = SEVERITIES.find((name) => name === event.target.value);
                      if (severity) set(rule.id, { ...setting, severity });
                    }}
                  />
                </td>
                <td className={cn(CELL, "text-ink-soft text-xs")}>{rule.source}</td>
              </tr>
            );
          })}
        </tbody>
      </table>
    </div>
  );
}

/** What a new project would have, where this one differs. */
function Usual({ rule, limit }: { rule: RuleDefinition; limit: string | null }) {
  const usual = DEFAULTS[rule.id]?.limit ?? null;
  const said =
    limit === null
      ? "the class or the part sets it"
      : usual === limit
        ? null
        : usual === null
          ? "usually set by the class"
          : `usually ${usual} ${unitText(rule.unit)}`;
  return said ? <span className="text-ink-soft block pl-[18px] text-xs">{said}</span> : null;
}

function nearText(rule: RuleDefinition): string {
  if (!rule.near) return "–";
  return "absolute" in rule.near
    ? `${rule.near.absolute}\u2009${unitText(rule.unit)}`
    : `${Math.round(100 * rule.near.share)}\u2009% of the limit`;
}
