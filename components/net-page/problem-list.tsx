"use client";

import { Flag } from "lucide-react";
import dynamic from "next/dynamic";
import { useState } from "react";
import { Badge } from "@/components/ui/badge";
import { Button } from "@/components/ui/button";
import { VerdictMark } from "@/components/ui/verdict-mark";
import type { NetFacts, ProblemFacts, WaiverFacts } from "./facts";
import { Refusal } from "./refusal";
import { FlagThread } from "./flag-thread";
import { useReview } from "./use-review";
import { dayText } from "./words";

const FlagDialog = dynamic(() => import("./flag-dialog").then((m) => m.FlagDialog), { ssr: false });
const WaiveDialog = dynamic(() => import("./waive-dialog").then((m) => m.WaiveDialog), { ssr: false });

type Asking = { act: "flag"; problem: ProblemFacts | null } | { act: "waive"; problem: ProblemFacts } | null;

/** The problems of a path: what is flagged, waived, said about each, and the acts of a review. */
export function ProblemList({ facts, onChoose }: { facts: NetFacts; onChoose: (rule: string) => void }) {
  const [asking, setAsking] = useState<Asking>(null);
  return (
    <section aria-labelledby="problems" className="border-rule-line border-t pt-3">
      <div className="flex flex-wrap items-center gap-x-4">
        <h2 id="problems" className="text-base font-semibold">
          Review
        </h2>
        {facts.may.flag ? (
          <Button
            variant="quiet"
            className="print:hidden"
            onClick={() => setAsking({ act: "flag", problem: null })}
          >
            <Flag size={14} aria-hidden />
            Flag the path
          </Button>
        ) : null}
      </div>
      {facts.run === null ? (
        <p className="text-ink-soft text-sm">
          Nothing was checked yet: problems are flagged and waived on a run. Run the check, then come back.
        </p>
      ) : facts.problems.length === 0 ? (
        <p className="text-ink-soft text-sm">Run {facts.run.number} found no problem on this path.</p>
      ) : null}
      <ul className="flex flex-col">
        {facts.problems.map((problem) => (
          <li key={problem.id} className="border-rule-line border-b py-2">
            <div className="flex flex-wrap items-center gap-x-3 gap-y-1">
              <VerdictMark verdict={problem.waiver?.covers ? "waived" : problem.verdict} />
              <button
                type="button"
                className="text-left text-sm font-medium hover:underline"
                onClick={() => onChoose(problem.worstRule)}
              >
                {problem.title}
              </button>
              <span className="ml-auto flex gap-1 print:hidden">
                {facts.may.flag && !problem.flags.some((flag) => flag.state === "open") ? (
                  <Button onClick={() => setAsking({ act: "flag", problem })}>Flag</Button>
                ) : null}
                {facts.may.waive && problem.verdict === "fail" && !problem.waiver?.covers ? (
                  <Button onClick={() => setAsking({ act: "waive", problem })}>Waive</Button>
                ) : null}
              </span>
            </div>
            {problem.waiver ? <Waiver facts={facts} waiver={problem.waiver} /> : null}
            {problem.flags.map((flag) => (
              <FlagThread key={flag.id} facts={facts} flag={flag} />
            ))}
          </li>
        ))}
      </ul>
      {facts.pathFlags.map((flag) => (
        <FlagThread key={flag.id} facts={facts} flag={flag} />
      ))}
      {asking?.act === "flag" ? (
        <FlagDialog facts={facts} problem={asking.problem} onClose={() => setAsking(null)} />
      ) : null}
      {asking?.act === "waive" ? (
        <WaiveDialog facts={facts} problem={asking.problem} onClose={() => setAsking(null)} />
      ) : null}
    </section>
  );
}

function Waiver({ facts, waiver }: { facts: NetFacts; waiver: WaiverFacts }) {
  const review = useReview(facts.projectId);
  const over = waiver.state === "revoked" || waiver.state === "expired";
  return (
    <div className="border-waived mt-1 border-l-2 pl-3 text-sm">
      <p>
        <Badge>{`waiver ${waiver.state}`}</Badge>{" "}
        <span className="text-ink-soft">
          by {waiver.authorName ?? "somebody who left"}, until {dayText(waiver.expiresAt)}. {waiver.remark}
        </span>
        {facts.may.waive && !over ? (
          <Button
            variant="quiet"
            busy={review.busy}
            className="ml-2 print:hidden"
            onClick={() =>
              void review.act("DELETE", `/waivers/${waiver.id}`, undefined, { said: "Revoked." })
            }
          >
            Revoke
          </Button>
        ) : null}
      </p>
      <p className="max-w-prose whitespace-pre-wrap">{waiver.reason}</p>
      <Refusal text={review.refusal} />
    </div>
  );
}
