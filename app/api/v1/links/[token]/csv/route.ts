import { z } from "zod";
import { route } from "@/lib/auth/route";
import { getLinkedNote, markSeen } from "@/lib/db/release";
import { downloadHeaders } from "@/lib/reports/download-headers";
import { noteCsv } from "@/lib/reports/note-csv";
import { linkToken } from "@/lib/schemas/release";

/** The note behind a recipient's own link, for those without an account. */
export const GET = route({
  access: "public",
  params: z.object({ token: linkToken }),
  handler: async ({ params }) => {
    const sent = await getLinkedNote(params.token);
    await markSeen(sent.recipientId, "downloadedAt");
    return new Response(noteCsv(sent.note), {
      headers: downloadHeaders(
        "text/csv; charset=utf-8",
        `${sent.note.project} ${sent.note.revision} impedance note.csv`,
      ),
    });
  },
});
