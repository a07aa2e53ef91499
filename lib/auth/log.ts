import "server-only";
import pino from "pino";

/** One line of JSON an event, to standard error; never a password, a token or a message's text. */
export const log = pino({ level: process.env.LOG_LEVEL ?? "warn" }, pino.destination(2));
