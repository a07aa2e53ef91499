import "server-only";
import { writeMessage, type Message } from "./message";

export function verifyMessage(to: string, name: string, url: string): Message {
  return writeMessage({
    to,
    subject: "Confirm your address",
    lines: [
      `Hello ${name},`,
      "someone made an account with this address. If it was you, confirm that it is yours.",
    ],
    link: { label: "Confirm this address", url },
    after: [
      "The link holds for an hour. If it was not you, do nothing: the account cannot be used without it.",
    ],
  });
}

export function resetMessage(to: string, name: string, url: string): Message {
  return writeMessage({
    to,
    subject: "Choose a new password",
    lines: [`Hello ${name},`, "someone asked for a new password for the account with this address."],
    link: { label: "Choose a new password", url },
    after: [
      "The link holds for an hour and works once. If it was not you, do nothing: your password stays as it is.",
    ],
  });
}

/** To somebody with whose address an account is made a second time: the page itself must not tell. */
export function alreadyRegisteredMessage(to: string, name: string, verified: boolean, url: string): Message {
  return writeMessage({
    to,
    subject: "You have an account already",
    lines: [
      `Hello ${name},`,
      "someone tried to make an account with this address, but there is one already. If it was you, sign in instead.",
      verified
        ? "If you no longer know the password, choose a new one."
        : "It was never confirmed. If it was not you who made it, choose a new password before you confirm it.",
    ],
    link: { label: "Choose a new password", url },
  });
}

export function invitationMessage(
  to: string,
  invitation: { inviterName: string; teamName: string; role: string; days: number; url: string },
): Message {
  const { inviterName, teamName, role, days, url } = invitation;
  return writeMessage({
    to,
    subject: `${inviterName} invites you to ${teamName}`,
    lines: ["Hello,", `${inviterName} asks you to join the team ${teamName} as ${role}.`],
    link: { label: "Look at the invitation", url },
    after: [
      `It holds for ${days} days and only for this address: sign in, or make an account, with ${to}.`,
      "If you do not know the team, do nothing.",
    ],
  });
}
