import "server-only";
import { mkdirSync } from "node:fs";
import path from "node:path";
import { createClient, type Client } from "@libsql/client";
import { drizzle, type LibSQLDatabase } from "drizzle-orm/libsql";
import * as schema from "./schema";
import { withWriteQueue } from "./write-queue";

export type Database = LibSQLDatabase<typeof schema>;

export interface OpenDatabase {
  db: Database;
  client: Client;
  url: string;
  close(): void;
}

const shared = globalThis as typeof globalThis & { __ringfenceDatabase?: Promise<OpenDatabase> };

/** The process's one database, opened at first use. */
export async function getDb(): Promise<Database> {
  return (await openedDatabase()).db;
}

/** The same with its client and address; a failed opening is tried again at the next use. */
export function openedDatabase(): Promise<OpenDatabase> {
  return (shared.__ringfenceDatabase ??= openDatabase(databaseUrl()).catch((error: unknown) => {
    shared.__ringfenceDatabase = undefined;
    throw error;
  }));
}

/** Makes tests and scripts work on a database of their own; null goes back to the configured one. */
export async function replaceDatabase(open: OpenDatabase | null): Promise<void> {
  if (open) shared.__ringfenceDatabase = Promise.resolve(open);
  else await closeDb();
}

export async function closeDb(): Promise<void> {
  const open = shared.__ringfenceDatabase;
  shared.__ringfenceDatabase = undefined;
  (await open?.catch(() => undefined))?.close();
}

/** Where the data lives: DATABASE_URL, else a file in DATA_DIR. */
export function databaseUrl(): string {
  const url = process.env.DATABASE_URL;
  if (url) return url;
  return `file:${path.resolve(/* turbopackIgnore: true */ process.env.DATA_DIR ?? "data", "ringfence.db")}`;
}

/**
 * Opens a database with every write in one queue and the pragmas that durability rests on asserted.
 * @throws Error when a pragma does not hold
 */
export async function openDatabase(url: string): Promise<OpenDatabase> {
  const file = url.startsWith("file:") ? url.slice("file:".length) : null;
  if (file) mkdirSync(path.dirname(/* turbopackIgnore: true */ file), { recursive: true });
  const bare = createClient({ url, authToken: process.env.DATABASE_AUTH_TOKEN, timeout: 0 });
  const client = withWriteQueue(bare);
  if (file) {
    await client.execute("PRAGMA journal_mode = WAL");
    await assertPragmas(client);
  }
  return { db: drizzle(client, { schema }), client, url, close: () => client.close() };
}

export interface PragmaHealth {
  journalMode: string;
  foreignKeys: boolean;
  synchronousFull: boolean;
}

/** What durability rests on, as the open connection answers it. */
export async function readPragmas(client: Client): Promise<PragmaHealth> {
  const first = async (sql: string) => (await client.execute(sql)).rows[0]?.[0];
  const journalMode = await first("PRAGMA journal_mode");
  return {
    journalMode: typeof journalMode === "string" ? journalMode : "unknown",
    foreignKeys: Number(await first("PRAGMA foreign_keys")) === 1,
    synchronousFull: Number(await first("PRAGMA synchronous")) >= 2,
  };
}

async function assertPragmas(client: Client): Promise<void> {
  const health = await readPragmas(client);
  if (health.journalMode !== "wal" || !health.foreignKeys || !health.synchronousFull)
    throw new Error(`The database does not keep what it acknowledges: ${JSON.stringify(health)}.`);
}
