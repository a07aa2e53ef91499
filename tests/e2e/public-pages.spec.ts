import { expect, expectAccessible, expectNoSidewaysScroll, test } from "./support";

const PAGES = [
  { path: "/", heading: "Keep every net inside its rules" },
  { path: "/validation", heading: "Validation" },
  { path: "/sign-in", heading: "Sign in" },
  { path: "/sign-up", heading: "Make an account" },
  { path: "/forgot", heading: "Reset the password" },
  { path: "/reset", heading: "Choose a new password" },
  { path: "/verify", heading: "Confirm your address" },
];

for (const { path, heading } of PAGES) {
  test(`${path} answers signed out, within the content policy, accessible`, async ({ quietPage: page }) => {
    const response = await page.goto(path);
    expect(response?.status()).toBe(200);
    await expect(page.getByRole("heading", { level: 1, name: heading })).toBeVisible();
    await expectAccessible(page);
    await expectNoSidewaysScroll(page);
  });
}

test("the validation page shows every kind of comparison, and nothing beyond what is allowed", async ({
  quietPage: page,
}) => {
  await page.goto("/validation");
  await expect(page.getByRole("heading", { level: 2 })).toHaveText([
    /Field solver against finite elements/,
    /Field solver against exact values/,
    /Loss against finite elements/,
    /Waveforms against exact sums/,
    /Step responses against measured microstrips/,
    /Published formulas/,
  ]);
  const verdicts = page.getByRole("table").getByText(/^(pass|fail)$/);
  expect(await verdicts.count()).toBeGreaterThan(20);
  await expect(page.getByRole("table").getByText("fail", { exact: true })).toHaveCount(0);
  await page.getByText("Every case with its worst number").first().click();
  await expect(page.getByRole("rowheader", { name: "fem-microstrip-00" }).first()).toBeVisible();
});

test("answers carry the security headers", async ({ request }) => {
  const headers = (await request.get("/sign-in")).headers();
  expect(headers["content-security-policy"]).toContain("'strict-dynamic'");
  expect(headers["content-security-policy"]).not.toContain("unsafe-eval");
  expect(headers["x-content-type-options"]).toBe("nosniff");
  expect(headers["cross-origin-opener-policy"]).toBe("same-origin");
  expect(headers["referrer-policy"]).toBeTruthy();
  expect(headers["permissions-policy"]).toBeTruthy();
  expect(headers["x-powered-by"]).toBeUndefined();
  // Over plain HTTP this header would be ignored at best.
  expect(headers["strict-transport-security"]).toBeUndefined();
});

test("an address that is not there says so and leads on", async ({ quietPage: page }) => {
  const response = await page.goto("/no-such-page");
  expect(response?.status()).toBe(404);
  await expect(page.getByRole("heading", { level: 1 })).toContainText("nothing at this address");
  await expectAccessible(page);
});
