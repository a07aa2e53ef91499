import { existsSync, readdirSync } from "node:fs";
import path from "node:path";
import { sql } from "drizzle-orm";
import { afterAll, beforeAll, describe, expect, it, vi } from "vitest";
import { permissionsOf, type Access, type RouteHandler } from "@/lib/auth/route";
import type { UserActor } from "@/lib/schemas/actor";
import { roleMay, roles } from "@/lib/schemas/role";
import { accessFixtures, type AccessFixture } from "@/tests/support/access-fixtures";
import { makeWorld, SECRET, type AccessWorld } from "@/tests/support/access-world";
import { createTestDatabase, type TestDatabase } from "@/tests/support/database";
import { setAuthEnvironment, signedIn, TEST_URL } from "@/tests/support/signed-in";

// What is queued is tested elsewhere; here nobody works it.
vi.mock("@/lib/jobs/import-worker", async (original) => ({
  ...(await original<object>()),
  wakeImportWorker: () => undefined,
}));
vi.mock("@/lib/jobs/run-worker", async (original) => ({
  ...(await original<object>()),
  wakeRunWorker: () => undefined,
}));

const METHODS = ["GET", "POST", "PUT", "PATCH", "DELETE"] as const;
const ROOT = path.resolve("app/api/v1");

interface Endpoint {
  name: string;
  method: string;
  pattern: string;
  handler: RouteHandler;
}

const endpoints = await readEndpoints();
let data: TestDatabase;
/** For requests that leave nothing behind: those that read, and those that are refused. */
let lasting: AccessWorld;
beforeAll(async () => {
  setAuthEnvironment();
  process.env.RATE_LIMITS = "off";
  data = await createTestDatabase();
  lasting = await makeWorld(data);
});
afterAll(() => data.close());

describe("every route", () => {
  it("declares who is let in", () => {
    expect(endpoints.filter(({ handler }) => !isAccess(handler.access)).map(({ name }) => name)).toEqual([]);
  });

  it("has a request in tests/support/access-fixtures.ts, and no request is left without a route", () => {
    expect(Object.keys(accessFixtures).sort()).toEqual(endpoints.map(({ name }) => name).sort());
  });
});

describe.each(endpoints.filter(({ name }) => accessFixtures[name]))("$name", (endpoint) => {
  const fixture = accessFixtures[endpoint.name] as AccessFixture;
  const { access } = endpoint.handler;
  const isPublic = access === "public";

  const admits = (actor: UserActor) =>
    isLetIn(access, actor) &&
    (actor.teamId === data.own.id || isPublic) &&
    (fixture.belongsTo?.(actor, lasting) ?? true);
  const worldFor = (changes: boolean) =>
    changes && endpoint.method !== "GET" ? makeWorld(data) : Promise.resolve(lasting);

  it("answers nobody, or anybody, as declared", async () => {
    const world = await worldFor(isPublic);
    const before = await traces();
    const answer = await call(endpoint, fixture, world, data.own.actors.owner, null);
    if (isPublic) expectAdmitted(answer, fixture);
    else {
      expect(answer.status).toBe(401);
      expectNothing(answer);
      expect(await traces()).toEqual(before);
    }
  });

  it.each(roles)("own team: %s", async (role) => {
    const actor = data.own.actors[role];
    const world = await worldFor(admits(actor));
    const before = await traces();
    const answer = await call(endpoint, fixture, world, actor, actor);
    if (admits(actor)) return expectAdmitted(answer, fixture);
    expect(answer.status).toBe(404);
    expectNothing(answer);
    expect(await traces()).toEqual(before);
  });

  it.each(roles)("other team: %s", async (role) => {
    const actor = data.other.actors[role];
    const world = await worldFor(admits(actor));
    const before = await traces();
    const answer = await call(endpoint, fixture, world, actor, actor);
    if (isPublic) return expectAdmitted(answer, fixture);
    const aboutThings = endpoint.pattern.includes("[");
    if (aboutThings || !isLetIn(access, actor)) {
      expect(answer.status).toBe(404);
      expect(await traces()).toEqual(before);
    } else expectAdmitted(answer, fixture);
    if (endpoint.method === "GET") expectNothing(answer);
  });

  if (!isPublic && endpoint.method !== "GET")
    it("takes no request of another site, whoever is signed in", async () => {
      const world = lasting;
      const before = await traces();
      const actor = data.own.actors.owner;
      const foreigners: Record<string, string>[] = [
        { origin: "https://elsewhere.example" },
        { origin: "null" },
        { "sec-fetch-site": "cross-site" },
      ];
      for (const foreign of foreigners) {
        const answer = await call(endpoint, fixture, world, actor, actor, foreign);
        expect(answer.status).toBe(403);
      }
      expect(await traces()).toEqual(before);
    });
});

interface Answer {
  status: number;
  text: string;
}

async function call(
  { method, pattern, handler }: Endpoint,
  fixture: AccessFixture,
  world: AccessWorld,
  about: UserActor,
  as: UserActor | null,
  headers: Record<string, string> = {},
): Promise<Answer> {
  const { params = {}, query = {}, body, file } = await fixture.call(world, as ?? about);
  const address = pattern.replace(/\[(\w+)\]/g, (_all, name: string) =>
    encodeURIComponent(params[name] ?? ""),
  );
  const url = new URL(`/api/v1${address}`, TEST_URL);
  for (const [name, value] of Object.entries(query)) url.searchParams.set(name, value);
  const request = new Request(url, {
    method,
    headers: {
      ...(as ? await signedIn(as) : {}),
      ...(body === undefined ? {} : { "content-type": "application/json" }),
      ...headers,
    },
    body: file ?? (body === undefined ? undefined : JSON.stringify(body)),
  });
  const response = await handler(request, { params: Promise.resolve(params) });
  return { status: response.status, text: await response.text() };
}

function isLetIn(access: Access, { role }: UserActor): boolean {
  return (
    access === "public" || access === "session" || permissionsOf(access).some((one) => roleMay(role, one))
  );
}

function expectAdmitted({ status, text }: Answer, { admitted }: AccessFixture): void {
  if (admitted) expect(status, text).toBe(admitted);
  else expect(Math.floor(status / 100), `${status} ${text}`).toBe(2);
}

/** Nothing of the own team is in the answer. */
function expectNothing({ text }: Answer): void {
  expect(text).not.toContain(SECRET);
  expect(text).not.toContain(data.own.id);
}

/** What a write would leave behind, in either team: the audit log, the drafts' edits, and when things were seen. */
async function traces(): Promise<unknown> {
  return data.db.all(sql`
    select (select count(*) from audit_entry) as audited, (select count(*) from edit) as edits,
      (select count(*) from flag_entry) as comments, (select count(*) from run) as runs,
      (select count(*) from waiver where revoked_at is null) as waivers,
      (select count(viewed_at) + count(downloaded_at) + count(acknowledged_at) from release_recipient) as seen,
      (select count(*) from user_preference) as preferences`);
}

async function readEndpoints(): Promise<Endpoint[]> {
  if (!existsSync(ROOT)) return [];
  const files = readdirSync(ROOT, { recursive: true, encoding: "utf8" }).filter((file) =>
    /(^|\/)route\.ts$/.test(file),
  );
  const found: Endpoint[] = [];
  for (const file of files.sort()) {
    const exported = (await import(path.join(ROOT, file))) as Record<string, RouteHandler | undefined>;
    const pattern = `/${path.dirname(file)}`.replace(/\/\([^)]+\)/g, "");
    for (const method of METHODS) {
      const handler = exported[method];
      if (handler) found.push({ name: `${method} ${pattern}`, method, pattern, handler });
    }
  }
  return found;
}

function isAccess(access: unknown): access is Access {
  return typeof access === "string" || (Array.isArray(access) && access.length > 0);
}
