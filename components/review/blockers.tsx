"use client";

import { useQuery } from "@tanstack/react-query";
import { Check } from "lucide-react";
import type { Route } from "next";
import Link from "next/link";
import { Button } from "@/components/ui/button";
import { LinkButton } from "@/components/ui/link-button";
import { Notice } from "@/components/ui/notice";
import { Skeleton } from "@/components/ui/skeleton";
import { narrowedRun } from "@/components/runs/path-address";
import { errorMessage } from "@/lib/client/api";
import { type ReadinessView, readinessQuery } from "@/lib/client/review";
import type { ReleaseBlocker } from "@/lib/schemas/release";

/** Everything that stands between the draft and its release, each with where it is cured. */
export function Blockers({ projectId }: { projectId: string }) {
  const { data, error, refetch } = useQuery(readinessQuery(projectId));
  return (
    <section aria-labelledby="blockers">
      <h2 id="blockers" className="mb-2 text-base font-semibold">
        What holds up the release
      </h2>
      {error ? (
        <Notice tone="refusal" actions={<Button onClick={() => void refetch()}>Try again</Button>}>
          {errorMessage(error)}
        </Notice>
      ) : !data ? (
        <Skeleton className="h-24" />
      ) : data.draft === null ? (
        <p className="text-sm">{data.why}</p>
      ) : data.blockers.length === 0 ? (
        <div className="flex flex-col items-start gap-3 text-sm">
          <p className="text-pass flex items-center gap-1.5">
            <Check size={15} aria-hidden="true" /> Nothing. Revision {data.draft.letter} can be released.
          </p>
          <LinkButton href={`/projects/${projectId}/releases` as Route}>Go to releases</LinkButton>
        </div>
      ) : (
        <ol className="flex flex-col gap-2 text-sm">
          {data.blockers.map((blocker) => (
            <li key={blocker.kind} className="border-near border-l-2 pl-3">
              {blocker.text}{" "}
              <Link className="prose-link whitespace-nowrap" href={cureOf(projectId, blocker, data)}>
                {CURES[blocker.kind]}
              </Link>
            </li>
          ))}
        </ol>
      )}
      {data?.draft && data.waived > 0 ? (
        <p className="text-waived mt-2 text-xs">
          {data.waived} failing {data.waived === 1 ? "problem is" : "problems are"} waived.
        </p>
      ) : null}
    </section>
  );
}

const CURES: Record<ReleaseBlocker["kind"], string> = {
  "no run": "Go to runs",
  "unfinished run": "Go to runs",
  "nothing judged": "See the rules",
  "stale run": "Go to runs",
  lines: "Go to classes",
  failures: "Work them",
  "no data": "See what is missing",
  flags: "See the flags",
  "editor signs": "See the sign-off",
};

function cureOf(projectId: string, { kind }: ReleaseBlocker, { run }: ReadinessView): Route {
  const review = `/projects/${projectId}/review`;
  switch (kind) {
    case "failures":
      return run
        ? narrowedRun(projectId, run.id, { verdict: "fail", waived: "no" })
        : (`/projects/${projectId}/runs` as Route);
    case "nothing judged":
      return `/projects/${projectId}/rules` as Route;
    case "lines":
      return `/projects/${projectId}/classes` as Route;
    case "no data":
      return `${review}?tab=missing` as Route;
    case "flags":
      return `${review}?tab=flags` as Route;
    case "editor signs":
      return `${review}#sign-off` as Route;
    default:
      return `/projects/${projectId}/runs` as Route;
  }
}
