import "server-only";
import { send } from "./transport";

interface Letter {
  to: string;
  subject: string;
  /** paragraphs before and after the link */
  before: string[];
  link?: { label: string; url: string };
  after?: string[];
}

export const sendVerification = (to: string, url: string) =>
  sendLetter({
    to,
    subject: "Confirm your e-mail address",
    before: ["Somebody, we hope you, made a Ringfence account with this address."],
    link: { label: "Confirm the address", url },
    after: ["The link works once and for one hour. If it was not you, do nothing: the account stays closed."],
  });

export const sendPasswordReset = (to: string, url: string) =>
  sendLetter({
    to,
    subject: "Choose a new password",
    before: ["A new password was asked for, for the Ringfence account of this address."],
    link: { label: "Choose a new password", url },
    after: ["The link works once and for one hour. If it was not you, do nothing: the password stays as it is."],
  });

export const sendInvitation = (to: string, inviter: string, team: string, role: string, url: string) =>
  sendLetter({
    to,
    subject: `${inviter} invites you to ${team}`,
    before: [`${inviter} invites you to join the team ${team} on Ringfence as ${role}.`],
    link: { label: "See the invitation", url },
    after: ["The invitation is for this address alone and ends after seven days."],
  });

export const sendReleaseNotice = (to: string, team: string, board: string, revision: string, url: string, expires: string) =>
  sendLetter({
    to,
    subject: `Impedance-control note: ${board}, revision ${revision}`,
    before: [`${team} released revision ${revision} of ${board} and names you as a recipient of its impedance-control note.`],
    link: { label: "Open the note", url },
    after: [
      `The link is yours alone and works until ${expires}. Somebody with a Ringfence account of this address finds the note there too.`,
      "Values on the note are engineering estimates; your process, the laminate's data sheet and coupon measurement decide.",
    ],
  });

export const sendFlagAssigned = (to: string, author: string, title: string, comment: string, url: string) =>
  sendLetter({
    to,
    subject: `${author} asks you to look at ${title}`,
    before: [`${author} flagged ${title} and gave it to you:`, comment],
    link: { label: "Open the flag", url },
  });

async function sendLetter(letter: Letter): Promise<void> {
  const after = letter.after ?? [];
  const text = [...letter.before, ...(letter.link ? [`${letter.link.label}:\n${letter.link.url}`] : []), ...after].join("\n\n");
  const paragraph = (line: string) => `<p style="margin:0 0 16px">${escaped(line)}</p>`;
  const link = letter.link
    ? `<p style="margin:0 0 16px"><a href="${escaped(letter.link.url)}" style="color:#A84A15">${escaped(letter.link.label)}</a></p>`
    : "";
  const html = `<!doctype html><html lang="en"><body style="font:15px/1.5 system-ui,sans-serif;color:#1B1F2A;background:#FAF8F3;padding:24px"><div style="max-width:560px">${letter.before.map(paragraph).join("")}${link}${after.map(paragraph).join("")}</div></body></html>`;
  await send({ to: letter.to, subject: singleLine(letter.subject), text: `${text}\n`, html });
}

/** A subject is one line: no header can be smuggled in through a name. */
function singleLine(text: string): string {
  return text.replace(/[\r\n\p{Cc}]+/gu, " ").slice(0, 200);
}

function escaped(text: string): string {
  return text.replaceAll("&", "&amp;").replaceAll("<", "&lt;").replaceAll(">", "&gt;").replaceAll('"', "&quot;");
}
