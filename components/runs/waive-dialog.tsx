"use client";

import { useState } from "react";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { Input, TextArea } from "@/components/ui/input";
import { maxWaiverMs } from "@/lib/schemas/review";
import { WorkState } from "./flag-dialog";
import { measureText } from "./measure";
import type { WorkedProblem } from "./problem-filter";
import { ruleTitle } from "./rule-title";
import { counted } from "./run-words";
import type { useWork } from "./use-work";

interface Props {
  problems: readonly WorkedProblem[];
  work: ReturnType<typeof useWork>;
  onClose: () => void;
}

const DAY_MS = 86_400_000;
const USUAL_MS = 180 * DAY_MS;
const LEAST_REASON = 10;

/** Excuses failing problems, with a reason and until a day. */
export function WaiveDialog({ problems, work, onClose }: Props) {
  const [opened] = useState(() => Date.now());
  const [reason, setReason] = useState("");
  const [day, setDay] = useState(() => dayOf(opened + USUAL_MS));
  const [error, setError] = useState<{ reason?: string; day?: string }>({});
  const failing = problems.filter((problem) => problem.verdict === "fail" && !problem.waiver?.covers);
  const left = problems.length - failing.length;
  const [one] = failing;

  async function send() {
    const expiresAt = endOf(day);
    const wrong = {
      ...(reason.trim().length < LEAST_REASON ? { reason: "Give the reason in a sentence." } : {}),
      ...(Number.isNaN(expiresAt) || expiresAt <= opened ? { day: "Choose a later day." } : {}),
    };
    setError(wrong);
    if (Object.keys(wrong).length > 0) return;
    const { refusals } = await work.waive(failing, { reason: reason.trim(), expiresAt });
    if (refusals.length === 0) onClose();
  }

  return (
    <Dialog
      open
      onOpenChange={(open) => (open ? undefined : onClose())}
      title={
        failing.length === 1 && one ? `Waive ${one.path}` : `Waive ${counted(failing.length, "problem")}`
      }
      description="A waiver is bound to the value it waives. It is kept while the value stays the same or gets better, and is void when it gets worse or the day has passed."
      footer={
        <>
          <Button onClick={onClose}>Close</Button>
          <Button
            variant="primary"
            busy={work.progress !== null}
            disabled={failing.length === 0}
            onClick={() => void send()}
          >
            Waive
          </Button>
        </>
      }
    >
      {failing.length === 1 && one ? (
        <p className="text-sm">
          {one.title}: {ruleTitle(one.rule).toLowerCase()} {measureText(one.value, one.unit)} against a limit
          of {measureText(one.limit, one.unit)}.
        </p>
      ) : null}
      {left > 0 ? (
        <p className="text-ink-soft text-sm">
          {counted(left, "selected problem does", "selected problems do")} not fail or{" "}
          {left === 1 ? "is" : "are"} waived already, and {left === 1 ? "is" : "are"} left out.
        </p>
      ) : null}
      <TextArea
        label="Reason"
        hint="What makes this acceptable: a measurement, the part's own limit, a later cure."
        rows={4}
        autoFocus
        maxLength={2000}
        value={reason}
        error={error.reason}
        onChange={(event) => setReason(event.target.value)}
      />
      <Input
        label="Valid until"
        type="date"
        fieldClassName="w-44"
        min={dayOf(opened + DAY_MS)}
        max={dayOf(opened + maxWaiverMs - DAY_MS)}
        value={day}
        error={error.day}
        onChange={(event) => setDay(event.target.value)}
      />
      <WorkState work={work} />
    </Dialog>
  );
}

const dayOf = (at: number) => new Date(at).toISOString().slice(0, 10);
/** A day counts to its end, in UTC like every time of the record. */
const endOf = (day: string) => Date.parse(`${day}T23:59:59.000Z`);
