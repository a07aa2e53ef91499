"use client";

import { useQuery } from "@tanstack/react-query";
import { useState } from "react";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { TextArea } from "@/components/ui/input";
import { Notice } from "@/components/ui/notice";
import { Progress } from "@/components/ui/progress";
import { Select } from "@/components/ui/select";
import { assigneesQuery } from "@/lib/client/review";
import type { WorkedProblem } from "./problem-filter";
import { counted } from "./run-words";
import type { useWork } from "./use-work";

interface Props {
  projectId: string;
  problems: readonly WorkedProblem[];
  work: ReturnType<typeof useWork>;
  onClose: () => void;
}

/** Marks problems with a comment and, if wanted, gives them to somebody. */
export function FlagDialog({ projectId, problems, work, onClose }: Props) {
  const people = useQuery(assigneesQuery(projectId)).data ?? [];
  const [comment, setComment] = useState("");
  const [assignee, setAssignee] = useState(
    problems.length === 1 ? (problems[0]?.flag?.assigneeUserId ?? "") : "",
  );
  const [error, setError] = useState<string | null>(null);
  const known = problems.filter((problem) => problem.flag !== null).length;

  async function send() {
    if (comment.trim() === "" && known < problems.length)
      return setError("A new flag needs a comment. Say what you want looked at.");
    const { refusals } = await work.flag(problems, {
      comment: comment.trim(),
      assigneeUserId: assignee || null,
    });
    if (refusals.length === 0) onClose();
  }

  return (
    <Dialog
      open
      onOpenChange={(open) => (open ? undefined : onClose())}
      title={
        problems.length === 1
          ? `Flag ${problems[0]?.path ?? ""}`
          : `Flag ${counted(problems.length, "problem")}`
      }
      description={
        known > 0 && problems.length > 1
          ? `${counted(known, "problem is flagged already and gets", "problems are flagged already and get")} the comment; the others get a new flag.`
          : known > 0
            ? "It is flagged already; your comment joins the discussion."
            : "The flag stays with the problem from run to run, and holds up a release until it is resolved."
      }
      footer={
        <>
          <Button onClick={onClose}>Close</Button>
          <Button variant="primary" busy={work.progress !== null} onClick={() => void send()}>
            {known === problems.length ? "Add" : "Flag"}
          </Button>
        </>
      }
    >
      <TextArea
        label="Comment"
        rows={4}
        autoFocus
        maxLength={4000}
        value={comment}
        error={error}
        onChange={(event) => {
          setComment(event.target.value);
          setError(null);
        }}
      />
      <Select
        label="Assign to"
        placeholder="nobody yet"
        options={people.map((person) => ({ value: person.userId, label: `${person.name}, ${person.role}` }))}
        value={assignee}
        onChange={(event) => setAssignee(event.target.value)}
      />
      <WorkState work={work} />
    </Dialog>
  );
}

/** How far an act on many has come, and what the server refused. */
export function WorkState({ work }: { work: ReturnType<typeof useWork> }) {
  return (
    <>
      {work.progress && work.progress.total > 1 ? (
        <Progress label="Working" done={work.progress.done} total={work.progress.total} noun="problems" />
      ) : null}
      {work.refusals.length > 0 ? (
        <Notice tone="refusal">
          {work.refusals.map((refusal) => (
            <p key={refusal}>{refusal}</p>
          ))}
        </Notice>
      ) : null}
    </>
  );
}
