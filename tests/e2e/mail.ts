import { expect, type Page } from "@playwright/test";

/** The newest link in the local outbox whose message went to this address and whose link holds this text. */
export async function linkFromMail(page: Page, recipient: string, part: string): Promise<string> {
  const outbox = await page.context().newPage();
  try {
    const link = outbox
      .getByRole("listitem")
      .filter({ hasText: `To ${recipient}` })
      .locator(`a[href*="${part}"]`)
      .first();
    await expect(async () => {
      await outbox.goto("/dev/outbox");
      await expect(link).toBeVisible({ timeout: 500 });
    }).toPass();
    const href = await link.getAttribute("href");
    if (!href) throw new Error(`The message to ${recipient} holds no link with ${part}.`);
    return href;
  } finally {
    await outbox.close();
  }
}
