import "server-only";
import { sendMailLater } from "./transport";
import { releaseMessage } from "./work-messages";

export interface NoteLink {
  email: string;
  token: string;
  expiresAt: number;
}

/** Writes to each recipient of a release with the link that is theirs alone. */
export function sendNoteLinks(
  links: readonly NoteLink[],
  about: { teamName: string; projectName: string; letter: string; baseUrl: string },
): void {
  const { baseUrl, ...names } = about;
  for (const link of links)
    sendMailLater(
      releaseMessage(link.email, {
        ...names,
        url: `${baseUrl}/note/${link.token}`,
        expires: new Date(link.expiresAt).toISOString().slice(0, 10),
      }),
    );
}
