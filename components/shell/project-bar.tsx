import type { Route } from "next";
import Link from "next/link";
import type { ReactNode } from "react";
import { RevisionSwitch, type ShellRevision } from "./revision-switch";

interface Props {
  projectId: string;
  name: string;
  revisions: readonly ShellRevision[];
  /** What blocks release, in a few words with a link; nothing where nothing does. */
  blockers?: ReactNode;
}

/** The bar of a project: its name, the revision looked at, and what keeps it from release. */
export function ProjectBar({ projectId, name, revisions, blockers }: Props) {
  return (
    <section
      aria-label="Project"
      className="border-rule-line flex min-h-10 flex-wrap items-center gap-x-4 gap-y-1 border-b px-4 py-1 text-sm lg:px-6 print:hidden"
    >
      <Link href={`/projects/${projectId}/overview` as Route} className="font-medium hover:underline">
        {name}
      </Link>
      <RevisionSwitch revisions={revisions} />
      {blockers ? <div className="ml-auto">{blockers}</div> : null}
    </section>
  );
}
