"use client";

import { useState } from "react";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { Input, TextArea } from "@/components/ui/input";
import type { NetFacts, ProblemFacts } from "./facts";
import { Refusal } from "./refusal";
import { useReview } from "./use-review";

interface Props {
  facts: Pick<NetFacts, "projectId" | "path" | "run">;
  problem: ProblemFacts;
  onClose: () => void;
}

/** Excuses a problem for a time, with a reason, at the values it has in this run. */
export function WaiveDialog({ facts, problem, onClose }: Props) {
  const [reason, setReason] = useState("");
  const [day, setDay] = useState("");
  const [dayError, setDayError] = useState<string | null>(null);
  const review = useReview(facts.projectId);

  function send(): void {
    // The whole of the last day counts.
    const expiresAt = Date.parse(`${day}T23:59:59Z`);
    if (Number.isNaN(expiresAt)) {
      setDayError("Choose the last day on which it holds.");
      return;
    }
    setDayError(null);
    void review.act(
      "POST",
      "/waivers",
      {
        runId: facts.run?.id,
        subject: { kind: "problem", lineageId: facts.path.id, mechanism: problem.mechanism },
        reason,
        expiresAt,
      },
      { said: "Waived.", then: onClose },
    );
  }

  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      title={`Waive: ${problem.title}`}
      description="It is bound to the values of this run: worse ones end it. Whoever edited the draft cannot grant it."
      footer={
        <>
          <Button onClick={onClose}>Leave it</Button>
          <Button variant="primary" busy={review.busy} onClick={send}>
            Waive it
          </Button>
        </>
      }
    >
      <TextArea
        label="Reason"
        rows={4}
        value={reason}
        error={review.fields.reason}
        onChange={(event) => setReason(event.target.value)}
      />
      <Input
        label="Holds until"
        type="date"
        value={day}
        error={dayError ?? review.fields.expiresAt}
        onChange={(event) => setDay(event.target.value)}
      />
      <Refusal text={review.refusal} />
    </Dialog>
  );
}
