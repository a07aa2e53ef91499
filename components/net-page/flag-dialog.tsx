"use client";

import { useState } from "react";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { Select } from "@/components/ui/select";
import { TextArea } from "@/components/ui/input";
import { useDraftText } from "@/components/ui/use-draft-text";
import type { NetFacts, ProblemFacts } from "./facts";
import { Refusal } from "./refusal";
import { useReview } from "./use-review";

interface Props {
  facts: Pick<NetFacts, "projectId" | "path" | "people">;
  /** null: the path as a whole */
  problem: ProblemFacts | null;
  onClose: () => void;
}

/** Marks a problem with a first comment and, if wanted, somebody to look after it. */
export function FlagDialog({ facts, problem, onClose }: Props) {
  const [comment, setComment] = useDraftText(`new flag ${facts.path.id} ${problem?.mechanism ?? ""}`);
  const [assignee, setAssignee] = useState("");
  const review = useReview(facts.projectId);
  const send = () =>
    review.act(
      "POST",
      "/flags",
      {
        subject: problem
          ? { kind: "problem", lineageId: facts.path.id, mechanism: problem.mechanism }
          : { kind: "path", lineageId: facts.path.id, mechanism: null },
        comment,
        assigneeUserId: assignee || null,
      },
      {
        said: "Flagged.",
        then: () => {
          setComment("");
          onClose();
        },
      },
    );
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      title={problem ? `Flag: ${problem.title}` : `Flag ${facts.path.name}`}
      description="The flag stays with the path through later runs and revisions until somebody resolves it."
      footer={
        <>
          <Button onClick={onClose}>Leave it</Button>
          <Button variant="primary" busy={review.busy} onClick={() => void send()}>
            Flag it
          </Button>
        </>
      }
    >
      <TextArea
        label="Comment"
        rows={4}
        value={comment}
        error={review.fields.comment}
        onChange={(event) => setComment(event.target.value)}
      />
      <Select
        label="Assign to"
        value={assignee}
        placeholder="nobody yet"
        options={facts.people.map((person) => ({ value: person.userId, label: person.name }))}
        onChange={(event) => setAssignee(event.target.value)}
      />
      <Refusal text={review.refusal} />
    </Dialog>
  );
}
