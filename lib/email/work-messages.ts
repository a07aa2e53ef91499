import "server-only";
import { writeMessage, type Message } from "./message";

/** To a manufacturer: a revision was released to them. */
export function releaseMessage(
  to: string,
  release: { teamName: string; projectName: string; letter: string; url: string; expires?: string },
): Message {
  const { teamName, projectName, letter, url, expires } = release;
  return writeMessage({
    to,
    subject: `${projectName}, revision ${letter}: impedance-control note`,
    lines: [
      "Hello,",
      `${teamName} released revision ${letter} of ${projectName} and asks you to read its impedance-control note ` +
        "and to acknowledge it.",
    ],
    link: { label: "Open the note", url },
    after: expires ? [`The link is for you alone and holds until ${expires}.`] : [],
  });
}

/** To the person a flag was given to. */
export function flagAssignedMessage(
  to: string,
  flag: { by: string; projectName: string; subject: string; comment: string; url: string },
): Message {
  const { by, projectName, subject, comment, url } = flag;
  return writeMessage({
    to,
    subject: `${projectName}: ${subject} is yours to look at`,
    lines: ["Hello,", `${by} gave you a flag on ${subject} in ${projectName}:`, comment],
    link: { label: "Open the flag", url },
  });
}
