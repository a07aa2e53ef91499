import { spawn } from "node:child_process";
import { mkdtemp, rm } from "node:fs/promises";
import { tmpdir } from "node:os";
import path from "node:path";
import { createClient, type Client, type InStatement } from "@libsql/client";
import { afterEach, beforeEach, expect, it } from "vitest";
import { openDatabase } from "@/lib/db/client";
import { withWriteQueue } from "@/lib/db/write-queue";

const WRITES = 20_000;
const CLIENTS = 8;
const BUSY_EVERY = 50;

let folder: string;
let url: string;
beforeEach(async () => {
  folder = await mkdtemp(path.join(tmpdir(), "ringfence-busy-"));
  url = `file:${path.join(folder, "busy.db")}`;
  const open = await openDatabase(url);
  // No key forbids a row twice: a doubled write would show.
  await open.client.execute("create table written (client integer not null, n integer not null)");
  open.close();
});
afterEach(() => rm(folder, { recursive: true, force: true }));

it(
  `loses, doubles and blocks none of ${WRITES} writes by ${CLIENTS} clients, every ${BUSY_EVERY}th of which meets a locked file`,
  { timeout: 180_000 },
  async () => {
    const locks = await createLocks(url);
    let retries = 0;
    const queue = withWriteQueue(
      locks.meetLockEvery(createClient({ url, timeout: 0 }), BUSY_EVERY),
      () => retries++,
    );

    const acknowledged = new Set<string>();
    const clients = Array.from({ length: CLIENTS }, (_, client) => writeAll(queue, client, acknowledged));
    await Promise.all(clients);
    queue.close();
    await locks.close();

    expect(acknowledged.size).toBe(WRITES);
    expect(locks.taken()).toBe(WRITES / BUSY_EVERY);
    expect(retries).toBe(WRITES / BUSY_EVERY);
    expect(await readBack(url)).toEqual({ rows: WRITES, distinct: WRITES, integrity: "ok" });
  },
);

it("repeats a unit whole when every one meets a locked file first", async () => {
  const locks = await createLocks(url);
  const queue = withWriteQueue(locks.meetLockEvery(createClient({ url, timeout: 0 }), 1));
  for (let n = 0; n < 50; n++)
    await queue.batch([
      { sql: "insert into written values (1, ?)", args: [n] },
      { sql: "insert into written values (2, ?)", args: [n] },
    ]);
  queue.close();
  await locks.close();
  expect(await readBack(url)).toEqual({ rows: 100, distinct: 100, integrity: "ok" });
});

it("gives up with the error of the lock, not silently, when it is never released", async () => {
  const refuses = createClient({ url, timeout: 0 });
  const holder = createClient({ url });
  const lock = await holder.transaction("write");
  const queue = withWriteQueue(refuses, () => undefined, { attempts: 4 });
  await expect(queue.execute("insert into written values (0, 0)")).rejects.toMatchObject({
    code: "SQLITE_BUSY",
  });
  await lock.rollback();
  // What comes after is not held up by what failed.
  await queue.execute("insert into written values (0, 1)");
  queue.close();
  holder.close();
  expect((await readBack(url)).rows).toBe(1);
});

it("shares the file with a second process that writes at the same time", { timeout: 120_000 }, async () => {
  const each = 200;
  const open = await openDatabase(url);
  const other = runSecondWriter(url, each);
  for (let n = 0; n < each; n++)
    await open.client.batch([
      { sql: "insert into written values (1, ?)", args: [n] },
      { sql: "insert into written values (2, ?)", args: [n] },
    ]);
  expect(await other).toBe(0);
  open.close();
  expect(await readBack(url)).toEqual({ rows: 4 * each, distinct: 4 * each, integrity: "ok" });
});

/** One client's share of the writes, in units of one to nine; each is counted once the database acknowledged it. */
async function writeAll(queue: Client, client: number, acknowledged: Set<string>): Promise<void> {
  const share = WRITES / CLIENTS;
  for (let n = 0, size = 1; n < share; n += size) {
    size = Math.min(1 + ((n + client) % 9), share - n);
    const unit: InStatement[] = Array.from({ length: size }, (_, i) => ({
      sql: "insert into written values (?, ?)",
      args: [client, n + i],
    }));
    const [only] = unit;
    if (size === 1 && only) await queue.execute(only);
    else await queue.batch(unit, "write");
    for (let i = 0; i < size; i++) acknowledged.add(`${client}/${n + i}`);
  }
}

/** Real locks: a connection of its own holds the file while the unit is tried, and lets go when that has failed. */
async function createLocks(at: string) {
  const holder = createClient({ url: at, timeout: 5000 });
  let written = 0;
  let taken = 0;
  return {
    taken: () => taken,
    close: async () => holder.close(),
    meetLockEvery: (client: Client, every: number): Client => {
      const met = new WeakSet<object>();
      const guarded = async <T>(unit: object, size: number, run: () => Promise<T>): Promise<T> => {
        if (met.has(unit)) return run();
        const before = Math.floor(written / every);
        written += size;
        if (Math.floor(written / every) === before) return run();
        met.add(unit);
        taken++;
        const lock = await holder.transaction("write");
        try {
          return await run();
        } finally {
          await lock.rollback();
        }
      };
      return new Proxy(client, {
        get(target, property) {
          if (property === "execute")
            return (one: InStatement) => guarded(one as object, 1, () => target.execute(one));
          if (property === "batch")
            return (unit: InStatement[]) => guarded(unit, unit.length, () => target.batch(unit, "write"));
          const value: unknown = Reflect.get(target, property, target);
          return typeof value === "function" ? (value as (...a: unknown[]) => unknown).bind(target) : value;
        },
      });
    },
  };
}

async function readBack(at: string): Promise<{ rows: number; distinct: number; integrity: unknown }> {
  const client = createClient({ url: at });
  const counts = (await client.execute("select count(*) as n from written")).rows[0];
  const distinct = (
    await client.execute("select count(*) as n from (select distinct client, n from written)")
  ).rows[0];
  const integrity = (await client.execute("pragma integrity_check")).rows[0];
  client.close();
  return { rows: Number(counts?.n), distinct: Number(distinct?.n), integrity: integrity?.[0] };
}

function runSecondWriter(at: string, writes: number): Promise<number | null> {
  const script = path.resolve("tests/support/second-writer.ts");
  const args = ["--conditions=react-server", "--import", "tsx", script, at, String(writes)];
  const child = spawn(process.execPath, args, { stdio: ["ignore", "inherit", "inherit"] });
  return new Promise((resolve, reject) => child.on("error", reject).on("close", resolve));
}
