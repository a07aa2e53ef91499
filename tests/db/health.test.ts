import { mkdtemp, rm } from "node:fs/promises";
import { tmpdir } from "node:os";
import path from "node:path";
import { createClient } from "@libsql/client";
import { sql } from "drizzle-orm";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { openDatabase, replaceDatabase } from "@/lib/db/client";
import { databaseHealth } from "@/lib/db/health";
import { member } from "@/lib/db/schema";
import { createTestDatabase, type TestDatabase } from "@/tests/support/database";

let test: TestDatabase;
beforeAll(async () => {
  test = await createTestDatabase();
});
afterAll(() => test.close());

describe("an opened database", () => {
  it("is sound: write-ahead log, foreign keys, commits flushed", async () => {
    expect(await databaseHealth()).toEqual({
      ok: true,
      pragmas: { journalMode: "wal", foreignKeys: true, synchronousFull: true },
      faults: [],
    });
  });

  it("keeps these on every connection of its pool and after a reconnect", async () => {
    await Promise.resolve(test.open.client.reconnect());
    const answers = await Promise.all(Array.from({ length: 8 }, () => databaseHealth()));
    expect(answers.every(({ ok }) => ok)).toBe(true);
  });

  it("refuses a row that points nowhere", async () => {
    const orphan = {
      id: "m",
      organizationId: "nowhere",
      userId: "nobody",
      role: "owner",
      createdAt: new Date(),
    };
    await expect(test.db.insert(member).values(orphan)).rejects.toThrow();
  });

  it("reads back at once what it acknowledged", async () => {
    await test.db.run(sql`create table if not exists read_back (n integer primary key)`);
    for (let n = 0; n < 200; n++) {
      await test.db.run(sql`insert into read_back values (${n})`);
      const [row] = await test.db.all<{ last: number }>(sql`select max(n) as last from read_back`);
      expect(row?.last).toBe(n);
    }
  });

  it("undoes a unit whole when one statement fails", async () => {
    await test.db.run(sql`create table whole (n integer primary key)`);
    await expect(
      test.db.batch([
        test.db.run(sql`insert into whole values (1)`),
        test.db.run(sql`insert into whole values (2)`),
        test.db.run(sql`insert into whole values (1)`),
      ]),
    ).rejects.toThrow();
    expect(await test.db.all(sql`select n from whole`)).toEqual([]);
  });

  it("refuses interactive transactions and scripts, saying what to do instead", async () => {
    await expect(test.db.transaction(async () => undefined)).rejects.toThrow("Send the unit as one batch");
    await expect(test.open.client.executeMultiple("select 1; select 2")).rejects.toThrow("one batch");
  });

  it("is not revived by what was waiting when it was closed", async () => {
    const folder = await mkdtemp(path.join(tmpdir(), "ringfence-test-"));
    const open = await openDatabase(`file:${path.join(folder, "closing.db")}`);
    await open.client.execute("create table t (n)");
    const holder = createClient({ url: open.url });
    const lock = await holder.transaction("write");
    const waiting = open.client.execute("insert into t values (1)");
    open.close();
    await expect(waiting).rejects.toThrow();
    await lock.rollback();
    holder.close();
    expect(open.client.closed).toBe(true);
    await rm(folder, { recursive: true });
  });

  it("says what is wrong when it cannot be opened, and opens again once it can", async () => {
    await replaceDatabase(null);
    process.env.DATABASE_URL = `file:${test.file}/not-a-folder.db`;
    const health = await databaseHealth();
    expect(health.ok).toBe(false);
    expect(health.faults[0]).toContain("does not answer");
    process.env.DATABASE_URL = test.open.url;
    expect((await databaseHealth()).ok).toBe(true);
    delete process.env.DATABASE_URL;
  });
});
