import { notFound } from "next/navigation";
import { requireActor } from "@/lib/auth/require-actor";
import { REVISION_PARAM } from "@/lib/client/revision-param";
import { findRevision } from "@/lib/db/revision";
import { can } from "@/lib/schemas/actor";
import { NotFoundError } from "@/lib/schemas/errors";

export interface NetsPageProps {
  params: Promise<{ projectId: string }>;
  searchParams: Promise<Record<string, string | string[] | undefined>>;
}

/** What each page of the nets knows first: the revision looked at, and why it is only shown, if so. */
export async function readRevision({ params, searchParams }: NetsPageProps) {
  const [{ projectId }, query] = await Promise.all([params, searchParams]);
  const actor = await requireActor("project:read");
  const letter = query[REVISION_PARAM];
  const asked = typeof letter === "string" ? letter : undefined;
  try {
    const revision = await findRevision(actor, projectId, asked);
    const readOnly =
      revision.state === "released"
        ? `Revision ${revision.letter} is released and stays as it is.`
        : revision.archived
          ? "This project is archived. Restore it to change its nets."
          : can(actor, "draft:edit")
            ? null
            : "Designers import nets and set class and scope. Flag a path to say what should change.";
    return { projectId, revision: asked, readOnly };
  } catch (error) {
    if (error instanceof NotFoundError) notFound();
    throw error;
  }
}
