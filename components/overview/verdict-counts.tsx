import type { Route } from "next";
import Link from "next/link";
import { TimeText } from "@/components/shell/time-text";
import { VerdictMark, type VerdictName } from "@/components/ui/verdict-mark";
import type { OverviewRun } from "@/lib/schemas/project-overview";

const ORDER: readonly VerdictName[] = ["fail", "near", "no data", "pass"];

interface Props {
  run: OverviewRun;
  /** problems that a waiver covers; they keep their verdict */
  waived: number;
  base: string;
}

/** The paths of the newest finished run by verdict, and whether it still speaks of the revision as it is. */
export function VerdictCounts({ run, waived, base }: Props) {
  const paths = ORDER.reduce((sum, verdict) => sum + (run.counts?.[verdict] ?? 0), 0);
  const judged = paths - (run.counts?.["no data"] ?? 0);
  return (
    <section aria-labelledby="verdicts">
      <h2 id="verdicts" className="mb-2 text-lg font-semibold">
        Verdicts
      </h2>
      <p className="text-ink-soft mb-3 text-sm">
        <Link href={`${base}/runs/${run.id}` as Route} className="text-violet underline underline-offset-2">
          Run {run.number}
        </Link>{" "}
        judged {judged === paths ? "" : `${judged.toLocaleString("en")} of `}
        {paths.toLocaleString("en")} signal {paths === 1 ? "path" : "paths"}
        {run.finishedAt ? (
          <>
            , <TimeText at={run.finishedAt} />
          </>
        ) : null}
        .{" "}
        {run.current ? null : (
          <span className="text-near">
            The board was edited since: these verdicts are of its former state.
          </span>
        )}
      </p>
      <dl className="border-rule-line bg-sheet grid grid-cols-2 border-y sm:grid-cols-4">
        {ORDER.map((verdict) => (
          <div key={verdict} className="flex flex-col gap-1 px-3 py-3">
            <dt>
              <VerdictMark verdict={verdict} />
            </dt>
            <dd className="text-xl tabular-nums">{(run.counts?.[verdict] ?? 0).toLocaleString("en")}</dd>
          </div>
        ))}
      </dl>
      {waived > 0 ? (
        <p className="mt-2 text-sm">
          <VerdictMark verdict="waived" count={waived} />{" "}
          <span className="text-ink-soft">
            {waived === 1 ? "problem, counted" : "problems, counted"} above by its verdict
          </span>
        </p>
      ) : null}
    </section>
  );
}
