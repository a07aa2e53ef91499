import AxeBuilder from "@axe-core/playwright";
import {
  test as base,
  expect,
  type Browser,
  type BrowserContext,
  type Locator,
  type Page,
  type Response,
} from "@playwright/test";
import { type DemoAccount, readAccount, type Role } from "./people";

type SignedIn = Awaited<ReturnType<BrowserContext["storageState"]>>;

interface Fixtures {
  quietPage: Page;
  /** A quiet page of somebody of the demo team, in a browser of their own. */
  as: (role: Role) => Promise<Page>;
}

interface WorkerFixtures {
  /** Signs a role in once a worker. */
  signedIn: (role: Role, baseURL: string) => Promise<SignedIn>;
}

/** Pages on which nothing may break the content policy, fail in the console, or throw. */
export const test = base.extend<Fixtures, WorkerFixtures>({
  quietPage: async ({ page }, hand) => {
    const complaints = await listen(page);
    await hand(page);
    expect(complaints).toEqual([]);
  },

  as: async ({ browser, baseURL, signedIn }, hand) => {
    const opened: { page: Page; complaints: string[]; role: Role }[] = [];
    await hand(async (role) => {
      const context = await browser.newContext({
        storageState: await signedIn(role, baseURL ?? ""),
        permissions: ["clipboard-read", "clipboard-write"],
      });
      const page = await context.newPage();
      opened.push({ page, role, complaints: await listen(page) });
      return page;
    });
    const complaints = opened.flatMap((one) => one.complaints.map((said) => `${one.role}: ${said}`));
    for (const { page } of opened) await page.context().close();
    expect(complaints).toEqual([]);
  },

  signedIn: [
    async ({ browser }, hand) => {
      const states = new Map<Role, Promise<SignedIn>>();
      await hand((role, baseURL) => {
        const state = states.get(role) ?? signIn(browser, baseURL, readAccount(role));
        states.set(role, state);
        return state;
      });
    },
    { scope: "worker" },
  ],
});

export { expect };

/** Opens a page and waits until it answers to keys and clicks, which a person would hardly be quicker than. */
export async function visit(page: Page, path: string): Promise<Response | null> {
  const answer = await page.goto(path);
  await expect
    .poll(
      () =>
        page.evaluate(() => {
          const controls = [...document.querySelectorAll(":is(main, header) :is(button, input, select, a)")];
          return controls.every((control) => Object.keys(control).some((key) => key.startsWith("__react")));
        }),
      { message: `${path} comes to life` },
    )
    .toBe(true);
  return answer;
}

/** Types into a field that shows its value otherwise while nobody is in it, and settles it with Enter. */
export async function write(field: Locator, text: string): Promise<void> {
  await field.focus();
  await field.fill(text);
  await field.press("Enter");
}

/** No serious finding of axe on what is shown now. */
export async function expectAccessible(page: Page): Promise<void> {
  const { violations } = await new AxeBuilder({ page })
    .withTags(["wcag2a", "wcag2aa", "wcag21a", "wcag21aa", "wcag22aa"])
    .analyze();
  const serious = violations
    .filter(({ impact }) => impact === "serious" || impact === "critical")
    .map(({ id, nodes }) => ({ id, targets: nodes.map((node) => node.target.join(" ")) }));
  expect(serious).toEqual([]);
}

/** Nothing on the page is wider than the page. */
export async function expectNoSidewaysScroll(page: Page): Promise<void> {
  const over = await page.evaluate(
    () => document.documentElement.scrollWidth - document.documentElement.clientWidth,
  );
  expect(over).toBeLessThanOrEqual(0);
}

/** No number that is none reached the screen. */
export async function expectSensibleText(page: Page): Promise<void> {
  const text = await page.locator("body").innerText();
  expect(text).not.toMatch(/\b(?:NaN|undefined|Infinity|\[object \w+\])/);
}

/** Collects what this page complains of: refusals of the content policy, console errors, exceptions. */
export async function listen(page: Page): Promise<string[]> {
  const complaints: string[] = [];
  page.on("pageerror", (error) => complaints.push(`threw: ${error.message}`));
  page.on("console", (message) => {
    if (message.type() === "error" && !isExpected(message.text())) complaints.push(`said: ${message.text()}`);
  });
  await page.exposeFunction("reportPolicyViolation", (what: string) => complaints.push(`policy: ${what}`));
  await page.addInitScript(() => {
    document.addEventListener("securitypolicyviolation", (event) => {
      const { reportPolicyViolation } = window as unknown as {
        reportPolicyViolation: (what: string) => void;
      };
      reportPolicyViolation(`${event.effectiveDirective} ${event.blockedURI} ${event.sample}`);
    });
  });
  return complaints;
}

async function signIn(browser: Browser, baseURL: string, account: DemoAccount): Promise<SignedIn> {
  const context = await browser.newContext();
  const { email, password } = account;
  const answer = await context.request.post(`${baseURL}/api/auth/sign-in/email`, {
    data: { email, password },
    headers: { origin: baseURL },
  });
  expect(answer.status(), `${account.role} signs in`).toBe(200);
  const state = await context.storageState();
  await context.close();
  return state;
}

/** The browser reports refusals (401, 404, 409 …) that a test provokes as errors of its own. */
function isExpected(text: string): boolean {
  return /the server responded with a status of 4\d\d/.test(text);
}
