import "server-only";
import { and, eq, lt, sql } from "drizzle-orm";
import { getDb } from "@/lib/db/client";
import { now } from "@/lib/db/clock";
import { accountAttempt } from "@/lib/db/schema";

const WINDOW_MS = 15 * 60_000;

/** Attempts an account may see in a quarter of an hour, whatever address they come from. */
const ALLOWED: Record<string, number> = {
  "/sign-in/email": 10,
  "/sign-up/email": 5,
  "/request-password-reset": 3,
  "/send-verification-email": 3,
};

/** Counts an attempt; false when the account has had too many. Rate limits by client address stand beside it. */
export async function allowAttempt(path: string, email: string): Promise<boolean> {
  const allowed = ALLOWED[path];
  if (allowed === undefined) return true;
  const db = await getDb();
  const windowStart = Math.floor(now() / WINDOW_MS) * WINDOW_MS;
  const [row] = await db
    .insert(accountAttempt)
    .values({ account: email.trim().toLowerCase(), action: path, windowStart, count: 1 })
    .onConflictDoUpdate({
      target: [accountAttempt.account, accountAttempt.action, accountAttempt.windowStart],
      set: { count: sql`${accountAttempt.count} + 1` },
    })
    .returning({ count: accountAttempt.count });
  await db.delete(accountAttempt).where(and(eq(accountAttempt.action, path), lt(accountAttempt.windowStart, windowStart - WINDOW_MS)));
  return (row?.count ?? 0) <= allowed;
}
