import "server-only";
import { readFileSync } from "node:fs";
import path from "node:path";

/** The address people type; links in mail and the origin check use it. */
export function baseUrl(): string {
  return process.env.BASE_URL ?? `http://localhost:${process.env.PORT ?? "3000"}`;
}

export const isSecure = () => baseUrl().startsWith("https:");

/** BETTER_AUTH_SECRET, else the one that set-up made in DATA_DIR. */
export function authSecret(): string {
  const given = process.env.BETTER_AUTH_SECRET;
  if (given) return given;
  const file = path.resolve(/* turbopackIgnore: true */ process.env.DATA_DIR ?? "data", "secrets.json");
  const made = (JSON.parse(readFileSync(/* turbopackIgnore: true */ file, "utf8")) as { BETTER_AUTH_SECRET?: string }).BETTER_AUTH_SECRET;
  if (!made) throw new Error("There is no secret to sign sessions with. Start with npm start, or set BETTER_AUTH_SECRET.");
  return made;
}

/** On, unless browser tests that sign in many times switch them off on localhost. */
export function rateLimitsOn(): boolean {
  return !(process.env.RATE_LIMITS === "0" && /^http:\/\/localhost(:|$)/.test(baseUrl()));
}
