import { notFound } from "next/navigation";
import type { ReactNode } from "react";
import { BlockerCount } from "@/components/review/blocker-count";
import { ProjectBar } from "@/components/shell/project-bar";
import { requireActor } from "@/lib/auth/require-actor";
import { listRevisions } from "@/lib/db/revision";
import { NotFoundError } from "@/lib/schemas/errors";

interface Props {
  children: ReactNode;
  params: Promise<{ projectId: string }>;
}

/** The bar of a project above each of its pages. */
export default async function ProjectLayout({ children, params }: Props) {
  const { projectId } = await params;
  const revisions = await readRevisions(projectId);
  const name = revisions[0]?.projectName;
  if (name === undefined) notFound();
  return (
    <>
      <ProjectBar
        projectId={projectId}
        name={name}
        revisions={revisions.map(({ letter, state }) => ({ letter, state }))}
        blockers={
          revisions.some(({ state }) => state === "draft") ? (
            <BlockerCount projectId={projectId} />
          ) : undefined
        }
      />
      {children}
    </>
  );
}

async function readRevisions(projectId: string) {
  try {
    return await listRevisions(await requireActor("project:read"), projectId);
  } catch (error) {
    if (error instanceof NotFoundError) notFound();
    throw error;
  }
}
