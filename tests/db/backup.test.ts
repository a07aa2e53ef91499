import { copyFile, open as openFile, readdir, stat, writeFile } from "node:fs/promises";
import path from "node:path";
import { sql } from "drizzle-orm";
import { afterEach, beforeEach, expect, it } from "vitest";
import { backupDatabase } from "@/lib/db/backup";
import { openDatabase } from "@/lib/db/client";
import { restoreDatabase } from "@/lib/db/restore";
import { organization, user } from "@/lib/db/schema";
import { createTestDatabase, type TestDatabase } from "@/tests/support/database";

let test: TestDatabase;
let copy: string;
beforeEach(async () => {
  test = await createTestDatabase();
  copy = path.join(test.folder, "copies", "one.db");
});
afterEach(() => test.close());

async function teamNames(url: string): Promise<string[]> {
  const open = await openDatabase(url);
  const rows = await open.db.select().from(organization);
  open.close();
  return rows.map(({ name }) => name).sort();
}

it("copies a database that is open and written to, and leaves nothing half-made", async () => {
  const writing = Array.from({ length: 20 }, (_, n) =>
    test.db.run(sql`update organization set name = ${`n${n}`}`),
  );
  await Promise.all([...writing, backupDatabase(test.open.url, copy)]);
  expect(await teamNames(`file:${copy}`)).toHaveLength(2);
  expect((await readdir(path.dirname(copy))).filter((name) => name.includes("partial"))).toEqual([]);
});

it("does not write over a copy, and says so", async () => {
  await backupDatabase(test.open.url, copy);
  await expect(backupDatabase(test.open.url, copy)).rejects.toThrow("not overwritten");
});

it("refuses to restore while the database is in use", async () => {
  await backupDatabase(test.open.url, copy);
  await expect(restoreDatabase(copy, test.open.url)).rejects.toThrow("Stop the server");
  expect(await test.db.select().from(organization)).toHaveLength(2);
});

/**
 * A database that was served once and is not now. It is written as a second copy, since connections of this very
 * process let go of a file only when their memory is collected.
 */
async function stopServing(): Promise<string> {
  const file = path.join(test.folder, "stopped", "ringfence.db");
  await backupDatabase(test.open.url, file);
  return `file:${file}`;
}

it("restores what the copy holds and keeps what was there", async () => {
  await backupDatabase(test.open.url, copy);
  await test.db.run(sql`update organization set name = 'changed since'`);
  const stopped = await stopServing();
  const { kept } = await restoreDatabase(copy, stopped);
  expect(await teamNames(stopped)).toEqual(["Estuary", "Saltmarsh"]);
  expect(await teamNames(`file:${kept ?? ""}`)).toEqual(["changed since", "changed since"]);
});

it("refuses to lose later work unless forced, and keeps it even then", async () => {
  await backupDatabase(test.open.url, copy);
  const at = new Date(Date.now() + 60_000);
  await test.db
    .insert(user)
    .values({ id: "later", name: "L", email: "l@x.example", createdAt: at, updatedAt: at });
  const stopped = await stopServing();
  await expect(restoreDatabase(copy, stopped)).rejects.toThrow("--force");
  const { kept } = await restoreDatabase(copy, stopped, { force: true });
  const before = await openDatabase(`file:${kept ?? ""}`);
  expect((await before.db.select().from(user)).some(({ id }) => id === "later")).toBe(true);
  before.close();
});

it("restores where there is no database yet", async () => {
  await backupDatabase(test.open.url, copy);
  const url = `file:${path.join(test.folder, "elsewhere", "new.db")}`;
  expect(await restoreDatabase(copy, url)).toEqual({ kept: null });
  expect(await teamNames(url)).toHaveLength(2);
});

it("refuses a file that is no database, is damaged, or is another program's, and leaves the database alone", async () => {
  await backupDatabase(test.open.url, copy);
  const text = path.join(test.folder, "text.db");
  await writeFile(
    text,
    "This is not a database, though it is long enough to be looked at as one.".repeat(100),
  );
  await expect(restoreDatabase(text, test.open.url)).rejects.toThrow("not sound");

  const damaged = path.join(test.folder, "damaged.db");
  await copyFile(copy, damaged);
  const { size } = await stat(damaged);
  const handle = await openFile(damaged, "r+");
  await handle.write(Buffer.alloc(size - 8192, 0xa5), 0, size - 8192, 8192);
  await handle.close();
  await expect(restoreDatabase(damaged, test.open.url)).rejects.toThrow("not sound");

  const foreign = path.join(test.folder, "foreign.db");
  const open = await openDatabase(`file:${foreign}`);
  await open.db.run(sql`create table theirs (n)`);
  open.close();
  await expect(restoreDatabase(foreign, test.open.url)).rejects.toThrow("no tables of this program");
  expect(await test.db.select().from(organization)).toHaveLength(2);
});
