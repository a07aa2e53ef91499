import { VerdictMark } from "@/components/ui/verdict-mark";
import type { FindingView } from "@/lib/client/runs";
import { numberText } from "@/lib/drawings/number-text";
import { measureText } from "./measure";
import { failsText } from "./problem-columns";
import { ruleTitle } from "./rule-title";

/** The findings that one cause makes: what was measured against which limit, where and when. */
export function FindingList({ findings }: { findings: readonly FindingView[] }) {
  return (
    <ul className="flex flex-col gap-3">
      {findings.map((finding) => (
        <li key={finding.id} className="border-rule-line border-t pt-2 text-sm">
          <div className="flex items-baseline justify-between gap-3">
            <span className="font-medium">
              {ruleTitle(finding.rule)}
              {finding.counts ? null : <span className="text-ink-soft font-normal"> ◇ does not count</span>}
            </span>
            <VerdictMark verdict={finding.verdict} />
          </div>
          {finding.verdict === "no data" ? (
            <p className="text-ink-soft">
              {finding.missing
                ? `Missing: ${finding.missing}.`
                : (finding.cause ?? "It could not be judged.")}
            </p>
          ) : (
            <dl className="mt-1 grid grid-cols-[auto_1fr] gap-x-3 gap-y-0.5">
              <Fact name="value">{measureText(finding.value, finding.unit)}</Fact>
              <Fact name="limit">
                {measureText(finding.limit, finding.unit)}
                {finding.limitOrigin ? (
                  <span className="text-ink-soft"> from the {finding.limitOrigin}</span>
                ) : null}
              </Fact>
              <Fact name="margin">{measureText(finding.margin, finding.unit, { signed: true })}</Fact>
              {finding.corner ? <Fact name="worst corner">{finding.corner}</Fact> : null}
              {failsText(finding) ? <Fact name="fails at">{failsText(finding)}</Fact> : null}
              {finding.pin ? (
                <Fact name="at">
                  <span className="font-mono text-xs">{finding.pin}</span>
                  {finding.driver ? (
                    <>
                      , driven by <span className="font-mono text-xs">{finding.driver}</span>
                    </>
                  ) : null}
                  {finding.edge ? `, ${finding.edge === "rise" ? "rising" : "falling"} edge` : ""}
                </Fact>
              ) : null}
              {finding.time_s !== null ? (
                <Fact name="when">{numberText(finding.time_s * 1e9, 2)}&thinsp;ns after the edge starts</Fact>
              ) : null}
            </dl>
          )}
          {finding.cause && finding.verdict !== "no data" ? <p className="mt-1">{finding.cause}</p> : null}
          {finding.restsOnAssumed ? (
            <p className="text-near mt-1 text-xs">Rests on an assumed input.</p>
          ) : null}
        </li>
      ))}
    </ul>
  );
}

function Fact({ name, children }: { name: string; children: React.ReactNode }) {
  return (
    <>
      <dt className="text-ink-soft">{name}</dt>
      <dd>{children}</dd>
    </>
  );
}
