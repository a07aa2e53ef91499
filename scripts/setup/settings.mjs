import { randomBytes } from "node:crypto";
import { existsSync, mkdirSync, readdirSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import path from "node:path";
import { SetupError } from "./run.mjs";

const LOCAL_NAMES = new Set(["localhost", "127.0.0.1", "::1", "[::1]"]);

/**
 * Everything that the start needs to know, from the environment and the data folder.
 * The folder is made here, readable by its owner alone.
 */
export function readSettings() {
  const port = Number(process.env.PORT ?? 3000);
  if (!Number.isInteger(port) || port < 1 || port > 65535) {
    throw new SetupError(`PORT is '${process.env.PORT}', which is no port. Write a number from 1 to 65535.`);
  }
  const host = process.env.HOST ?? "127.0.0.1";
  const url = (process.env.BASE_URL ?? `http://localhost:${port}`).replace(/\/+$/, "");
  if (!URL.canParse(url)) {
    throw new SetupError(
      `BASE_URL is '${url}', which is no address. Write one such as https://board.example.org.`,
    );
  }
  const dataDir = path.resolve(process.env.DATA_DIR ?? "data");
  mkdirSync(dataDir, { recursive: true, mode: 0o700 });

  const seedingMark = path.join(dataDir, "demo-unfinished");
  if (existsSync(seedingMark)) discardHalfMade(dataDir, seedingMark);

  const embedded = !process.env.DATABASE_URL;
  const fresh = embedded && !readdirSync(dataDir).some((name) => name.endsWith(".db"));
  const local = LOCAL_NAMES.has(host) && LOCAL_NAMES.has(new URL(url).hostname);
  const demoFile = path.join(dataDir, "demo-accounts.json");
  const seeded = existsSync(demoFile);
  if (seeded && !(local && embedded)) {
    throw new SetupError(
      "This data folder holds the demo accounts, whose passwords are shown to whoever opens the sign-in page. " +
        "Serve others from a new one: set DATA_DIR to an empty folder.",
    );
  }
  const demoWanted = process.env.DEMO !== "0" && local && embedded;
  return {
    port,
    host,
    url,
    dataDir,
    fresh,
    demoFile,
    demoWanted,
    local,
    seedingMark,
    secret: readSecret(dataDir),
  };
}

/** Removes a demo database whose making was cut short; nobody has used it yet. */
function discardHalfMade(dataDir, seedingMark) {
  for (const name of readdirSync(dataDir)) {
    if (/\.db(-wal|-shm)?$/.test(name) || name === "demo-accounts.json") rmSync(path.join(dataDir, name));
  }
  rmSync(seedingMark);
}

/** The environment of everything we start. */
export function childEnvironment(settings, { demo }) {
  return {
    ...process.env,
    PORT: String(settings.port),
    DATA_DIR: settings.dataDir,
    BASE_URL: settings.url,
    BETTER_AUTH_SECRET: settings.secret,
    RINGFENCE_DEMO: demo ? "1" : "0",
    RINGFENCE_LOCAL: settings.local ? "1" : "0",
    NEXT_TELEMETRY_DISABLED: "1",
  };
}

/** The secret that signs sessions: from the environment, else made once and kept. */
function readSecret(dataDir) {
  if (process.env.BETTER_AUTH_SECRET) return process.env.BETTER_AUTH_SECRET;
  const file = path.join(dataDir, "secrets.json");
  if (existsSync(file)) {
    const kept = JSON.parse(readFileSync(file, "utf8")).BETTER_AUTH_SECRET;
    if (typeof kept === "string" && kept.length >= 32) return kept;
    throw new SetupError(
      "secrets.json in the data folder holds no usable secret. Remove it to have a new one made.",
    );
  }
  const made = randomBytes(32).toString("base64url");
  writeFileSync(file, `${JSON.stringify({ BETTER_AUTH_SECRET: made }, null, 2)}\n`, { mode: 0o600 });
  return made;
}
