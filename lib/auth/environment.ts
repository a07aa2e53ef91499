import "server-only";

const LOCAL_NAMES = new Set(["localhost", "127.0.0.1", "[::1]"]);

/** The address that people type, without a slash at its end; links in mail begin with it. */
export function baseUrl(): string {
  const { BETTER_AUTH_URL, APP_URL, BASE_URL, PORT } = process.env;
  return (BETTER_AUTH_URL ?? APP_URL ?? BASE_URL ?? `http://localhost:${PORT ?? "3000"}`).replace(/\/+$/, "");
}

/** Cookies travel over HTTPS alone; only a server for this very computer may do without. */
export function secureCookies(): boolean {
  const { protocol, hostname } = new URL(baseUrl());
  return !(protocol === "http:" && LOCAL_NAMES.has(hostname));
}

/** @throws Error where no usable secret is set */
export function authSecret(): string {
  const secret = process.env.BETTER_AUTH_SECRET;
  if (secret && secret.length >= 32) return secret;
  throw new Error(
    "BETTER_AUTH_SECRET is missing or shorter than 32 characters, so sessions cannot be signed. " +
      "Start with `npm start`, which makes one, or set it.",
  );
}

/** Limits on the rate of requests; browser tests turn them off. */
export function rateLimitsOn(): boolean {
  return process.env.RATE_LIMITS !== "off";
}

/** The header in which the proxy in front of us writes the client's address. */
export function clientAddressHeader(): string {
  return process.env.CLIENT_ADDRESS_HEADER ?? "x-forwarded-for";
}

/** Whether pages that help whoever tries this out exist: the demo, a server for this computer alone, development. */
export function isTrial(): boolean {
  const { RINGFENCE_DEMO, RINGFENCE_LOCAL, NODE_ENV } = process.env;
  return RINGFENCE_DEMO === "1" || RINGFENCE_LOCAL === "1" || NODE_ENV === "development";
}
