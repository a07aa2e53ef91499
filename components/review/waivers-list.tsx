"use client";

import { useQuery } from "@tanstack/react-query";
import Link from "next/link";
import { useState } from "react";
import { Badge } from "@/components/ui/badge";
import { Button } from "@/components/ui/button";
import { ConfirmDialog } from "@/components/ui/confirm-dialog";
import { type DataColumn, DataTable } from "@/components/ui/data-table";
import { Notice } from "@/components/ui/notice";
import { TableSkeleton } from "@/components/ui/skeleton";
import { measureText } from "@/components/runs/measure";
import { pathAddress } from "@/components/runs/path-address";
import type { Rights } from "@/components/runs/rights";
import { ruleTitle } from "@/components/runs/rule-title";
import { dayText } from "@/components/runs/run-words";
import { errorMessage } from "@/lib/client/api";
import { revokeWaiver, type WaiverView, waiversQuery } from "@/lib/client/review";
import type { WaiverState } from "@/lib/schemas/review";
import { mechanismTitles } from "@/lib/si/rules";
import { useReviewAct } from "./use-review";

interface Props {
  projectId: string;
  runId: string | null;
  rights: Rights;
}

const TONES: Record<WaiverState, "pass" | "near" | "fail" | "plain" | "violet"> = {
  active: "pass",
  carried: "violet",
  "look again": "near",
  void: "fail",
  expired: "fail",
  revoked: "plain",
};

/** The waivers of the project, each held against the run that is looked at: kept, to be looked at, or void. */
export function WaiversList({ projectId, runId, rights }: Props) {
  const { data, error, refetch } = useQuery(waiversQuery(projectId, runId));
  const [asked, setAsked] = useState<WaiverView | null>(null);
  const revoke = useReviewAct(
    projectId,
    (id: string) => revokeWaiver(projectId, id),
    "The waiver is revoked.",
  );
  if (error)
    return (
      <Notice tone="refusal" actions={<Button onClick={() => void refetch()}>Try again</Button>}>
        {errorMessage(error)}
      </Notice>
    );
  if (!data) return <TableSkeleton label="Loading the waivers" />;
  const columns: DataColumn<WaiverView>[] = [
    {
      id: "state",
      header: "State",
      width: 106,
      sortValue: (waiver) => waiver.judged.state,
      cell: (waiver) => (
        <span title={waiver.judged.reason}>
          <Badge tone={TONES[waiver.judged.state]}>{waiver.judged.state}</Badge>
        </span>
      ),
    },
    {
      id: "path",
      header: "Path",
      kind: "mono",
      width: 140,
      sortValue: (waiver) => waiver.pathName,
      cell: (waiver) =>
        runId ? (
          <Link
            className="text-violet hover:underline"
            href={pathAddress(projectId, runId, waiver.pathLineageId)}
          >
            {waiver.pathName}
          </Link>
        ) : (
          waiver.pathName
        ),
    },
    {
      id: "problem",
      header: "Problem",
      width: 200,
      sortValue: (waiver) => waiver.mechanism,
      cell: (waiver) => mechanismTitles[waiver.mechanism] ?? waiver.mechanism,
    },
    { id: "values", header: "Waived, and now", width: 270, cell: (waiver) => <Values waiver={waiver} /> },
    { id: "reason", header: "Reason", cell: (waiver) => <span title={waiver.reason}>{waiver.reason}</span> },
    {
      id: "who",
      header: "By",
      width: 104,
      sortValue: (waiver) => waiver.authorName,
      cell: (waiver) => waiver.authorName ?? "–",
    },
    {
      id: "until",
      header: "Until",
      width: 106,
      sortValue: (waiver) => waiver.expiresAt,
      cell: (waiver) => dayText(waiver.expiresAt),
    },
    ...(rights.waive
      ? [
          {
            id: "act",
            header: "",
            width: 92,
            cell: (waiver: WaiverView) =>
              waiver.judged.state === "revoked" ? null : (
                <Button variant="quiet" className="h-7" onClick={() => setAsked(waiver)}>
                  Revoke
                </Button>
              ),
          },
        ]
      : []),
  ];
  return (
    <>
      <DataTable
        label="Waivers"
        rows={data}
        columns={columns}
        rowId={(waiver) => waiver.id}
        empty="Nothing was waived. A reviewer waives a failing problem with w in the table of a run."
      />
      <ConfirmDialog
        open={asked !== null}
        onOpenChange={(open) => (open ? undefined : setAsked(null))}
        title={`Revoke the waiver of ${asked?.pathName ?? ""}`}
        description="What it excused counts as failing again and holds up the release. The record keeps that it was given."
        confirm="Revoke"
        danger
        busy={revoke.isPending}
        onConfirm={() => {
          if (asked) revoke.mutate(asked.id, { onSettled: () => setAsked(null) });
        }}
      />
    </>
  );
}

/** "Overshoot −12.0 %, now −11.2 %": the margin that was waived and the one of the run that is looked at. */
function Values({ waiver }: { waiver: WaiverView }) {
  const worst = [...waiver.waived].sort((a, b) => relative(a) - relative(b))[0];
  if (!worst) return <span className="text-ink-soft">–</span>;
  const now = waiver.current.find((entry) => entry.rule === worst.rule);
  const told = `${ruleTitle(worst.rule)} ${measureText(worst.value, worst.unit)}`;
  const later = now ? `now ${measureText(now.value, now.unit)}` : "now passes";
  const same = now !== undefined && now.value === worst.value;
  return (
    <span title={`${told}, ${later}. ${waiver.judged.reason}`}>
      {told}
      {waiver.judged.state === "revoked" ? null : (
        <span className="text-ink-soft">, {same ? "the same now" : later}</span>
      )}
    </span>
  );
}

const relative = (entry: { margin: number; limit: number }) =>
  entry.margin / Math.max(Math.abs(entry.limit), 1e-9);
