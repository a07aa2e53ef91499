import "server-only";
import { APIError } from "better-auth/api";
import { clearAttempts, countAttempt } from "@/lib/db/attempt";
import { rateLimitsOn } from "./environment";

const MINUTE_MS = 60_000;
const HOUR_MS = 60 * MINUTE_MS;

interface AccountLimit {
  action: string;
  max: number;
  windowMs: number;
}

/**
 * Limits per account, whatever address the client claims to have: the address comes from a header that can be
 * forged, the account that is guessed at or written to cannot.
 */
const LIMITS: Readonly<Record<string, AccountLimit>> = {
  "/sign-in/email": { action: "sign-in", max: 10, windowMs: 15 * MINUTE_MS },
  "/sign-up/email": { action: "sign-up", max: 5, windowMs: HOUR_MS },
  "/request-password-reset": { action: "reset", max: 5, windowMs: HOUR_MS },
  "/send-verification-email": { action: "verify", max: 5, windowMs: HOUR_MS },
  "/organization/invite-member": { action: "invite", max: 10, windowMs: 24 * HOUR_MS },
};

/**
 * Counts a request against the account it names.
 * @throws APIError 429 where there were too many
 */
export async function limitAccount(path: string, body: unknown): Promise<void> {
  const limit = LIMITS[path];
  const email = emailOf(body);
  if (!limit || email === null || !rateLimitsOn()) return;
  const { count, endsAt } = await countAttempt(email, limit.action, limit.windowMs);
  if (count <= limit.max) return;
  const minutes = Math.max(1, Math.ceil((endsAt - Date.now()) / MINUTE_MS));
  throw new APIError("TOO_MANY_REQUESTS", {
    code: "TOO_MANY_ATTEMPTS",
    message: `Too many attempts for this account. Wait ${minutes} min, then try again.`,
  });
}

/** After the right password, or a new one, earlier failures no longer count. */
export async function forgiveSignIns(email: string): Promise<void> {
  await clearAttempts(email, "sign-in");
}

export function emailOf(body: unknown): string | null {
  const email = body !== null && typeof body === "object" && "email" in body ? body.email : null;
  return typeof email === "string" && email !== "" ? email : null;
}
