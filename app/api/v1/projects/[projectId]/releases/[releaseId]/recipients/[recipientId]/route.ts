import { baseUrl } from "@/lib/auth/environment";
import { route } from "@/lib/auth/route";
import { renewLink, revokeRecipient } from "@/lib/db/release";
import { sendNoteLinks } from "@/lib/email/note-links";
import { recipientParams } from "@/lib/schemas/route-params";

/** A fresh link by mail; the old one ends. */
export const POST = route({
  access: "release:create",
  params: recipientParams,
  handler: async ({ actor, params }) => {
    const link = await renewLink(actor, params.projectId, params.releaseId, params.recipientId);
    sendNoteLinks([link], {
      teamName: link.team,
      projectName: link.board,
      letter: link.letter,
      baseUrl: baseUrl(),
    });
    return { expiresAt: link.expiresAt };
  },
});

/** Ends the recipient's access. */
export const DELETE = route({
  access: "release:create",
  params: recipientParams,
  handler: ({ actor, params }) =>
    revokeRecipient(actor, params.projectId, params.releaseId, params.recipientId),
});
