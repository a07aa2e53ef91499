import { afterAll, afterEach, beforeAll, describe, expect, it } from "vitest";
import { readOutboxPage } from "@/lib/auth/outbox";
import { invitationMessage } from "@/lib/email/account-messages";
import { sendMail } from "@/lib/email/transport";
import { flagAssignedMessage, releaseMessage } from "@/lib/email/work-messages";
import { createTestDatabase, type TestDatabase } from "@/tests/support/database";
import { startMailServer } from "@/tests/support/mail-server";

const URL = "http://localhost:3000/x?a=1&b=2";
const NASTY = `<img src=x onerror=alert(1)> "A" & 'B'\r\nBcc: everybody@x.example`;
const messages = {
  invitation: invitationMessage("a@x.example", {
    inviterName: NASTY,
    teamName: NASTY,
    role: "designer",
    days: 7,
    url: URL,
  }),
  release: releaseMessage("a@x.example", {
    teamName: NASTY,
    projectName: NASTY,
    letter: "A",
    url: URL,
    expires: "1 May",
  }),
  flag: flagAssignedMessage("a@x.example", {
    by: NASTY,
    projectName: NASTY,
    subject: NASTY,
    comment: NASTY,
    url: URL,
  }),
};

let test: TestDatabase;
beforeAll(async () => {
  test = await createTestDatabase();
});
afterAll(() => test.close());
afterEach(() => {
  delete process.env.SMTP_URL;
  delete process.env.RINGFENCE_DEMO;
});

describe.each(Object.entries(messages))("the %s message", (_name, message) => {
  it("says the same as text and as HTML, link included", () => {
    expect(message.text).toContain(URL);
    expect(message.html).toContain(`href="${URL.replace("&", "&amp;")}"`);
  });

  it("turns nobody's name into markup or a header, and fetches nothing", () => {
    expect(message.html).not.toMatch(/<img|<script|src="|url\(|@import/);
    expect(message.subject).not.toMatch(/[\r\n]/);
  });

  it("arrives over SMTP as it was written, to its recipient alone", async () => {
    const server = await startMailServer();
    process.env.SMTP_URL = server.url;
    await sendMail(message);
    const arrived = await server.next("a@x.example");
    expect(arrived.subject).toBe(message.subject);
    expect(arrived.text?.trim()).toBe(message.text.replaceAll("\r\n", "\n").trim());
    expect(arrived.headers.has("bcc")).toBe(false);
    expect(server.waiting("everybody@x.example")).toBe(0);
    await server.close();
  });
});

describe("the outbox", () => {
  it("keeps what is not sent, newest first, and shows it only to whoever tries the product out", async () => {
    await sendMail(messages.release);
    await sendMail(messages.flag);
    expect(await readOutboxPage()).toBeNull();
    process.env.RINGFENCE_DEMO = "1";
    expect((await readOutboxPage())?.map(({ subject }) => subject)).toEqual([
      messages.flag.subject,
      messages.release.subject,
    ]);
  });

  it("has no page where mail is sent", async () => {
    process.env.RINGFENCE_DEMO = "1";
    process.env.SMTP_URL = "smtp://mail.example";
    expect(await readOutboxPage()).toBeNull();
  });

  it("does not hide that a mail server refused", async () => {
    process.env.SMTP_URL = "smtp://127.0.0.1:1";
    await expect(sendMail(messages.flag)).rejects.toThrow();
  });
});
