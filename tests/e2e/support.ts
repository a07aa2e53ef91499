import AxeBuilder from "@axe-core/playwright";
import { test as base, expect, type Page } from "@playwright/test";

/** A page on which nothing may break the content policy, fail in the console, or throw. */
export const test = base.extend<{ quietPage: Page }>({
  quietPage: async ({ page }, hand) => {
    const complaints: string[] = [];
    page.on("pageerror", (error) => complaints.push(`threw: ${error.message}`));
    page.on("console", (message) => {
      if (message.type() === "error" && !isExpected(message.text()))
        complaints.push(`said: ${message.text()}`);
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
    await hand(page);
    expect(complaints).toEqual([]);
  },
});

export { expect };

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

/** The browser reports refusals (401, 404, 409 …) that a test provokes as errors of its own. */
function isExpected(text: string): boolean {
  return /the server responded with a status of 4\d\d/.test(text);
}
