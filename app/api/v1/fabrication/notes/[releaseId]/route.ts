import { z } from "zod";
import { route } from "@/lib/auth/route";
import { getSentNote, markSeen } from "@/lib/db/release";
import { id } from "@/lib/schemas/common";

export const GET = route({
  access: "session",
  params: z.object({ releaseId: id }),
  handler: async ({ person, params }) => {
    const sent = await getSentNote(person.email, params.releaseId);
    await markSeen(sent.recipientId, "viewedAt");
    return {
      note: sent.note,
      noteHash: sent.noteHash,
      acknowledgedAt: sent.acknowledgedAt,
      acknowledgedBy: sent.acknowledgedBy,
    };
  },
});
