"use client";

import { cn } from "@/components/ui/class-names";
import { fractionDigits, NumberText } from "@/components/ui/number-text";
import { VerdictMark, type VerdictName } from "@/components/ui/verdict-mark";
import type { Finding } from "@/lib/si/rules/types";
import type { RuleSummary } from "./facts";
import { cornerWords, failsWords, findingNumber, shortUnit } from "./words";

interface Props {
  findings: readonly Finding[];
  rules: readonly RuleSummary[];
  chosen: string | null;
  /** mechanisms that a waiver covers */
  waived: ReadonlySet<string>;
  /** the same rules with the changes on trial; null: none on trial */
  after: readonly Finding[] | null;
  onChoose: (rule: string) => void;
}

/** What each rule found, worst first. Choosing one moves corner and cursor to where and when it happens. */
export function FindingsTable({ findings, rules, chosen, waived, after, onChoose }: Props) {
  const shownNumbers = [...findings, ...(after ?? [])].flatMap((f) => [
    findingNumber(f.value, f.unit),
    findingNumber(f.limit, f.unit),
    findingNumber(f.margin, f.unit, true),
  ]);
  const fraction = Math.max(0, ...shownNumbers.map((text) => (text ? fractionDigits(text) : 0)));
  const unitWidth = Math.max(0, ...findings.map((f) => shortUnit(f.unit).length));
  const number = (value: number | null, f: Finding, signed = false) => (
    <NumberText
      text={findingNumber(value, f.unit, signed)}
      unit={shortUnit(f.unit)}
      {...{ fraction, unitWidth }}
    />
  );
  return (
    <div className="relative overflow-x-auto" tabIndex={0} role="region" aria-label="Findings">
      <table className="w-full border-collapse text-sm">
        <thead>
          <tr className="text-ink-soft border-field-line border-b text-left text-xs">
            <th className="h-8 pr-2.5 font-medium">Rule</th>
            <th className="pr-2.5 font-medium">Verdict</th>
            <th className="pr-2.5 text-right font-medium">Value</th>
            <th className="pr-2.5 text-right font-medium">Limit</th>
            <th className="pr-2.5 text-right font-medium">Margin</th>
            {after ? (
              <th className="pr-2.5 text-right font-medium">With the change</th>
            ) : (
              <>
                <th className="pr-2.5 font-medium">Worst at</th>
                <th className="font-medium whitespace-nowrap">Fails at</th>
              </>
            )}
          </tr>
        </thead>
        <tbody>
          {findings.map((f) => {
            const rule = rules.find((entry) => entry.id === f.rule);
            const later = after?.find((entry) => entry.rule === f.rule);
            return (
              <tr
                key={f.rule}
                aria-current={f.rule === chosen || undefined}
                onClick={() => onChoose(f.rule)}
                className={cn(
                  "border-rule-line hover:bg-rule-line/30 cursor-pointer border-b align-middle",
                  f.rule === chosen && "bg-sheet shadow-[inset_3px_0_0_var(--copper)]",
                  shown(f, waived) === "waived" && "hatched",
                )}
              >
                <th scope="row" className="h-8 pr-2.5 pl-2 text-left font-medium whitespace-nowrap">
                  <button
                    type="button"
                    title={rule?.measures}
                    className="hover:underline"
                    aria-pressed={f.rule === chosen}
                    onClick={(event) => {
                      event.stopPropagation();
                      onChoose(f.rule);
                    }}
                  >
                    {rule?.title ?? f.rule}
                  </button>
                  {f.counts ? null : (
                    <span className="text-ink-soft font-normal" aria-label="not counted">
                      {" "}
                      †
                    </span>
                  )}
                </th>
                <td className="pr-2.5">
                  <VerdictMark verdict={shown(f, waived)} />
                </td>
                <td className="pr-2.5 text-right">{number(f.value, f)}</td>
                <td className="pr-2.5 text-right">{number(f.limit, f)}</td>
                <td className="pr-2.5 text-right">{number(f.margin, f, true)}</td>
                {after ? (
                  <td className="pr-2.5 text-right whitespace-nowrap">
                    {later ? (
                      <span className="inline-flex items-center gap-2">
                        {number(later.value, later)}
                        <VerdictMark verdict={later.verdict} />
                      </span>
                    ) : (
                      "–"
                    )}
                  </td>
                ) : (
                  <>
                    <td className="text-ink-soft pr-2.5 text-xs whitespace-nowrap" title={worstTitle(f)}>
                      {worstAt(f)}
                    </td>
                    <td className="text-ink-soft text-xs whitespace-nowrap">
                      {f.failsAt > 0 && f.ofCorners > 1 ? `${f.failsAt} of ${f.ofCorners}` : ""}
                    </td>
                  </>
                )}
              </tr>
            );
          })}
        </tbody>
      </table>
      {findings.some((f) => !f.counts) ? (
        <p className="text-ink-soft mt-1 text-xs">
          † It chooses what to look at and does not count: the simulation judges.
        </p>
      ) : null}
    </div>
  );
}

function shown(finding: Finding, waived: ReadonlySet<string>): VerdictName {
  return finding.verdict === "fail" && waived.has(finding.mechanism) ? "waived" : finding.verdict;
}

function worstAt(finding: Finding): string {
  if (finding.missing) return `missing: ${finding.missing}`;
  const corner = finding.ofCorners > 1 ? finding.corner : null;
  const edge = finding.edge && (finding.edge === "rise" ? "rising" : "falling");
  return [corner, edge].filter(Boolean).join(", ");
}

/** The same in full. */
function worstTitle(finding: Finding): string {
  const where = [finding.pin, finding.corner && cornerWords(finding.corner), failsWords(finding)];
  return where.filter(Boolean).join(", ");
}
