"use client";

import { useStackupFields } from "@/components/stackup/stackup-fields";
import { Select } from "@/components/ui/select";
import { limitOverride, type NetClassDoc } from "@/lib/schemas/net-class";
import type { StoredRuleSet } from "@/lib/schemas/rule-set";
import { ruleCatalogue } from "@/lib/si/rules/catalogue";
import { toSi } from "@/lib/si/units";
import { useClassesDesk } from "./classes-desk";
import { LineText } from "./doc-fields";
import { checked, readNumber } from "./field-words";

type Rule = (typeof ruleCatalogue)[number];
type Limits = NetClassDoc["limits"];

interface Props {
  doc: NetClassDoc;
  onChange: (limits: Limits) => void;
  /** The override of this rule is gone, and with it what its fields could not take. */
  onDrop: (rule: string) => void;
  readOnly: boolean;
}

const CHOICES = [
  { value: "project", label: "As the project" },
  { value: "own", label: "Own limit" },
  { value: "off", label: "Off" },
];

/** Where this class's limits differ from the project's. Reviewers and owners set them; all see them. */
export function ClassLimits({ doc, onChange, onDrop, readOnly }: Props) {
  const { ruleSet, limitsWhy } = useClassesDesk();
  const own = Object.keys(doc.limits).length;
  return (
    <section aria-labelledby="class-limits">
      <h3 id="class-limits" className="text-sm font-semibold">
        Limits of this class
      </h3>
      <p className="text-ink-soft mb-1 text-xs">
        {readOnly ? limitsWhy : "Where a rule is not set here, the project’s limit holds."}
        {own === 0 && readOnly ? " This class has none of its own." : ""}
      </p>
      <ul>
        {ruleCatalogue.map((rule) => (
          <LimitRow
            key={rule.id}
            rule={rule}
            doc={doc}
            ruleSet={ruleSet}
            readOnly={readOnly}
            onChange={(override) => {
              const { [rule.id]: _gone, ...others } = doc.limits;
              if (!override || !override.enabled) onDrop(rule.id);
              onChange(override ? { ...others, [rule.id]: override } : others);
            }}
          />
        ))}
      </ul>
    </section>
  );
}

interface RowProps {
  rule: Rule;
  doc: NetClassDoc;
  ruleSet: StoredRuleSet;
  readOnly: boolean;
  onChange: (override: Limits[string] | null) => void;
}

function LimitRow({ rule, doc, ruleSet, readOnly, onChange }: RowProps) {
  const { refusals } = useStackupFields();
  const override = doc.limits[rule.id];
  const choice = !override ? "project" : override.enabled ? "own" : "off";
  const inherited = inheritedWords(rule, doc, ruleSet);
  const sign = rule.direction === "max" ? "≤" : "≥";
  const refused = refusals[`limit.${rule.id}.limit`] ?? refusals[`limit.${rule.id}.note`];
  return (
    <li className="border-rule-line/60 border-b py-1.5 text-sm">
      <div className="grid grid-cols-[minmax(0,1fr)_8.5rem] items-center gap-2">
        <span title={rule.measures}>
          {rule.title} <span className="text-ink-soft text-xs">{inherited}</span>
        </span>
        {readOnly ? (
          <span className="text-right">
            {!override
              ? ""
              : !override.enabled
                ? "off"
                : override.limit === null
                  ? "on"
                  : `${sign} ${override.limit} ${rule.unit}`}
          </span>
        ) : (
          <Select
            label={`${rule.title} in this class`}
            labelHidden
            options={CHOICES}
            value={choice}
            onChange={(event) => {
              const note = override?.note ?? "";
              if (event.target.value === "project") onChange(null);
              else if (event.target.value === "off") onChange({ enabled: false, limit: null, note });
              else onChange({ enabled: true, limit: override?.limit ?? null, note });
            }}
          />
        )}
      </div>
      {override && (!readOnly || override.note !== "") ? (
        <div className="mt-1 grid grid-cols-[8.5rem_minmax(0,1fr)] gap-2">
          {override.enabled && !readOnly ? (
            <LineText
              inTable
              alignRight
              address={`limit.${rule.id}.limit`}
              label={`Limit of ${rule.title}, ${rule.unit}`}
              placeholder={`${sign} … ${rule.unit}`}
              value={override.limit === null ? "" : `${override.limit} ${rule.unit}`}
              read={(text) => readLimit(text, rule)}
              onChange={(limit) => onChange({ ...override, limit: limit === "" ? null : limit })}
            />
          ) : (
            <span />
          )}
          <LineText
            inTable
            address={`limit.${rule.id}.note`}
            label={`Note on ${rule.title}`}
            placeholder="Why"
            value={override.note}
            read={(text) => checked(limitOverride.shape.note, text)}
            onChange={(note) => onChange({ ...override, note })}
          />
        </div>
      ) : null}
      {override?.enabled && override.limit === null && !readOnly ? (
        <p className="text-ink-soft text-xs">
          Without a number the project’s limit holds, and the rule is on.
        </p>
      ) : null}
      {refused ? (
        <p role="alert" className="text-fail text-xs">
          {refused.reason}
        </p>
      ) : null}
    </li>
  );
}

/** A number in the rule's own unit, which may be written after it. */
function readLimit(text: string, rule: Rule): string {
  const bare = text.trim().endsWith(rule.unit) ? text.trim().slice(0, -rule.unit.length) : text;
  return readNumber(bare, `${rule.defaultLimit ?? 10} ${rule.unit}`);
}

/** What holds where the class says nothing. */
function inheritedWords(rule: Rule, doc: NetClassDoc, ruleSet: StoredRuleSet): string {
  const sign = rule.direction === "max" ? "≤" : "≥";
  if (rule.id === "flight-time" && doc.flightTimeMax)
    return `${sign} ${Number((toSi(doc.flightTimeMax, "time") * 1e12).toPrecision(6))} ps by the class`;
  const set = ruleSet.rules[rule.id];
  if (!(set?.enabled ?? rule.enabledByDefault)) return "off in the project";
  const limit = set?.limit ?? (rule.defaultLimit === null ? null : String(rule.defaultLimit));
  return limit === null ? "by part or class" : `${sign} ${limit} ${rule.unit} in the project`;
}
