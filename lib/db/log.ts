import "server-only";
import pino, { type Logger } from "pino";

const holder = globalThis as typeof globalThis & { ringfenceLog?: Logger };

/** What the server says to whoever runs it: one JSON line each, LOG_LEVEL and above. Silent in tests. */
export function log(): Logger {
  return (holder.ringfenceLog ??= pino({
    name: "ringfence",
    level: process.env.LOG_LEVEL ?? (process.env.NODE_ENV === "test" ? "silent" : "info"),
    redact: ["password", "token", "*.password", "*.token", "headers.cookie"],
  }));
}
