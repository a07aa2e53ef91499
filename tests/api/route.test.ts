import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { z } from "zod";
import { route } from "@/lib/auth/route";
import { ConflictError, NotFoundError, RefusedError } from "@/lib/schemas/errors";
import { DomainError } from "@/lib/si/errors";
import { createTestDatabase, type TestDatabase } from "@/tests/support/database";
import { setAuthEnvironment, signedIn, TEST_URL } from "@/tests/support/signed-in";

let test: TestDatabase;
beforeAll(async () => {
  setAuthEnvironment();
  test = await createTestDatabase();
});
afterAll(() => test.close());

type Handler = ReturnType<typeof route>;

async function send(
  handler: Handler,
  init: RequestInit & { path?: string; params?: Record<string, string>; duplex?: "half" } = {},
): Promise<{
  status: number;
  body: { error?: Record<string, unknown> } & Record<string, unknown>;
  headers: Headers;
}> {
  const { path = "/api/v1/x", params = {}, ...rest } = init;
  const response = await handler(new Request(`${TEST_URL}${path}`, rest), {
    params: Promise.resolve(params),
  });
  const text = await response.text();
  return {
    status: response.status,
    body: text ? (JSON.parse(text) as Record<string, unknown>) : {},
    headers: response.headers,
  };
}

const json = (body: unknown): RequestInit => ({
  method: "POST",
  headers: { "content-type": "application/json" },
  body: typeof body === "string" ? body : JSON.stringify(body),
});

const throws = (error: unknown) =>
  route({
    access: "public",
    handler: () => {
      throw error;
    },
  });

describe("what comes in", () => {
  const form = route({
    access: "public",
    body: z.object({
      name: z.string().min(1, "Give it a name."),
      at: z.object({ n: z.number("Write a number.") }),
    }),
    maxBodyBytes: 64,
    handler: ({ body }) => ({ name: body.name }),
  });

  it("is refused field by field", async () => {
    const { status, body } = await send(form, json({ name: "", at: { n: "x" } }));
    expect(status).toBe(400);
    expect(body.error).toMatchObject({
      code: "invalid",
      fields: { name: "Give it a name.", "at.n": "Write a number." },
    });
  });

  it("is refused where it is no JSON, or not said to be", async () => {
    expect((await send(form, json("{"))).status).toBe(400);
    expect((await send(form, { method: "POST", body: "name=x" })).status).toBe(415);
  });

  it("is refused when too large, also when the header lies about it or says nothing", async () => {
    expect((await send(form, json({ name: "x".repeat(100), at: { n: 1 } }))).status).toBe(413);
    let sent = 0;
    const endless = new ReadableStream<Uint8Array>({
      pull: (controller) => {
        sent += 32;
        controller.enqueue(new Uint8Array(32).fill(32));
      },
    });
    const headers = { "content-type": "application/json", "content-length": "10" };
    const lying = await send(form, { method: "POST", headers, body: endless, duplex: "half" });
    expect(lying.status).toBe(413);
    // It stops reading at the limit instead of swallowing all that is sent.
    expect(sent).toBeLessThan(64 * 8);
  });

  it("reads a name given twice in the query as a list, and names a bad one", async () => {
    const query = route({
      access: "public",
      query: z.object({ id: z.array(z.string()), page: z.coerce.number().int().min(1).default(1) }),
      handler: ({ query }) => query,
    });
    expect((await send(query, { path: "/api/v1/x?id=a&id=b" })).body).toEqual({ id: ["a", "b"], page: 1 });
    expect((await send(query, { path: "/api/v1/x?id=a&id=b&page=0" })).body.error?.fields).toHaveProperty(
      "page",
    );
  });

  it("is not found where its address holds no id", async () => {
    const byId = route({
      access: "public",
      params: z.object({ id: z.uuid() }),
      handler: ({ params }) => params,
    });
    expect((await send(byId, { params: { id: "../1" } })).status).toBe(404);
  });
});

describe("who comes in", () => {
  const owners = route({ access: "team:manage", handler: ({ actor }) => ({ role: actor.role }) });
  const either = route({
    access: ["draft:edit", "limits:set"],
    handler: ({ actor }) => ({ role: actor.role }),
  });

  it("is asked to sign in, with a session that was forged as with none", async () => {
    expect((await send(owners)).status).toBe(401);
    const { cookie = "" } = await signedIn(test.own.actors.owner);
    expect((await send(owners, { headers: { cookie: cookie.replace(/.{6}$/, "AAAAAA") } })).status).toBe(401);
  });

  it("meets nothing where the role holds none of the permissions", async () => {
    for (const role of ["owner", "designer", "reviewer", "manufacturer"] as const) {
      const headers = await signedIn(test.own.actors[role]);
      expect((await send(owners, { headers })).status, role).toBe(role === "owner" ? 200 : 404);
      expect((await send(either, { headers })).status, role).toBe(role === "manufacturer" ? 404 : 200);
    }
  });
});

describe("what goes out", () => {
  it("is kept by nobody on the way", async () => {
    const { headers } = await send(route({ access: "public", handler: () => ({}) }));
    expect(headers.get("cache-control")).toContain("no-store");
    expect((await send(route({ access: "public", handler: () => undefined }))).status).toBe(204);
  });

  it.each([
    [
      404,
      new NotFoundError("The project"),
      { code: "not-found", message: "The project does not exist, or is not yours to see." },
    ],
    [
      409,
      new ConflictError("Changed.", { n: 2 }, ["n"]),
      { code: "conflict", current: { n: 2 }, changed: ["n"] },
    ],
    [
      422,
      new RefusedError("No.", "why", { f: "That." }),
      { code: "why", message: "No.", fields: { f: "That." } },
    ],
    [
      422,
      new DomainError("Too wide.", "width"),
      { code: "domain", message: "Too wide.", fields: { width: "Too wide." } },
    ],
    [503, Object.assign(new Error("locked"), { code: "SQLITE_BUSY" }), { code: "busy" }],
  ])("says %i for what was foreseen: %s", async (status, error, said) => {
    const answer = await send(throws(error));
    expect(answer.status).toBe(status);
    expect(answer.body.error).toMatchObject(said);
  });

  it("gives a reference for what was not foreseen, and nothing of its words", async () => {
    const { status, body } = await send(throws(new Error("password=hunter2 in /some/place")));
    expect(status).toBe(500);
    expect(JSON.stringify(body)).not.toContain("hunter2");
    expect(body.error).toMatchObject({
      code: "internal",
      detail: { reference: expect.stringMatching(/^[0-9a-f]{8}$/) as string },
    });
  });
});
