"use client";

import { Badge } from "@/components/ui/badge";
import { Button } from "@/components/ui/button";
import { TextArea } from "@/components/ui/input";
import { Select } from "@/components/ui/select";
import { useDraftText } from "@/components/ui/use-draft-text";
import type { FlagFacts, NetFacts } from "./facts";
import { Refusal } from "./refusal";
import { useReview } from "./use-review";
import { dayText } from "./words";

interface Props {
  facts: Pick<NetFacts, "projectId" | "people" | "may">;
  flag: FlagFacts;
}

/** A flag with its discussion: comment, hand over, resolve. */
export function FlagThread({ facts, flag }: Props) {
  const [comment, setComment] = useDraftText(`flag ${flag.id}`);
  const review = useReview(facts.projectId);
  const change = (body: Record<string, unknown>, said: string) =>
    void review.act("PATCH", `/flags/${flag.id}`, { version: flag.version, ...body }, { said });
  return (
    <div className="border-rule-line mt-2 border-l-2 pl-3 text-sm">
      <div className="flex flex-wrap items-center gap-2">
        <Badge tone={flag.state === "open" ? "copper" : "plain"}>
          {flag.state === "open" ? "open flag" : "resolved flag"}
        </Badge>
        {facts.may.flag && flag.state === "open" ? (
          <Select
            label="Assigned to"
            labelHidden
            fieldClassName="w-44"
            value={flag.assigneeUserId ?? ""}
            placeholder="assigned to nobody"
            options={facts.people.map((person) => ({ value: person.userId, label: person.name }))}
            onChange={(event) => change({ assigneeUserId: event.target.value || null }, "Assigned.")}
          />
        ) : (
          <span className="text-ink-soft">{flag.assigneeName ? `for ${flag.assigneeName}` : null}</span>
        )}
        {facts.may.flag ? (
          <Button
            variant="quiet"
            busy={review.busy}
            onClick={() =>
              flag.state === "open"
                ? change({ state: "resolved" }, "Resolved.")
                : change({ state: "open" }, "Opened again.")
            }
          >
            {flag.state === "open" ? "Resolve" : "Open again"}
          </Button>
        ) : null}
      </div>
      <ol className="mt-1 flex flex-col gap-1">
        {flag.entries.map((entry) => (
          <li key={entry.id}>
            <span className="text-ink-soft text-xs">
              {entry.authorName ?? "somebody who left"}, {dayText(entry.at)}
            </span>
            <p className="max-w-prose whitespace-pre-wrap">{entry.comment}</p>
          </li>
        ))}
      </ol>
      {facts.may.comment && flag.state === "open" ? (
        <form
          className="mt-2 flex max-w-prose flex-col items-start gap-2"
          onSubmit={(event) => {
            event.preventDefault();
            void review.act(
              "POST",
              `/flags/${flag.id}/comments`,
              { comment },
              {
                said: "Comment added.",
                then: () => setComment(""),
              },
            );
          }}
        >
          <TextArea
            label="Answer"
            labelHidden
            placeholder="Write a comment"
            rows={2}
            fieldClassName="w-full"
            value={comment}
            error={review.fields.comment}
            onChange={(event) => setComment(event.target.value)}
          />
          <Button type="submit" busy={review.busy} disabled={comment.trim() === ""}>
            Comment
          </Button>
        </form>
      ) : null}
      <Refusal text={review.refusal} />
    </div>
  );
}
