import "server-only";
import { existsSync } from "node:fs";
import { mkdir, open, rename, rm } from "node:fs/promises";
import path from "node:path";
import { openDatabase } from "./client";
import { requireSound } from "./integrity";

/**
 * Writes a copy of the database as it is at one moment, though it is written to meanwhile. The copy gets its name
 * only once it is checked (integrity, foreign keys) and on the disk.
 * @throws Error where the database is remote, the name is taken, or the copy is not sound
 */
export async function backupDatabase(url: string, file: string): Promise<void> {
  if (!url.startsWith("file:"))
    throw new Error("This database is on another server, which makes its own copies. Ask whoever runs it.");
  if (!existsSync(/* turbopackIgnore: true */ url.slice("file:".length)))
    throw new Error(
      `There is no database at ${url.slice("file:".length)}. Set DATA_DIR or DATABASE_URL to it.`,
    );
  if (existsSync(/* turbopackIgnore: true */ file))
    throw new Error(`${file} is there already and is not overwritten. Choose another name.`);
  await mkdir(path.dirname(file), { recursive: true, mode: 0o700 });
  const partial = `${file}.partial`;
  await rm(partial, { force: true });
  const source = await openDatabase(url);
  try {
    await source.client.execute({ sql: "VACUUM INTO ?", args: [partial] });
  } finally {
    source.close();
  }
  await requireSound(partial);
  await flush(partial);
  await rename(partial, file);
  await flush(path.dirname(file));
}

/** Makes what was written outlast a loss of power; of a folder: the names in it. */
export async function flush(file: string): Promise<void> {
  const handle = await open(file, "r");
  try {
    await handle.sync();
  } finally {
    await handle.close();
  }
}
