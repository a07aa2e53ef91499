import { createHmac, randomBytes } from "node:crypto";
import { getDb } from "@/lib/db/client";
import { newId } from "@/lib/db/ids";
import { session } from "@/lib/db/schema";
import type { UserActor } from "@/lib/schemas/actor";

export const TEST_URL = "http://localhost:3000";
export const TEST_SECRET = "a secret for tests alone, of thirty-two characters or more";

/** What the auth instance reads from the environment; before the first getAuth(). */
export function setAuthEnvironment(): void {
  process.env.BETTER_AUTH_URL = TEST_URL;
  process.env.BETTER_AUTH_SECRET = TEST_SECRET;
}

/** Headers of a browser in which the actor is signed in, working in their team. */
export async function signedIn(actor: UserActor): Promise<Record<string, string>> {
  setAuthEnvironment();
  const token = randomBytes(24).toString("base64url");
  const at = new Date();
  const db = await getDb();
  await db.insert(session).values({
    id: newId(),
    token,
    userId: actor.userId,
    activeOrganizationId: actor.teamId,
    expiresAt: new Date(at.getTime() + 3_600_000),
    createdAt: at,
    updatedAt: at,
  });
  const signature = createHmac("sha256", TEST_SECRET).update(token).digest("base64");
  return {
    cookie: `better-auth.session_token=${encodeURIComponent(`${token}.${signature}`)}`,
    origin: TEST_URL,
  };
}
