"use client";

import { useSearchParams } from "next/navigation";
import { useState } from "react";
import type { Rights } from "@/components/runs/rights";
import { Button } from "@/components/ui/button";
import { ConfirmDialog } from "@/components/ui/confirm-dialog";
import { Notice } from "@/components/ui/notice";
import { PageHeader } from "@/components/ui/page-header";
import { Select } from "@/components/ui/select";
import { TableSkeleton } from "@/components/ui/skeleton";
import { UndoButtons } from "@/components/undo/undo-buttons";
import { useUndo } from "@/components/undo/use-undo";
import { errorMessage } from "@/lib/client/api";
import { REVISION_PARAM } from "@/lib/client/revision-param";
import type { RuleSetDoc, StoredRuleSet } from "@/lib/schemas/rule-set";
import { defaultRuleSet } from "@/lib/si/rules";
import { RulesTable } from "./rules-table";
import { type RuleSetEditor, useRuleSet, useRuleSetEditor } from "./use-rule-set";

interface Props {
  projectId: string;
  rights: Rights;
}

const DESCRIPTION =
  "What is judged, and against which limits. A part's own limit goes before the class's, and the class's before these.";

/** The project's rules: edited by reviewers and owners, read by everybody else. */
export function RulesView({ projectId, rights }: Props) {
  const revision = useSearchParams().get(REVISION_PARAM);
  const { data, error, refetch } = useRuleSet(projectId, revision);
  if (error)
    return (
      <>
        <PageHeader title="Rules" description={DESCRIPTION} />
        <Notice tone="refusal" actions={<Button onClick={() => void refetch()}>Try again</Button>}>
          {errorMessage(error)}
        </Notice>
      </>
    );
  if (!data)
    return (
      <>
        <PageHeader title="Rules" description={DESCRIPTION} />
        <TableSkeleton rows={11} label="Loading the rules" />
      </>
    );
  if (revision === null && rights.setLimits) return <Edited projectId={projectId} stored={data} />;
  return (
    <>
      <PageHeader title="Rules" description={DESCRIPTION} />
      <Notice className="mb-4">
        {revision === null
          ? "Reviewers and owners set these limits. If one should change, flag a problem that it judges and say which limit you propose and why."
          : `These are the rules of revision ${revision}. They are edited in the draft.`}
      </Notice>
      <Rest doc={data} readOnly onChange={() => undefined} />
    </>
  );
}

function Edited({ projectId, stored }: { projectId: string; stored: StoredRuleSet }) {
  const editor = useRuleSetEditor(projectId, stored);
  const undo = useUndo({ projectId, enabled: true, flush: editor.flush, reload: editor.reload });
  const [asking, setAsking] = useState(false);
  return (
    <>
      <PageHeader
        title="Rules"
        description={DESCRIPTION}
        actions={
          <>
            <SaveState editor={editor} />
            <UndoButtons undo={undo} unsaved={editor.state !== "saved"} />
            <Button onClick={() => setAsking(true)}>Usual limits</Button>
          </>
        }
      />
      {editor.conflict ? (
        <Notice
          tone="refusal"
          className="mb-4"
          actions={
            <>
              <Button onClick={() => void editor.reload()}>Take theirs</Button>
              <Button onClick={() => void editor.keepMine()}>Keep mine</Button>
            </>
          }
        >
          {editor.refusal}
        </Notice>
      ) : editor.refusal ? (
        <Notice tone="refusal" className="mb-4" actions={<Button onClick={editor.retry}>Save again</Button>}>
          {editor.refusal}
        </Notice>
      ) : null}
      <Rest doc={editor.doc} readOnly={false} onChange={editor.change} />
      <ConfirmDialog
        open={asking}
        onOpenChange={setAsking}
        title="Set every rule to its usual limit"
        description="Limits, severities and switches of this project are replaced by those of a new one. You can undo it."
        confirm="Set usual limits"
        onConfirm={() => {
          editor.change({ ...defaultRuleSet(), judgedAt: editor.doc.judgedAt });
          setAsking(false);
        }}
      />
    </>
  );
}

const SAVE_WORDS: Record<RuleSetEditor["state"], string> = {
  saved: "Saved",
  waiting: "Saving soon",
  saving: "Saving",
  failed: "Not saved",
  blocked: "Not saved",
};

function SaveState({ editor }: { editor: RuleSetEditor }) {
  return (
    <span role="status" className="text-ink-soft flex h-8 items-center text-sm">
      {SAVE_WORDS[editor.state]}
    </span>
  );
}

function Rest({
  doc,
  readOnly,
  onChange,
}: {
  doc: RuleSetDoc;
  readOnly: boolean;
  onChange: (doc: RuleSetDoc) => void;
}) {
  return (
    <>
      <RulesTable doc={doc} readOnly={readOnly} onChange={onChange} />
      <div className="mt-4 flex items-start gap-x-10 gap-y-4 max-md:flex-col">
        <Select
          label="Receivers are judged at the"
          fieldClassName="w-44"
          disabled={readOnly}
          options={[
            { value: "pin", label: "pin" },
            { value: "die", label: "die" },
          ]}
          value={doc.judgedAt}
          onChange={(event) => onChange({ ...doc, judgedAt: event.target.value === "die" ? "die" : "pin" })}
        />
        <p className="text-ink-soft max-w-prose flex-1 text-sm">
          ◇ marks a <strong className="font-medium">selector</strong>: it chooses what to simulate and look
          at. Once simulation has judged a path, what a selector points at is shown but does not count as a
          failure. A margin inside “near” passes, but is told apart. No limit here means that the rule is
          judged only where a class or a part sets one.
        </p>
      </div>
    </>
  );
}
