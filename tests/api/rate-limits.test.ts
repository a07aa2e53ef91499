import { afterAll, beforeAll, beforeEach, expect, it } from "vitest";
import { sql } from "drizzle-orm";
import { setClock } from "@/lib/db/clock";
import { AuthClient } from "@/tests/support/auth-client";
import { createTestDatabase, type TestDatabase } from "@/tests/support/database";
import { setAuthEnvironment } from "@/tests/support/signed-in";

const QUARTER_MS = 15 * 60_000;
let test: TestDatabase;
let address = 0;

beforeAll(async () => {
  setAuthEnvironment();
  delete process.env.RATE_LIMITS;
  test = await createTestDatabase();
});
beforeEach(async () => {
  setClock(() => 1_800_000_000_000 - (1_800_000_000_000 % QUARTER_MS));
  await test.db.batch([
    test.db.run(sql`delete from account_attempt`),
    test.db.run(sql`delete from rate_limit`),
  ]);
});
afterAll(async () => {
  setClock(null);
  process.env.RATE_LIMITS = "off";
  await test.close();
});

/** From another client address each time, as somebody who forges the header would. */
const post = (path: string, body: unknown) =>
  new AuthClient().post(path, body, { "x-forwarded-for": `203.0.113.${(address += 1) % 250}` });

it("stops guessing at one account after 10 tries in a quarter of an hour, whatever addresses they come from", async () => {
  const { email } = test.own.actors.owner;
  for (let n = 0; n < 10; n++)
    expect((await post("/sign-in/email", { email, password: `guess ${n}` })).status).toBe(401);
  expect(await post("/sign-in/email", { email: email.toUpperCase(), password: "guess" })).toMatchObject({
    status: 429,
    body: { code: "TOO_MANY_ATTEMPTS" },
  });
  // Another account is not held up, and this one opens again with the next quarter.
  expect((await post("/sign-in/email", { email: "other@x.example", password: "guess" })).status).toBe(401);
  const begun = 1_800_000_000_000 - (1_800_000_000_000 % QUARTER_MS);
  setClock(() => begun + QUARTER_MS);
  expect((await post("/sign-in/email", { email, password: "guess" })).status).toBe(401);
});

it("sends no more than 5 reset links to one address in an hour", async () => {
  const body = { email: test.own.actors.designer.email, redirectTo: "/reset" };
  for (let n = 0; n < 5; n++) expect((await post("/request-password-reset", body)).status).toBe(200);
  expect((await post("/request-password-reset", body)).status).toBe(429);
});

it("stops one client address that tries many accounts", async () => {
  const statuses: number[] = [];
  for (let n = 0; n < 6; n++) {
    const body = { email: `someone${n}@x.example`, password: "guess" };
    statuses.push(
      (await new AuthClient().post("/sign-in/email", body, { "x-forwarded-for": "198.51.100.7" })).status,
    );
  }
  expect(statuses).toEqual([401, 401, 401, 429, 429, 429]);
});

it("keeps no address that somebody typed", async () => {
  await post("/sign-in/email", { email: "private@x.example", password: "guess" });
  const rows = await test.db.all<{ account: string }>(sql`select account from account_attempt`);
  expect(rows).toHaveLength(1);
  expect(rows[0]?.account).toMatch(/^[0-9a-f]{64}$/);
});
