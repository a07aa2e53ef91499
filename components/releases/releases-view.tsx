"use client";

import { useMutation, useQuery, useQueryClient } from "@tanstack/react-query";
import type { Route } from "next";
import Link from "next/link";
import { useRouter } from "next/navigation";
import { toast } from "@/components/ui/toast";
import { Button } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/empty-state";
import { PageHeader } from "@/components/ui/page-header";
import { Skeleton } from "@/components/ui/skeleton";
import { apiGet, apiPost, errorMessage } from "@/lib/client/api";
import type { NoDraft, ReadinessView } from "@/lib/client/review";
import type { ReleaseBlocker } from "@/lib/schemas/release";
import { ReleaseForm } from "./release-form";

interface ReleaseEntry {
  id: string;
  letter: string;
  title: string;
  releasedAt: number;
  releasedByName: string | null;
  recipients: number;
  acknowledged: number;
}

interface Props {
  projectId: string;
  mayRelease: boolean;
  mayDraft: boolean;
}

/** What stands between the draft and its release, and what was released before. */
export function ReleasesView({ projectId, mayRelease, mayDraft }: Props) {
  const releases = useQuery({
    queryKey: ["releases", projectId],
    queryFn: ({ signal }) =>
      apiGet<{ releases: ReleaseEntry[] }>(`/projects/${projectId}/releases`, undefined, signal),
  });
  const readiness = useQuery({
    queryKey: ["readiness", projectId],
    queryFn: ({ signal }) =>
      apiGet<ReadinessView | NoDraft>(`/projects/${projectId}/readiness`, undefined, signal),
  });
  return (
    <>
      <PageHeader
        title="Releases"
        description="A release freezes a revision with the run that allowed it, and sends its impedance-control note to the recipients it names."
      />
      <div className="flex flex-col gap-10">
        {readiness.data?.draft === null ? (
          <DraftMissing projectId={projectId} message={readiness.data.why} mayDraft={mayDraft} />
        ) : readiness.data ? (
          <DraftSection projectId={projectId} readiness={readiness.data} mayRelease={mayRelease} />
        ) : readiness.error ? (
          <p role="alert">{errorMessage(readiness.error)}</p>
        ) : (
          <Skeleton className="h-40" />
        )}
        <section>
          <h2 className="mb-2 text-lg font-semibold">Released</h2>
          {releases.data ? (
            <ReleaseList projectId={projectId} releases={releases.data.releases} />
          ) : releases.error ? (
            <p role="alert">{errorMessage(releases.error)}</p>
          ) : (
            <Skeleton className="h-24" />
          )}
        </section>
      </div>
    </>
  );
}

function DraftSection({
  projectId,
  readiness,
  mayRelease,
}: {
  projectId: string;
  readiness: ReadinessView;
  mayRelease: boolean;
}) {
  const { draft, blockers, run } = readiness;
  return (
    <section>
      <h2 className="mb-2 text-lg font-semibold">Draft {draft.letter}</h2>
      {blockers.length > 0 ? (
        <>
          <p className="mb-2">
            {blockers.length} {blockers.length === 1 ? "thing stands" : "things stand"} in the way of a
            release:
          </p>
          <ul className="border-rule-line max-w-prose border-t" aria-label="What blocks the release">
            {blockers.map((blocker) => (
              <li
                key={blocker.kind}
                className="border-rule-line flex flex-wrap items-baseline justify-between gap-x-4 gap-y-1 border-b py-2"
              >
                <span className="min-w-0 flex-1">{blocker.text}</span>
                <Link
                  href={wayOut(projectId, blocker, run?.id ?? null)}
                  className="text-violet shrink-0 text-sm underline"
                >
                  {WAYS[blocker.kind]}
                </Link>
              </li>
            ))}
          </ul>
        </>
      ) : (
        <p className="max-w-prose">
          Run {run?.number} is signed off by {readiness.signature?.signerName}.{" "}
          {readiness.waived > 0
            ? `${readiness.waived} failing ${readiness.waived === 1 ? "problem is" : "problems are"} waived. `
            : ""}
          Nothing stands in the way.
        </p>
      )}
      {blockers.length === 0 && run && mayRelease ? (
        <ReleaseForm projectId={projectId} letter={draft.letter} run={run} />
      ) : null}
      {blockers.length === 0 && !mayRelease ? (
        <p className="text-ink-soft mt-2">A reviewer or owner can release it now.</p>
      ) : null}
    </section>
  );
}

const WAYS: Record<ReleaseBlocker["kind"], string> = {
  "no run": "To the runs",
  "nothing judged": "To the rules",
  "stale run": "To the runs",
  "unfinished run": "To the runs",
  lines: "To the classes",
  failures: "To the problems",
  "no data": "To what is missing",
  "editor signs": "To the review",
  flags: "To the flags",
};

function wayOut(projectId: string, blocker: ReleaseBlocker, runId: string | null): Route {
  const at = (place: string) => `/projects/${projectId}/${place}` as Route;
  switch (blocker.kind) {
    case "failures":
      return at(runId ? `runs/${runId}?verdict=fail` : "runs");
    case "no data":
    case "editor signs":
    case "flags":
      return at("review");
    case "lines":
      return at("classes");
    case "nothing judged":
      return at("rules");
    default:
      return at("runs");
  }
}

function DraftMissing({
  projectId,
  message,
  mayDraft,
}: {
  projectId: string;
  message: string;
  mayDraft: boolean;
}) {
  const router = useRouter();
  const client = useQueryClient();
  const start = useMutation({
    mutationFn: () => apiPost<{ letter: string }>(`/projects/${projectId}/revisions`),
    onSuccess: async ({ letter }) => {
      toast.success(`Draft ${letter} is a copy of what was released.`);
      await client.invalidateQueries();
      router.refresh();
    },
    onError: (error) => toast.error(errorMessage(error)),
  });
  return (
    <EmptyState
      title="There is no draft"
      actions={
        mayDraft ? (
          <Button variant="primary" busy={start.isPending} onClick={() => start.mutate()}>
            Start a new draft
          </Button>
        ) : null
      }
    >
      {message}
    </EmptyState>
  );
}

function ReleaseList({ projectId, releases }: { projectId: string; releases: ReleaseEntry[] }) {
  if (releases.length === 0) return <p className="text-ink-soft">Nothing has been released yet.</p>;
  return (
    <ul className="border-rule-line border-t">
      {releases.map((release) => (
        <li
          key={release.id}
          className="border-rule-line flex flex-wrap items-baseline justify-between gap-x-6 gap-y-1 border-b py-3"
        >
          <div className="min-w-0">
            <Link
              href={`/projects/${projectId}/releases/${release.id}` as Route}
              className="text-violet font-medium underline"
            >
              Revision {release.letter}: {release.title}
            </Link>
            <p className="text-ink-soft text-sm">
              {new Date(release.releasedAt).toISOString().slice(0, 10)}, by {release.releasedByName}
            </p>
          </div>
          <p className="text-sm">
            {release.acknowledged} of {release.recipients}{" "}
            {release.recipients === 1 ? "recipient has" : "recipients have"} acknowledged
          </p>
        </li>
      ))}
    </ul>
  );
}
