import { z } from "zod";
import { route } from "@/lib/auth/route";
import { getSentNote, markSeen } from "@/lib/db/release";
import { downloadHeaders } from "@/lib/reports/download-headers";
import { noteCsv } from "@/lib/reports/note-csv";
import { id } from "@/lib/schemas/common";

export const GET = route({
  access: "session",
  params: z.object({ releaseId: id }),
  handler: async ({ person, params }) => {
    const sent = await getSentNote(person.email, params.releaseId);
    await markSeen(sent.recipientId, "downloadedAt");
    return new Response(noteCsv(sent.note), {
      headers: downloadHeaders(
        "text/csv; charset=utf-8",
        `${sent.note.project} ${sent.note.revision} impedance note.csv`,
      ),
    });
  },
});
