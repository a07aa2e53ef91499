import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { Sheet } from "@/components/shell/sheet";
import { StackupEditor } from "@/components/stackup/stackup-editor";
import { requireActor } from "@/lib/auth/require-actor";
import { REVISION_PARAM } from "@/lib/client/revision-param";
import { findRevision, type RevisionRef } from "@/lib/db/revision";
import { getStackup } from "@/lib/db/stackup";
import { can, type Actor } from "@/lib/schemas/actor";
import { NotFoundError } from "@/lib/schemas/errors";

export const metadata: Metadata = { title: "Stackup" };

interface Props {
  params: Promise<{ projectId: string }>;
  searchParams: Promise<Record<string, string | string[] | undefined>>;
}

export default async function StackupPage({ params, searchParams }: Props) {
  const [{ projectId }, query] = await Promise.all([params, searchParams]);
  const actor = await requireActor("project:read");
  const letter = query[REVISION_PARAM];
  const { revision, stackup } = await read(actor, projectId, typeof letter === "string" ? letter : null);
  return (
    <Sheet>
      <StackupEditor
        // Another revision is another document.
        key={revision.id}
        projectId={projectId}
        projectName={revision.projectName}
        revision={revision.letter}
        unit={revision.projectUnit}
        stackup={stackup}
        readOnly={whyReadOnly(actor, revision)}
      />
    </Sheet>
  );
}

async function read(actor: Actor, projectId: string, letter: string | null) {
  try {
    const revision = await findRevision(actor, projectId, letter);
    return { revision, stackup: await getStackup(actor, revision) };
  } catch (error) {
    if (error instanceof NotFoundError) notFound();
    throw error;
  }
}

function whyReadOnly(actor: Actor, revision: RevisionRef): string | null {
  if (revision.state === "released") return `Revision ${revision.letter} is released and stays as it is.`;
  if (revision.archived) return "This project is archived. Restore it to edit its stackup.";
  return can(actor, "draft:edit")
    ? null
    : "Designers edit the stackup. Flag a layer to say what should change.";
}
