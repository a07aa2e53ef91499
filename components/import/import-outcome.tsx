"use client";

import type { Route } from "next";
import { Button } from "@/components/ui/button";
import { LinkButton } from "@/components/ui/link-button";
import { Progress } from "@/components/ui/progress";
import type { ImportView } from "@/lib/schemas/import-list";
import { KIND_LABELS, rows } from "./list-words";

interface Props {
  projectId: string;
  view: ImportView;
  cancelling: boolean;
  onCancel: () => void;
  onAnother: () => void;
}

/** A confirmed list: how far it is, then what came of it and what is next. */
export function ImportOutcome({ projectId, view, cancelling, onCancel, onAnother }: Props) {
  const base = `/projects/${projectId}/nets`;
  if (view.state === "applying")
    return (
      <Progress
        label={`Importing ${view.fileName}`}
        done={Math.round(view.progress * view.total)}
        total={view.total}
        noun="rows"
        onCancel={onCancel}
        cancelling={cancelling}
      />
    );
  if (view.state === "cancelled")
    return (
      <div className="flex flex-col items-start gap-3">
        <p role="status">This list was dropped; nothing of it was written.</p>
        <Button onClick={onAnother}>Import another list</Button>
      </div>
    );
  const { report } = view;
  const nets = view.kind === "section list" || view.kind === "net list";
  return (
    <div className="flex flex-col items-start gap-4">
      <h2 className="text-lg font-semibold" role="status">
        {KIND_LABELS[view.kind]} imported
      </h2>
      {report ? (
        <dl className="grid grid-cols-[auto_1fr] gap-x-6 gap-y-1 text-sm">
          <Fact term="Rows" value={`${report.good.toLocaleString("en")} of ${rows(report.total)} taken`} />
          {report.duplicates > 0 ? (
            <Fact term="Given twice" value={`${rows(report.duplicates)}, taken once`} />
          ) : null}
          <Fact term="New" value={report.added.toLocaleString("en")} />
          <Fact term="Updated" value={report.updated.toLocaleString("en")} />
          {report.removed > 0 ? <Fact term="Removed" value={report.removed.toLocaleString("en")} /> : null}
          {nets ? <Fact term="Incomplete routes" value={report.incomplete.toLocaleString("en")} /> : null}
        </dl>
      ) : null}
      <div className="flex flex-wrap gap-2">
        {nets ? (
          <LinkButton variant="primary" href={`${base}/roles` as Route}>
            Go on to roles and names
          </LinkButton>
        ) : null}
        <LinkButton href={(view.kind === "parts list" ? `${base}/parts` : base) as Route}>
          {view.kind === "parts list" ? "See the parts" : "See the nets"}
        </LinkButton>
        <Button onClick={onAnother}>Import another list</Button>
      </div>
    </div>
  );
}

function Fact({ term, value }: { term: string; value: string }) {
  return (
    <>
      <dt className="text-ink-soft">{term}</dt>
      <dd>{value}</dd>
    </>
  );
}
