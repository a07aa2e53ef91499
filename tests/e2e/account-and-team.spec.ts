import type { Browser, Page } from "@playwright/test";
import { linkFromMail } from "./mail";
import { expect, expectAccessible, expectNoSidewaysScroll, test } from "./support";

const PASSWORD = "harbour lantern 42";

/** Nobody else in this database has this address. */
function newAddress(name: string): string {
  return `${name}-${crypto.randomUUID().slice(0, 8)}@example.org`;
}

async function signUp(page: Page, name: string, email: string): Promise<void> {
  await page.getByLabel("Your name").fill(name);
  await page.getByLabel("E-mail address").fill(email);
  await page.getByLabel("Password").fill(PASSWORD);
  await page.getByRole("button", { name: "Make the account" }).click();
  await expect(page.getByRole("heading", { name: "Confirm your address" })).toBeVisible();
  await page.goto(await linkFromMail(page, email, "verify-email"));
}

async function signIn(page: Page, email: string, password: string): Promise<void> {
  await page.goto("/sign-in");
  await page.getByLabel("E-mail address").fill(email);
  await page.getByLabel("Password").fill(password);
  await page.getByRole("button", { name: "Sign in", exact: true }).click();
}

async function makeOwner(page: Page, team: string): Promise<string> {
  const email = newAddress("owner");
  await page.goto("/sign-up");
  await signUp(page, "Olive Owner", email);
  await page.goto("/create-team");
  await page.getByLabel("Name of the team").fill(team);
  await page.getByRole("button", { name: "Make the team" }).click();
  await page.waitForURL("**/projects");
  return email;
}

async function stranger(browser: Browser): Promise<Page> {
  const context = await browser.newContext();
  return context.newPage();
}

test("an account is made, confirmed by mail, signed out and its password reset by a link that works once", async ({
  quietPage: page,
}) => {
  const email = newAddress("person");
  await page.goto("/sign-up");
  await page.getByRole("button", { name: "Make the account" }).click();
  await expect(page.getByText("Give it a name.")).toBeVisible();
  await expect(page.getByText("Use at least 10 characters", { exact: false })).toBeVisible();
  await signUp(page, "Petra Person", email);
  await page.waitForURL("**/create-team");
  await expectAccessible(page);

  await page.context().clearCookies();
  await signIn(page, email, "not the password");
  await expect(page.getByRole("alert").first()).toContainText("do not go together");

  await page.goto("/forgot");
  await page.getByLabel("E-mail address").fill(email);
  await page.getByRole("button", { name: "Send the link" }).click();
  await expect(page.getByRole("status")).toContainText("is on its way");
  const link = await linkFromMail(page, email, "reset-password");
  for (const [password, outcome] of [
    ["another lantern 43", "The password is changed."],
    ["a third lantern 44", "This link was used already"],
  ] as const) {
    await page.goto(link);
    const field = page.getByLabel("New password");
    if (await field.isVisible()) {
      await field.fill(password);
      await page.getByRole("button", { name: "Change the password" }).click();
    }
    await expect(page.getByText(outcome, { exact: false })).toBeVisible();
  }

  await signIn(page, email, "another lantern 43");
  await page.waitForURL("**/create-team");
});

test("an owner invites, the invited joins as what they were asked to be, roles change, people leave", async ({
  quietPage: page,
  browser,
}) => {
  await makeOwner(page, "Harbour Boards");
  await page.goto("/team");
  await expect(page.getByRole("table", { name: "Members" })).toContainText("Olive Owner");
  await expectAccessible(page);
  await expectNoSidewaysScroll(page);

  const invited = newAddress("designer");
  await page.getByLabel("E-mail address").fill(invited);
  await page.getByRole("combobox", { name: "Role", exact: true }).selectOption("designer");
  await page.getByRole("button", { name: "Invite" }).click();
  await expect(page.getByText(invited)).toBeVisible();

  const guest = await stranger(browser);
  await guest.goto(await linkFromMail(page, invited, "/invitation/"));
  await guest.getByRole("link", { name: "Make an account" }).click();
  await signUp(guest, "Dora Designer", invited);
  await guest.waitForURL("**/invitation/*");
  await expect(guest.getByRole("main")).toContainText("Harbour Boards");
  await expect(guest.getByRole("main")).toContainText("as designer");
  await guest.getByRole("button", { name: "Join the team" }).click();
  await guest.waitForURL("**/projects");
  await guest.goto("/team");
  await expect(guest.getByRole("table", { name: "Members" })).toContainText("Dora Designer");
  // A designer sees who is there, and can change nothing.
  await expect(guest.getByRole("button", { name: "Invite" })).toHaveCount(0);
  await expect(guest.getByRole("button", { name: /^Remove/ })).toHaveCount(0);

  await page.reload();
  await page.getByRole("combobox", { name: "Role of Dora Designer" }).selectOption("reviewer");
  await expect(page.getByText("The role is changed.")).toBeVisible();
  await guest.reload();
  await expect(guest.getByRole("row", { name: /Dora Designer/ })).toContainText("reviewer");

  await page.getByRole("button", { name: "Remove Dora Designer" }).click();
  await page.getByRole("dialog").getByRole("button", { name: "Remove" }).click();
  await expect(page.getByText("no longer belongs to the team")).toBeVisible();
  await guest.goto("/team");
  await guest.waitForURL("**/create-team");

  await page.getByRole("button", { name: "Leave the team" }).click();
  await page.getByRole("dialog").getByRole("button", { name: "Leave" }).click();
  await expect(page.getByText("You are the only owner.", { exact: false })).toBeVisible();
});

test("a withdrawn invitation and one to another address admit nobody", async ({
  quietPage: page,
  browser,
}) => {
  await makeOwner(page, "Quay Boards");
  await page.goto("/team");
  const invited = newAddress("late");
  await page.getByLabel("E-mail address").fill(invited);
  await page.getByRole("button", { name: "Invite" }).click();
  await expect(page.getByText(invited)).toBeVisible();
  const link = await linkFromMail(page, invited, "/invitation/");

  const other = await stranger(browser);
  await other.goto("/sign-up");
  await signUp(other, "Otto Other", newAddress("other"));
  await other.goto(link);
  await expect(other.getByRole("alert").first()).toContainText("another address");

  await page.getByRole("button", { name: `Withdraw the invitation of ${invited}` }).click();
  await expect(page.getByText("The invitation is withdrawn.")).toBeVisible();
  const late = await stranger(browser);
  await late.goto(link);
  await late.getByRole("link", { name: "Make an account" }).click();
  await signUp(late, "Lena Late", invited);
  await late.waitForURL("**/invitation/*");
  await expect(late.getByRole("alert").first()).toBeVisible();
  await expect(late.getByRole("button", { name: "Join the team" })).toHaveCount(0);
});

test("a page that needs a person leads through sign-in and back", async ({ quietPage: page }) => {
  await page.goto("/team");
  await page.waitForURL("**/sign-in?next=%2Fteam");
  await page.goto("/sign-in?next=//elsewhere.example/");
  await expect(page.getByRole("link", { name: "Make an account" })).toHaveAttribute("href", "/sign-up");
});
