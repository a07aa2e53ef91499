"use client";

import { useQuery, useQueryClient } from "@tanstack/react-query";
import { useState } from "react";
import { Badge } from "@/components/ui/badge";
import { Button } from "@/components/ui/button";
import { TextArea } from "@/components/ui/input";
import { LinkButton } from "@/components/ui/link-button";
import { Notice } from "@/components/ui/notice";
import { Select } from "@/components/ui/select";
import { SidePanel } from "@/components/ui/side-panel";
import { Skeleton } from "@/components/ui/skeleton";
import { useDraftText } from "@/components/ui/use-draft-text";
import { pathAddress } from "@/components/runs/path-address";
import type { Rights } from "@/components/runs/rights";
import { timeText } from "@/components/runs/run-words";
import { ApiError, errorMessage } from "@/lib/client/api";
import { assigneesQuery, changeFlag, commentOnFlag, flagQuery, reviewKey } from "@/lib/client/review";

interface Props {
  projectId: string;
  runId: string | null;
  flagId: string;
  rights: Rights;
  onClose: () => void;
}

/** The discussion of one flag: comments, who looks after it, whether it is settled. */
export function FlagThread({ projectId, runId, flagId, rights, onClose }: Props) {
  const client = useQueryClient();
  const { data, error } = useQuery(flagQuery(projectId, flagId));
  const people = useQuery(assigneesQuery(projectId)).data ?? [];
  const [comment, setComment] = useDraftText(`flag ${flagId}`);
  const [refusal, setRefusal] = useState<string | null>(null);
  const [busy, setBusy] = useState(false);
  const flag = data?.flag;

  async function act(work: () => Promise<unknown>) {
    setBusy(true);
    setRefusal(null);
    try {
      await work();
    } catch (reason) {
      setRefusal(
        reason instanceof ApiError && reason.isConflict
          ? `${reason.message} What you see now is how it stands.`
          : errorMessage(reason),
      );
    } finally {
      await client.invalidateQueries({ queryKey: reviewKey(projectId) });
      setBusy(false);
    }
  }

  if (!data || !flag)
    return (
      <SidePanel title="Flag" onClose={onClose}>
        {error ? <Notice tone="refusal">{errorMessage(error)}</Notice> : <Skeleton className="h-40" />}
      </SidePanel>
    );
  const next = flag.state === "open" ? "resolved" : "open";
  const send = (state?: "open" | "resolved") =>
    act(async () => {
      if (comment.trim()) {
        await commentOnFlag(projectId, flagId, comment.trim());
        setComment("");
      }
      if (state) await changeFlag(projectId, flagId, { version: flag.version, state });
    });

  return (
    <SidePanel
      title={flag.title}
      onClose={onClose}
      footer={
        <>
          {runId && flag.subjectKind !== "layer" ? (
            <LinkButton href={pathAddress(projectId, runId, flag.subjectLineageId)}>Open the net</LinkButton>
          ) : null}
          {rights.flag ? (
            <Button busy={busy} onClick={() => void send(next)}>
              {next === "resolved" ? "Resolve" : "Reopen"}
            </Button>
          ) : null}
          {rights.comment ? (
            <Button
              variant="primary"
              busy={busy}
              disabled={comment.trim() === ""}
              onClick={() => void send()}
            >
              Comment
            </Button>
          ) : null}
        </>
      }
    >
      <div className="mb-4 flex flex-wrap items-center gap-2 text-sm">
        <Badge tone={flag.state === "open" ? "copper" : "plain"}>{flag.state}</Badge>
        <span className="text-ink-soft">
          {flag.state === "resolved" && flag.resolvedAt ? `since ${timeText(flag.resolvedAt)}` : null}
        </span>
      </div>
      <Select
        label="Assigned to"
        placeholder="nobody yet"
        disabled={!rights.flag || busy}
        options={people.map((person) => ({ value: person.userId, label: `${person.name}, ${person.role}` }))}
        value={flag.assigneeUserId ?? ""}
        onChange={(event) =>
          void act(() =>
            changeFlag(projectId, flagId, {
              version: flag.version,
              assigneeUserId: event.target.value || null,
            }),
          )
        }
      />
      <ol className="my-4 flex flex-col gap-3" aria-label="Discussion">
        {data.entries.map((entry) => (
          <li key={entry.id} className="border-rule-line border-t pt-2 text-sm">
            <p className="text-ink-soft text-xs">
              {entry.authorName ?? "Somebody who left"}, {timeText(entry.at)}
            </p>
            <p className="break-words whitespace-pre-wrap">{entry.comment}</p>
          </li>
        ))}
      </ol>
      {rights.comment ? (
        <TextArea
          label="Comment"
          rows={3}
          maxLength={4000}
          value={comment}
          onChange={(event) => setComment(event.target.value)}
        />
      ) : null}
      {refusal ? (
        <Notice tone="refusal" className="mt-3">
          {refusal}
        </Notice>
      ) : null}
    </SidePanel>
  );
}
