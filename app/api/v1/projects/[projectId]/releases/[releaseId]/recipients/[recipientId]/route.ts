import { baseUrl } from "@/lib/auth/environment";
import { route } from "@/lib/auth/route";
import { renewLink, revokeRecipient } from "@/lib/db/release";
import { sendMailLater } from "@/lib/email/transport";
import { releaseMessage } from "@/lib/email/work-messages";
import { recipientParams } from "@/lib/schemas/route-params";

/** A fresh link by mail; the old one ends. */
export const POST = route({
  access: "release:create",
  params: recipientParams,
  handler: async ({ actor, params }) => {
    const link = await renewLink(actor, params.projectId, params.releaseId, params.recipientId);
    sendMailLater(
      releaseMessage(link.email, {
        teamName: link.team,
        projectName: link.board,
        letter: link.letter,
        url: `${baseUrl()}/note/${link.token}`,
        expires: new Date(link.expiresAt).toISOString().slice(0, 10),
      }),
    );
    return { expiresAt: link.expiresAt };
  },
});

/** Ends the recipient's access. */
export const DELETE = route({
  access: "release:create",
  params: recipientParams,
  handler: ({ actor, params }) => revokeRecipient(actor, params.projectId, params.releaseId, params.recipientId),
});
