"use client";

import { useQuery, useQueryClient } from "@tanstack/react-query";
import { CircleAlert, CircleCheck } from "lucide-react";
import type { Route } from "next";
import Link from "next/link";
import { usePathname } from "next/navigation";
import { useEffect } from "react";
import { readinessQuery } from "@/lib/client/review";

/** How much holds up the release of the draft, in the bar above each page of a project. */
export function BlockerCount({ projectId }: { projectId: string }) {
  const { data } = useQuery(readinessQuery(projectId));
  const client = useQueryClient();
  const pathname = usePathname();
  // The bar outlives the pages below it: what they changed is read when one goes on to the next.
  useEffect(() => {
    void client.refetchQueries({ queryKey: readinessQuery(projectId).queryKey, stale: true });
  }, [client, projectId, pathname]);
  // Its place is kept while it is on its way; where it cannot be read, the review page says why.
  if (data?.draft === null) return null;
  if (!data) return <span className="block h-5 w-40" />;
  const count = data.blockers.length;
  const Icon = count === 0 ? CircleCheck : CircleAlert;
  return (
    <Link
      href={`/projects/${projectId}/review` as Route}
      title={data.blockers.map((blocker) => blocker.text).join("\n")}
      className="inline-flex items-center gap-1.5 hover:underline"
    >
      <Icon size={14} aria-hidden="true" className={count === 0 ? "text-pass" : "text-near"} />
      {count === 0
        ? `Revision ${data.draft.letter} can be released`
        : `${count} ${count === 1 ? "thing holds" : "things hold"} up the release`}
    </Link>
  );
}
