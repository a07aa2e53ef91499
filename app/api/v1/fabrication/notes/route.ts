import { route } from "@/lib/auth/route";
import { listSentNotes } from "@/lib/db/release";

/** Notes that any team sent to this person's address; nothing else is reachable from here. */
export const GET = route({
  access: "session",
  handler: async ({ person }) => ({
    notes: (await listSentNotes(person.email)).map(({ note, ...sent }) => ({
      releaseId: sent.releaseId,
      project: note.project,
      revision: note.revision,
      title: note.title,
      team: note.team,
      releasedAt: note.releasedAt,
      acknowledgedAt: sent.acknowledgedAt,
    })),
  }),
});
