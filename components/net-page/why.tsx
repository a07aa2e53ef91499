import { VerdictMark } from "@/components/ui/verdict-mark";
import type { Finding } from "@/lib/si/rules/types";
import type { RuleSummary } from "./facts";
import { cornerWords, failsWords, findingText } from "./words";

interface Props {
  finding: Finding | null;
  rule: RuleSummary | null;
  waived: boolean;
  /** changes are on trial: this is what they make of it */
  trying: boolean;
}

/** The finding that is looked at, in one line of numbers and one sentence of cause. */
export function Why({ finding, rule, waived, trying }: Props) {
  if (!finding || !rule) return null;
  const limit = finding.limit === null ? null : `limit ${findingText(finding.limit, finding.unit)}`;
  const corner = finding.corner && finding.ofCorners > 1 ? `worst with ${cornerWords(finding.corner)}` : null;
  const numbers = [limit, failsWords(finding) || null, corner].filter((entry) => entry !== null);
  return (
    <section aria-label="Why" aria-live="polite" className="border-copper border-l-[3px] py-0.5 pl-3">
      <p className="flex flex-wrap items-baseline gap-x-3">
        <VerdictMark verdict={waived && finding.verdict === "fail" ? "waived" : finding.verdict} />
        <strong className="font-semibold">
          {trying ? `With the change: ${rule.title.toLowerCase()}` : rule.title}
          {finding.value === null ? null : ` ${findingText(finding.value, finding.unit)}`}
        </strong>
        <span className="text-ink-soft text-sm">{numbers.join(" · ")}</span>
      </p>
      <p className="max-w-[110ch]">
        {finding.cause ??
          (finding.verdict === "pass" ? `${rule.measures} It stays inside its limit.` : rule.measures)}
        {finding.restsOnAssumed ? <span className="text-near"> Rests on an assumed model.</span> : null}
      </p>
    </section>
  );
}
