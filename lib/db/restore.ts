import "server-only";
import { existsSync } from "node:fs";
import { copyFile, link, mkdir, rename, rm } from "node:fs/promises";
import path from "node:path";
import type { Client } from "@libsql/client";
import { flush } from "./backup";
import { isBusy } from "./busy";
import { now } from "./clock";
import { requireSound, withFile } from "./integrity";

/**
 * Puts a checked copy in place of the database in one step; what was there is kept beside it.
 * @throws Error where the copy is not sound, the database is in use, or it holds later work and `force` is not set
 */
export async function restoreDatabase(
  file: string,
  url: string,
  { force = false }: { force?: boolean } = {},
): Promise<{ kept: string | null }> {
  if (!url.startsWith("file:"))
    throw new Error("This database is on another server. Ask whoever runs it to restore it.");
  const target = path.resolve(url.slice("file:".length));
  if (!existsSync(/* turbopackIgnore: true */ file)) throw new Error(`There is no file ${file}.`);
  if (path.resolve(file) === target) throw new Error("The copy and the database are the same file.");
  await requireSound(file);

  await mkdir(path.dirname(target), { recursive: true, mode: 0o700 });
  const taken = existsSync(/* turbopackIgnore: true */ target);
  if (taken) {
    await withFile(target, requireUnused);
    if (!force) await requireNothingLater(file, target);
  }

  const fresh = `${target}.restoring`;
  await copyFile(file, fresh);
  await requireSound(fresh);
  await flush(fresh);
  const kept = taken ? `${target}.before-${new Date(now()).toISOString().replace(/[:.]/g, "-")}` : null;
  if (kept) await link(target, kept);
  // A log left by a crash belongs to what was there before: it must never be played into the copy.
  for (const suffix of ["-wal", "-shm"]) await rm(`${target}${suffix}`, { force: true });
  await rename(fresh, target);
  await flush(path.dirname(target));
  return { kept };
}

/** Leaving the write-ahead log takes the file for oneself, which fails while anybody else has it open. */
async function requireUnused(client: Client): Promise<void> {
  try {
    await client.execute("PRAGMA journal_mode = DELETE");
  } catch (error) {
    if (!isBusy(error)) throw error;
    throw new Error("The database is in use. Stop the server, then restore.", { cause: error });
  }
}

async function requireNothingLater(file: string, target: string): Promise<void> {
  const copied = await withFile(file, readLatest);
  const present = await withFile(target, readLatest);
  if (present.migrated > copied.migrated)
    throw new Error(
      "The database is of a later version of this program than the copy. Add --force to restore all the same.",
    );
  if (present.changed > copied.changed)
    throw new Error(
      `The database was changed on ${new Date(present.changed).toISOString()}, after this copy was made; that would be ` +
        "lost. Add --force to restore all the same: what is there now is kept beside it.",
    );
}

/** When the newest entry of the audit log, account and migration in a file were made. */
async function readLatest(client: Client): Promise<{ changed: number; migrated: number }> {
  const latest = async (sql: string) => Number((await client.execute(sql)).rows[0]?.at ?? 0);
  return {
    changed: Math.max(
      await latest("SELECT max(at) AS at FROM audit_entry"),
      await latest("SELECT max(updated_at) AS at FROM user"),
    ),
    migrated: await latest("SELECT max(created_at) AS at FROM __drizzle_migrations"),
  };
}
