import { getTableColumns, type Column } from "drizzle-orm";
import { getAuthTables } from "better-auth/db";
import { afterAll, beforeAll, expect, it } from "vitest";
import { getAuth } from "@/lib/auth/auth";
import * as tables from "@/lib/db/schema/auth";
import { createTestDatabase, type TestDatabase } from "@/tests/support/database";
import { setAuthEnvironment } from "@/tests/support/signed-in";

let test: TestDatabase;
beforeAll(async () => {
  setAuthEnvironment();
  test = await createTestDatabase();
});
afterAll(() => test.close());

it("every table and column that the package asks for is in ours, required where it is required", async () => {
  const asked = getAuthTables((await getAuth()).options);
  for (const [model, { fields }] of Object.entries(asked)) {
    const table = Object.entries(tables).find(([name]) => name === model)?.[1];
    expect(table, model).toBeDefined();
    if (!table) continue;
    const columns = Object.entries(getTableColumns(table) as Record<string, Column>);
    for (const [field, { required, unique }] of Object.entries(fields)) {
      const column = columns.find(([name]) => name === field)?.[1];
      expect(column, `${model}.${field}`).toBeDefined();
      if (column && !required)
        expect(column.notNull && !column.hasDefault, `${model}.${field} may be left out`).toBe(false);
      if (unique) expect(column?.isUnique, `${model}.${field} is unique`).toBe(true);
    }
  }
});

it("cookies are for this site alone, out of reach of scripts, and secure unless this computer is served", async () => {
  const context = await (await getAuth()).$context;
  expect(context.authCookies.sessionToken.attributes).toMatchObject({
    httpOnly: true,
    sameSite: "lax",
    secure: false,
  });
  process.env.BETTER_AUTH_URL = "https://board.example.org";
  const other = await createTestDatabase();
  const elsewhere = await (await getAuth()).$context;
  expect(elsewhere.authCookies.sessionToken.name).toMatch(/^__Secure-/);
  expect(elsewhere.authCookies.sessionToken.attributes.secure).toBe(true);
  expect(elsewhere.options.session.cookieCache.enabled).toBeFalsy();
  await other.close();
  setAuthEnvironment();
});
