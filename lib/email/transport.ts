import "server-only";
import nodemailer, { type Transporter } from "nodemailer";
import { log } from "@/lib/db/log";
import { keepMessage } from "@/lib/db/outbox";
import type { Message } from "./message";

const holder = globalThis as typeof globalThis & {
  ringfenceMail?: { url: string; transporter: Transporter };
};

/**
 * Sends a message over SMTP (SMTP_URL), or keeps it in the local outbox where none is configured.
 * @throws Error when the mail server refuses it or cannot be reached
 */
export async function sendMail(message: Message): Promise<void> {
  const url = process.env.SMTP_URL;
  if (!url) {
    const { to, subject, text, html } = message;
    return keepMessage({ recipient: to, subject, text, html });
  }
  await transporterFor(url).sendMail({
    from: process.env.MAIL_FROM ?? "Ringfence <ringfence@localhost>",
    to: { name: "", address: message.to },
    subject: message.subject,
    text: message.text,
    html: message.html,
    disableFileAccess: true,
    disableUrlAccess: true,
  });
}

/**
 * Sends without making anybody wait. How long an answer takes then does not tell whether an address is known, and
 * a change that was made stands although the mail server is away; that it failed is logged.
 */
export function sendMailLater(message: Message): void {
  void sendMail(message).catch((error: unknown) => {
    log().error({ err: error, subject: message.subject }, "A message could not be sent.");
  });
}

/** Whether mail stays here. */
export function mailStaysLocal(): boolean {
  return !process.env.SMTP_URL;
}

function transporterFor(url: string): Transporter {
  if (holder.ringfenceMail?.url !== url) {
    holder.ringfenceMail?.transporter.close();
    holder.ringfenceMail = { url, transporter: nodemailer.createTransport(url) };
  }
  return holder.ringfenceMail.transporter;
}
