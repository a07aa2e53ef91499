import { eq } from "drizzle-orm";
import { afterAll, beforeAll, describe, expect, it, vi } from "vitest";
import { readSigned } from "@/lib/auth/session";
import { listAudit } from "@/lib/db/audit";
import { invitation, member, user } from "@/lib/db/schema";
import { systemActor } from "@/lib/schemas/actor";
import { AuthClient } from "@/tests/support/auth-client";
import { createTestDatabase, type TestDatabase } from "@/tests/support/database";
import { linkIn, startMailServer, type MailServer } from "@/tests/support/mail-server";
import { setAuthEnvironment, signedIn } from "@/tests/support/signed-in";

const PASSWORD = "four unrelated words here";
const HOUR_MS = 3_600_000;

let test: TestDatabase;
let mail: MailServer;
beforeAll(async () => {
  setAuthEnvironment();
  process.env.RATE_LIMITS = "off";
  test = await createTestDatabase();
  mail = await startMailServer();
  process.env.SMTP_URL = mail.url;
});
afterAll(async () => {
  delete process.env.SMTP_URL;
  await mail.close();
  await test.close();
});

async function signUp(email: string, password = PASSWORD): Promise<AuthClient> {
  const client = new AuthClient();
  const answer = await client.post("/sign-up/email", {
    name: "Ada",
    email,
    password,
    callbackURL: "/projects",
  });
  expect(answer.status).toBe(200);
  return client;
}

async function signUpVerified(email: string): Promise<AuthClient> {
  const client = await signUp(email);
  await client.open(linkIn(await mail.next(email)));
  expect((await readSigned(client.headers))?.person.email).toBe(email);
  return client;
}

async function makeTeam(owner: AuthClient, slug: string): Promise<string> {
  const made = await owner.post("/organization/create", { name: `Team ${slug}`, slug });
  expect(made.status).toBe(200);
  return (made.body as { id: string }).id;
}

/** Invites and reads the invitation's id off the link in the message. */
async function invite(owner: AuthClient, email: string, role: unknown): Promise<string> {
  const answer = await owner.post("/organization/invite-member", { email, role });
  expect(answer).toMatchObject({ status: 200 });
  const link = linkIn(await mail.next(email));
  expect(link.pathname).toMatch(/^\/invitation\//);
  return link.pathname.split("/").at(-1) ?? "";
}

/** What somebody sees later on, with only the clock of this process moved. */
async function later<T>(ms: number, act: () => Promise<T>): Promise<T> {
  vi.useFakeTimers({ toFake: ["Date"], now: Date.now() + ms });
  try {
    return await act();
  } finally {
    vi.useRealTimers();
  }
}

describe("an account", () => {
  it("cannot be used before its address is confirmed; the link signs in, once", async () => {
    const email = "verify@x.example";
    const client = await signUp(email);
    expect(await readSigned(client.headers)).toBeNull();
    expect(await client.post("/sign-in/email", { email, password: PASSWORD })).toMatchObject({ status: 403 });
    const message = await mail.next(email);
    expect(message.subject).toBe("Confirm your address");
    expect(message.html).not.toMatch(/<img|src=|url\(/);
    const link = linkIn(message);

    expect(await client.open(link)).toMatchObject({ status: 302, location: "/projects" });
    expect((await readSigned(client.headers))?.actor).toBeNull();
    const replay = new AuthClient();
    await replay.open(link);
    expect(await readSigned(replay.headers)).toBeNull();
    expect(await new AuthClient().post("/sign-in/email", { email, password: PASSWORD })).toMatchObject({
      status: 200,
    });
  });

  it("is not confirmed by a link that was altered or is older than an hour", async () => {
    const email = "stale@x.example";
    await signUp(email);
    const link = linkIn(await mail.next(email));
    const altered = new URL(link);
    altered.searchParams.set("token", `${link.searchParams.get("token") ?? ""}x`);
    expect((await new AuthClient().open(altered)).location).toContain("error=INVALID_TOKEN");
    const late = await later(HOUR_MS + 1000, () => new AuthClient().open(link));
    expect(late.location).toContain("error=TOKEN_EXPIRED");
    expect((await test.db.select().from(user).where(eq(user.email, email)))[0]?.emailVerified).toBe(false);
  });

  it("made a second time answers the same as the first, and tells only the address", async () => {
    const email = "twice@x.example";
    await signUpVerified(email);
    const again = await new AuthClient().post("/sign-up/email", {
      name: "Eve",
      email,
      password: "another one entirely",
    });
    expect(again.status).toBe(200);
    expect((await mail.next(email)).subject).toBe("You have an account already");
    expect(
      await new AuthClient().post("/sign-in/email", { email, password: "another one entirely" }),
    ).toMatchObject({
      status: 401,
    });
  });

  it("takes a new password by a link that works once and ends every session", async () => {
    const email = "reset@x.example";
    const client = await signUpVerified(email);
    await client.post("/request-password-reset", { email, redirectTo: "/reset" });
    const link = linkIn(await mail.next(email));
    const page = await new AuthClient().open(link);
    const token = new URL(page.location ?? "", "http://localhost:3000").searchParams.get("token");
    const newPassword = "quite another passphrase";
    expect(await new AuthClient().post("/reset-password", { token, newPassword })).toMatchObject({
      status: 200,
    });
    expect(await readSigned(client.headers)).toBeNull();
    expect(await new AuthClient().post("/reset-password", { token, newPassword: PASSWORD })).toMatchObject({
      status: 400,
    });
    expect(await new AuthClient().post("/sign-in/email", { email, password: PASSWORD })).toMatchObject({
      status: 401,
    });
    expect(await new AuthClient().post("/sign-in/email", { email, password: newPassword })).toMatchObject({
      status: 200,
    });
  });

  it("keeps its password when the reset link is older than an hour", async () => {
    const email = "late-reset@x.example";
    await signUpVerified(email);
    await new AuthClient().post("/request-password-reset", { email, redirectTo: "/reset" });
    const token = linkIn(await mail.next(email))
      .pathname.split("/")
      .at(-1);
    const late = await later(HOUR_MS + 1000, () =>
      new AuthClient().post("/reset-password", { token, newPassword: "too late for this" }),
    );
    expect(late.status).toBe(400);
    expect(await new AuthClient().post("/sign-in/email", { email, password: PASSWORD })).toMatchObject({
      status: 200,
    });
  });

  it("that does not exist is answered like one that does, and gets no mail", async () => {
    const known = await new AuthClient().post("/request-password-reset", {
      email: "twice@x.example",
      redirectTo: "/reset",
    });
    const unknown = await new AuthClient().post("/request-password-reset", {
      email: "nobody@x.example",
      redirectTo: "/reset",
    });
    expect(unknown).toEqual(known);
    expect(mail.waiting("nobody@x.example")).toBe(0);
  });

  it("sends nobody to another site", async () => {
    const body = { email: "twice@x.example", redirectTo: "https://elsewhere.example/" };
    expect(await new AuthClient().post("/request-password-reset", body)).toMatchObject({ status: 403 });
  });

  it("takes no request of another site with its cookies", async () => {
    const client = await signUpVerified("forged@x.example");
    const forged = await client.post(
      "/update-user",
      { name: "Mallory" },
      { origin: "https://elsewhere.example" },
    );
    expect(forged.status).toBe(403);
  });
});

describe("a team", () => {
  it("takes in whom it invited, in the role it offered, at the confirmed address, once", async () => {
    const owner = await signUpVerified("owner@team.example");
    const teamId = await makeTeam(owner, "takes-in");
    expect((await readSigned(owner.headers))?.actor).toMatchObject({ teamId, role: "owner" });
    const invitationId = await invite(owner, "new@team.example", "reviewer");

    const stranger = await signUpVerified("stranger@team.example");
    expect(await stranger.post("/organization/accept-invitation", { invitationId })).toMatchObject({
      status: 403,
    });
    expect(
      (await stranger.get(`/organization/get-invitation?id=${invitationId}`)).status,
    ).toBeGreaterThanOrEqual(400);
    expect(await new AuthClient().post("/organization/accept-invitation", { invitationId })).toMatchObject({
      status: 401,
    });

    const guest = await signUpVerified("new@team.example");
    expect(await guest.post("/organization/accept-invitation", { invitationId })).toMatchObject({
      status: 200,
    });
    expect((await readSigned(guest.headers))?.actor).toMatchObject({ teamId, role: "reviewer" });
    expect(await guest.post("/organization/accept-invitation", { invitationId })).toMatchObject({
      status: 400,
    });

    const log = await listAudit(systemActor(teamId));
    expect(log.map(({ action }) => action)).toEqual([
      "invitation.accept",
      "invitation.create",
      "team.create",
    ]);
  });

  it("does not take in an address that is no longer confirmed", async () => {
    const owner = await signUpVerified("owner@unconfirmed.example");
    await makeTeam(owner, "unconfirmed");
    const invitationId = await invite(owner, "half@unconfirmed.example", "designer");
    const guest = await signUpVerified("half@unconfirmed.example");
    await test.db
      .update(user)
      .set({ emailVerified: false })
      .where(eq(user.email, "half@unconfirmed.example"));
    expect((await guest.post("/organization/accept-invitation", { invitationId })).status).toBe(403);
    expect(await readSigned(guest.headers)).toBeNull();
  });

  it("does not honour an invitation that is older than a week, was withdrawn or was declined", async () => {
    const owner = await signUpVerified("owner@late.example");
    await makeTeam(owner, "late");
    const guest = await signUpVerified("guest@late.example");
    const old = await invite(owner, "guest@late.example", "designer");
    await test.db
      .update(invitation)
      .set({ expiresAt: new Date(Date.now() - 1000) })
      .where(eq(invitation.id, old));
    expect(await guest.post("/organization/accept-invitation", { invitationId: old })).toMatchObject({
      status: 400,
    });
    const withdrawn = await invite(owner, "guest@late.example", "designer");
    await owner.post("/organization/cancel-invitation", { invitationId: withdrawn });
    expect(await guest.post("/organization/accept-invitation", { invitationId: withdrawn })).toMatchObject({
      status: 400,
    });
    const declined = await invite(owner, "guest@late.example", "designer");
    await guest.post("/organization/reject-invitation", { invitationId: declined });
    expect(await guest.post("/organization/accept-invitation", { invitationId: declined })).toMatchObject({
      status: 400,
    });
    expect((await readSigned(guest.headers))?.actor).toBeNull();
  });

  it.each([
    ["of the package's own", "admin"],
    ["of the package's own", "member"],
    ["padded", "reviewer "],
    ["padded with a second", "reviewer,owner"],
    ["given as a list", ["reviewer"]],
    ["given as a list", ["designer", "owner"]],
    ["in other letters", "Owner"],
    ["of a prototype", "constructor"],
    ["missing", ""],
  ])("refuses a role that is %s: %j", async (_what, role) => {
    const owner = new AuthClient();
    const headers = await signedIn(test.own.actors.owner);
    const invited = await owner.post(
      "/organization/invite-member",
      { email: "role@x.example", role },
      headers,
    );
    expect(invited.status).toBe(400);
    const [reviewer] = await test.db
      .select()
      .from(member)
      .where(eq(member.userId, test.own.actors.reviewer.userId));
    const body = { memberId: reviewer?.id, role, organizationId: test.own.id };
    expect((await owner.post("/organization/update-member-role", body, headers)).status).toBe(400);
    expect(
      (
        await test.db
          .select()
          .from(member)
          .where(eq(member.id, reviewer?.id ?? ""))
      )[0]?.role,
    ).toBe("reviewer");
  });

  it.each(["designer", "reviewer", "manufacturer"] as const)(
    "lets no %s invite, change roles, rename or remove",
    async (role) => {
      const headers = await signedIn(test.own.actors[role]);
      const client = new AuthClient();
      const [target] = await test.db
        .select()
        .from(member)
        .where(eq(member.userId, test.own.actors.owner.userId));
      const attempts: [string, unknown][] = [
        ["/organization/invite-member", { email: "x@x.example", role: "owner" }],
        ["/organization/update-member-role", { memberId: target?.id, role: "designer" }],
        ["/organization/remove-member", { memberIdOrEmail: target?.id }],
        ["/organization/update", { data: { name: "Taken over" } }],
        ["/organization/delete", { organizationId: test.own.id }],
      ];
      for (const [path, body] of attempts)
        expect((await client.post(path, body, headers)).status, path).toBeGreaterThanOrEqual(400);
    },
  );

  it("cannot be deleted, even by its owner: what was signed stays", async () => {
    const headers = await signedIn(test.own.actors.owner);
    const answer = await new AuthClient().post(
      "/organization/delete",
      { organizationId: test.own.id },
      headers,
    );
    expect(answer.status).toBeGreaterThanOrEqual(400);
  });

  it("shows its people to its own, but to no manufacturer and no other team", async () => {
    const see = async (actor: typeof test.own.actors.owner, path: string) => {
      const client = new AuthClient();
      const { cookie = "" } = await signedIn(actor);
      const [name = "", value = ""] = cookie.split(/=(.*)/s);
      client.cookies.set(name, value);
      return client.get(path);
    };
    const paths = [
      "/organization/get-full-organization",
      `/organization/get-full-organization?organizationId=${test.own.id}`,
      "/organization/get-full-organization?organizationSlug=saltmarsh",
      `/organization/list-members?organizationId=${test.own.id}`,
      "/organization/list-members?organizationSlug=saltmarsh",
    ];
    for (const path of paths) {
      expect((await see(test.own.actors.designer, path)).status, path).toBe(200);
      expect((await see(test.own.actors.manufacturer, path)).status, path).toBe(403);
      if (path.includes("?"))
        expect((await see(test.other.actors.owner, path)).status, path).toBeGreaterThanOrEqual(400);
    }
  });

  it("that somebody left is theirs no longer at once, and a changed role holds at once", async () => {
    const owner = await signUpVerified("owner@leaving.example");
    const teamId = await makeTeam(owner, "leaving");
    const guest = await signUpVerified("guest@leaving.example");
    const invitationId = await invite(owner, "guest@leaving.example", "designer");
    await guest.post("/organization/accept-invitation", { invitationId });
    const guestId = (await readSigned(guest.headers))?.person.userId ?? "";
    const [row] = await test.db.select().from(member).where(eq(member.userId, guestId));
    await owner.post("/organization/update-member-role", { memberId: row?.id, role: "reviewer" });
    expect((await readSigned(guest.headers))?.actor?.role).toBe("reviewer");
    await owner.post("/organization/remove-member", { memberIdOrEmail: row?.id });
    expect((await readSigned(guest.headers))?.actor).toBeNull();
    const actions = (await listAudit(systemActor(teamId))).map(({ action }) => action);
    expect(actions.slice(0, 2)).toEqual(["member.remove", "member.role"]);
  });

  it("keeps at least one owner", async () => {
    const owner = await signUpVerified("owner@alone.example");
    const teamId = await makeTeam(owner, "alone");
    const userId = (await readSigned(owner.headers))?.person.userId ?? "";
    const [row] = await test.db.select().from(member).where(eq(member.userId, userId));
    expect(
      (await owner.post("/organization/update-member-role", { memberId: row?.id, role: "designer" })).status,
    ).toBe(400);
    expect((await owner.post("/organization/leave", { organizationId: teamId })).status).toBe(400);
    expect((await owner.post("/organization/remove-member", { memberIdOrEmail: row?.id })).status).toBe(400);
  });
});
