"use client";

import { useQuery } from "@tanstack/react-query";
import { useState } from "react";
import { Button } from "@/components/ui/button";
import type { Rights } from "@/components/runs/rights";
import { counted, timeText } from "@/components/runs/run-words";
import type { ListedRun } from "@/lib/client/runs";
import { editorsQuery, signaturesQuery, signRun, withdrawSignature } from "@/lib/client/review";
import { ReasonDialog } from "./reason-dialog";
import { useReviewAct } from "./use-review";

interface Props {
  projectId: string;
  run: ListedRun;
  rights: Rights;
  /** a draft's run is signed; a released revision's signatures are history */
  isDraft: boolean;
  /** whether the draft was edited after the run */
  stale: boolean;
}

/** Who signed this revision's runs, who may, and why somebody may not. */
export function SignOff({ projectId, run, rights, isDraft, stale }: Props) {
  const signatures = useQuery(signaturesQuery(projectId, run.id)).data;
  const editors = useQuery(editorsQuery(projectId, run.letter)).data;
  const [asking, setAsking] = useState(false);
  const sign = useReviewAct(projectId, (remark: string) => signRun(projectId, run.id, remark), "Signed.");
  const withdraw = useReviewAct(
    projectId,
    (id: string) => withdrawSignature(projectId, id),
    "Your signature is withdrawn.",
  );
  const mine = signatures?.find((entry) => entry.signedBy === rights.userId && entry.runId === run.id);
  const own = editors?.find((editor) => editor.userId === rights.userId);
  const obstacle = whyNot();

  function whyNot(): string | null {
    if (!isDraft) return `Revision ${run.letter} is released; its signatures stay as they are.`;
    if (!rights.sign) return "A reviewer signs. You can flag what you want looked at first.";
    if (own) return `You edited this draft (${counted(own.edits, "edit")}), so another reviewer signs it.`;
    if (stale) return "The draft was edited after this run. Run the check again, then sign that run.";
    return null;
  }

  return (
    <section aria-labelledby="sign-off" className="border-rule-line border-t pt-3">
      <h2 id="sign-off" className="mb-2 text-base font-semibold">
        Sign-off
      </h2>
      {signatures?.length === 0 ? (
        <p className="text-ink-soft text-sm">Nobody has signed a run of revision {run.letter}.</p>
      ) : null}
      <ul className="flex flex-col gap-2 text-sm">
        {signatures?.map((entry) => (
          <li key={entry.id}>
            <p>
              <span className="font-medium">{entry.signerName ?? "Somebody who left"}</span> signed run{" "}
              {entry.runNumber}
              <span className="text-ink-soft">, {timeText(entry.signedAt)}</span>
            </p>
            {entry.runId === run.id ? null : (
              <p className="text-near">It does not hold for run {run.number}: sign that one too.</p>
            )}
            {entry.remark ? (
              <p className="text-ink-soft break-words whitespace-pre-wrap">{entry.remark}</p>
            ) : null}
            {isDraft && entry.signedBy === rights.userId ? (
              <Button
                variant="quiet"
                className="text-violet -ml-3"
                busy={withdraw.isPending}
                onClick={() => withdraw.mutate(entry.id)}
              >
                Withdraw my signature
              </Button>
            ) : null}
          </li>
        ))}
      </ul>
      {signatures && editors && !mine ? (
        obstacle ? (
          <p className="text-ink-soft mt-2 text-sm">{obstacle}</p>
        ) : (
          <Button variant="primary" className="mt-3" onClick={() => setAsking(true)}>
            Sign off run {run.number}
          </Button>
        )
      ) : null}
      {editors && editors.length > 0 && isDraft ? (
        <p className="text-ink-soft mt-2 text-xs">
          Edited by {editors.map((editor) => editor.name).join(", ")}. Whoever edited a draft neither signs it
          nor waives in it.
        </p>
      ) : null}
      {asking ? (
        <ReasonDialog
          title={`Sign off run ${run.number}`}
          description="You say that you looked at what fails, is near and lacks data in this run. The signature holds for this run alone; an edit of the draft asks for a new one."
          label="Remark, if there is one"
          confirm="Sign off"
          least={0}
          onClose={() => setAsking(false)}
          onConfirm={(remark) => sign.mutateAsync(remark)}
        />
      ) : null}
    </section>
  );
}
