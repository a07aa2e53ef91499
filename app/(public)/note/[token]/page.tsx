import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { AcknowledgeForm } from "@/components/note/acknowledge-form";
import { NoteSheet } from "@/components/note/note-sheet";
import { PrintButton } from "@/components/note/print-button";
import { Sheet } from "@/components/shell/sheet";
import { buttonClasses } from "@/components/ui/button";
import { getLinkedNote, markSeen } from "@/lib/db/release";
import { NotFoundError } from "@/lib/schemas/errors";
import { linkToken } from "@/lib/schemas/release";

// The address is a secret: it is neither listed nor passed on.
export const metadata: Metadata = {
  title: "Impedance-control note",
  robots: { index: false, follow: false },
  referrer: "no-referrer",
};

/** The note behind a recipient's own link, for those without an account. */
export default async function LinkedNotePage({ params }: { params: Promise<{ token: string }> }) {
  const parsed = linkToken.safeParse((await params).token);
  if (!parsed.success) notFound();
  const sent = await getLinkedNote(parsed.data).catch((error: unknown) => {
    if (error instanceof NotFoundError) notFound();
    throw error;
  });
  await markSeen(sent.recipientId, "viewedAt");
  const endpoint = `/links/${parsed.data}`;
  return (
    <Sheet wide={false}>
      <div className="flex flex-col gap-8">
        <p className="text-ink-soft text-sm print:hidden">
          For {sent.recipientName}. This link is yours alone.
        </p>
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
