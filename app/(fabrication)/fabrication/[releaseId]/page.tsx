import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { AcknowledgeForm } from "@/components/note/acknowledge-form";
import { NoteSheet } from "@/components/note/note-sheet";
import { PrintButton } from "@/components/note/print-button";
import { Sheet } from "@/components/shell/sheet";
import { buttonClasses } from "@/components/ui/button";
import { requireActor } from "@/lib/auth/require-actor";
import { getSentNote, markSeen } from "@/lib/db/release";
import { NotFoundError } from "@/lib/schemas/errors";

export const metadata: Metadata = { title: "Impedance-control note" };

export default async function SentNotePage({ params }: { params: Promise<{ releaseId: string }> }) {
  const actor = await requireActor("note:read");
  const { releaseId } = await params;
  const sent = await getSentNote(actor.email, releaseId).catch((error: unknown) => {
    if (error instanceof NotFoundError) notFound();
    throw error;
  });
  await markSeen(sent.recipientId, "viewedAt");
  const endpoint = `/fabrication/notes/${releaseId}`;
  return (
    <Sheet>
      <div className="flex flex-col gap-8">
        <NoteSheet
          note={sent.note}
          noteHash={sent.noteHash}
          actions={
            <>
              <a href={`/api/v1${endpoint}/csv`} className={buttonClasses({ variant: "primary" })}>
                Download CSV
              </a>
              <PrintButton />
            </>
          }
        />
        <AcknowledgeForm
          endpoint={`${endpoint}/acknowledge`}
          acknowledgedAt={sent.acknowledgedAt}
          acknowledgedBy={sent.acknowledgedBy}
        />
      </div>
    </Sheet>
  );
}
