import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { NoteSheet } from "@/components/note/note-sheet";
import { PrintButton } from "@/components/note/print-button";
import { RecipientsTable } from "@/components/releases/recipients-table";
import { Sheet } from "@/components/shell/sheet";
import { buttonClasses } from "@/components/ui/button";
import { requireActor } from "@/lib/auth/require-actor";
import { getRelease } from "@/lib/db/release";
import { can } from "@/lib/schemas/actor";
import { NotFoundError } from "@/lib/schemas/errors";

export const metadata: Metadata = { title: "Release" };

interface Props {
  params: Promise<{ projectId: string; releaseId: string }>;
}

export default async function ReleasePage({ params }: Props) {
  const actor = await requireActor("release:read");
  const { projectId, releaseId } = await params;
  const { release, recipients } = await getRelease(actor, projectId, releaseId).catch((error: unknown) => {
    if (error instanceof NotFoundError) notFound();
    throw error;
  });
  const api = `/api/v1/projects/${projectId}/releases/${releaseId}`;
  return (
    <Sheet>
      <div className="flex flex-col gap-8">
        <RecipientsTable
          projectId={projectId}
          releaseId={releaseId}
          recipients={recipients.map(({ tokenHash: _hash, ...recipient }) => recipient)}
          mayRelease={can(actor, "release:create")}
        />
        <NoteSheet
          note={release.note}
          noteHash={release.noteHash}
          actions={
            <>
              <a href={`${api}/report`} className={buttonClasses({ variant: "primary" })}>
                Download rule report
              </a>
              <a href={`${api}/note`} className={buttonClasses({})}>
                Download CSV
              </a>
              <PrintButton />
            </>
          }
        />
      </div>
    </Sheet>
  );
}
