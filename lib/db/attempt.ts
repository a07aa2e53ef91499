import "server-only";
import { createHash } from "node:crypto";
import { and, eq, lt, sql } from "drizzle-orm";
import { getDb } from "./client";
import { now } from "./clock";
import { accountAttempt } from "./schema";

/** Attempts are made before anybody is known, so these functions take no actor. */

/** Longer than the longest window that is counted. */
const KEPT_MS = 24 * 3_600_000;

/** Counts one attempt on an account within the present window, and says the count and when the window ends. */
export async function countAttempt(
  account: string,
  action: string,
  windowMs: number,
): Promise<{ count: number; endsAt: number }> {
  const db = await getDb();
  const at = now();
  const windowStart = at - (at % windowMs);
  const [, [row]] = await db.batch([
    db.delete(accountAttempt).where(lt(accountAttempt.windowStart, at - KEPT_MS)),
    db
      .insert(accountAttempt)
      .values({ account: digest(account), action, windowStart, count: 1 })
      .onConflictDoUpdate({
        target: [accountAttempt.account, accountAttempt.action, accountAttempt.windowStart],
        set: { count: sql`${accountAttempt.count} + 1` },
      })
      .returning({ count: accountAttempt.count }),
  ]);
  return { count: row?.count ?? 1, endsAt: windowStart + windowMs };
}

/** Forgets an account's attempts, after one that was right. */
export async function clearAttempts(account: string, action: string): Promise<void> {
  const db = await getDb();
  await db
    .delete(accountAttempt)
    .where(and(eq(accountAttempt.account, digest(account)), eq(accountAttempt.action, action)));
}

/** Addresses that somebody typed are counted, not kept. */
function digest(account: string): string {
  return createHash("sha256").update(account.trim().toLowerCase()).digest("hex");
}
