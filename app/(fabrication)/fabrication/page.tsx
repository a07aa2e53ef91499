import type { Metadata, Route } from "next";
import Link from "next/link";
import { Sheet } from "@/components/shell/sheet";
import { EmptyState } from "@/components/ui/empty-state";
import { PageHeader } from "@/components/ui/page-header";
import { requireActor } from "@/lib/auth/require-actor";
import { listSentNotes } from "@/lib/db/release";

export const metadata: Metadata = { title: "Notes sent to you" };

export default async function FabricationPage() {
  const actor = await requireActor("note:read");
  const notes = await listSentNotes(actor.email);
  return (
    <Sheet>
      <PageHeader
        title="Notes sent to you"
        description={`Impedance-control notes that teams released to ${actor.email}.`}
      />
      {notes.length === 0 ? (
        <EmptyState title="No note yet">
          When a team releases a board and names your address, its impedance-control note appears here.
        </EmptyState>
      ) : (
        <ul className="border-rule-line border-t">
          {notes.map(({ releaseId, note, acknowledgedAt }) => (
            <li
              key={releaseId}
              className="border-rule-line flex flex-wrap items-baseline justify-between gap-x-6 gap-y-1 border-b py-3"
            >
              <div className="min-w-0">
                <Link
                  href={`/fabrication/${releaseId}` as Route}
                  className="text-violet font-medium underline"
                >
                  {note.project}, revision {note.revision}
                </Link>
                <p className="text-ink-soft text-sm">
                  {note.title} · {note.team} · {note.lines.length} controlled{" "}
                  {note.lines.length === 1 ? "line" : "lines"}
                </p>
              </div>
              <p className="text-sm">
                {acknowledgedAt === null
                  ? "Waits for your acknowledgement"
                  : `Acknowledged ${new Date(acknowledgedAt).toISOString().slice(0, 10)}`}
              </p>
            </li>
          ))}
        </ul>
      )}
    </Sheet>
  );
}
