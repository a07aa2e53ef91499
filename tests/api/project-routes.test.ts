import { afterAll, beforeAll, describe, expect, it } from "vitest";
import * as classRoutes from "@/app/api/v1/projects/[projectId]/classes/[classId]/route";
import * as classesRoutes from "@/app/api/v1/projects/[projectId]/classes/route";
import * as netsRoutes from "@/app/api/v1/projects/[projectId]/nets/route";
import * as overviewRoutes from "@/app/api/v1/projects/[projectId]/overview/route";
import * as readinessRoutes from "@/app/api/v1/projects/[projectId]/readiness/route";
import * as projectRoutes from "@/app/api/v1/projects/[projectId]/route";
import * as stackupRoutes from "@/app/api/v1/projects/[projectId]/stackup/route";
import * as undoRoutes from "@/app/api/v1/projects/[projectId]/undo/route";
import * as projectsRoutes from "@/app/api/v1/projects/route";
import type { RouteHandler } from "@/lib/auth/route";
import { applyLayoutLists } from "@/lib/db/layout-lists";
import type { StackupView } from "@/lib/db/stackup";
import type { UserActor } from "@/lib/schemas/actor";
import type { ProjectSummary } from "@/lib/schemas/project";
import { aClass, aNet } from "../support/documents";
import { createTestDatabase, type TestDatabase } from "../support/database";
import { setAuthEnvironment, signedIn, TEST_URL } from "../support/signed-in";

interface ErrorAnswer {
  error: { fields?: Record<string, string> };
}

let data: TestDatabase;
let designer: UserActor;
let project: ProjectSummary;

beforeAll(async () => {
  setAuthEnvironment();
  data = await createTestDatabase();
  ({ designer } = data.own.actors);
  const made = await call(
    projectsRoutes.POST,
    designer,
    "POST",
    {},
    { name: "Tide gauge controller", template: "6-layers" },
  );
  project = made.body as ProjectSummary;
});
afterAll(() => data.close());

async function call(
  handler: RouteHandler,
  actor: UserActor | null,
  method: string,
  params: Record<string, string> = {},
  body?: unknown,
  search = "",
) {
  const headers = {
    ...(actor ? await signedIn(actor) : {}),
    ...(body ? { "content-type": "application/json" } : {}),
  };
  const request = new Request(`${TEST_URL}/api/v1/x${search}`, {
    method,
    headers,
    body: body ? JSON.stringify(body) : undefined,
  });
  const response = await handler(request, { params: Promise.resolve(params) });
  const text = await response.text();
  return { status: response.status, body: (text === "" ? null : JSON.parse(text)) as unknown };
}

const here = () => ({ projectId: project.id });

describe("the API of a project", () => {
  it("makes a project with draft A from a template and lists it", async () => {
    expect(project).toMatchObject({
      name: "Tide gauge controller",
      draftLetter: "A",
      releasedLetter: null,
      netCount: 0,
    });
    const list = await call(projectsRoutes.GET, designer, "GET");
    expect(list.body).toMatchObject({ projects: [{ id: project.id }] });
    const stackup = await call(stackupRoutes.GET, designer, "GET", here());
    expect((stackup.body as StackupView).layers.filter((layer) => layer.kind === "signal")).toHaveLength(4);
  });

  it("refuses two projects of one name at the field, and an unknown template", async () => {
    const twice = await call(projectsRoutes.POST, designer, "POST", {}, { name: "Tide gauge controller" });
    expect(twice).toMatchObject({ status: 422, body: { error: { code: "name-taken" } } });
    expect((twice.body as ErrorAnswer).error.fields?.name).toContain("already");
    const odd = await call(
      projectsRoutes.POST,
      designer,
      "POST",
      {},
      { name: "Other", template: "7-layers" },
    );
    expect(odd).toMatchObject({ status: 422, body: { error: { code: "unknown-template" } } });
  });

  it("answers a stale write with 409, the present thing and what changed", async () => {
    const { body } = await call(stackupRoutes.GET, designer, "GET", here());
    const { version, name, layers } = body as StackupView;
    const stackup = { name, layers };
    const first = await call(stackupRoutes.PUT, designer, "PUT", here(), {
      version,
      stackup: { ...stackup, name: "First" },
    });
    expect(first.status).toBe(200);
    const second = await call(stackupRoutes.PUT, data.own.actors.owner, "PUT", here(), { version, stackup });
    expect(second).toMatchObject({
      status: 409,
      body: {
        error: { code: "conflict", current: { name: "First", version: version + 1 }, changed: ["name"] },
      },
    });
    expect((await call(undoRoutes.POST, designer, "POST", here())).status).toBe(200);
    const again = await call(stackupRoutes.GET, designer, "GET", here());
    expect(again.body).toMatchObject({ name, version: version + 2 });
  });

  it("names the field that is at fault", async () => {
    const bad = await call(classesRoutes.POST, designer, "POST", here(), {
      netClass: { ...aClass("Bad"), targetImpedance: { value: "-50", unit: "Ω" } },
    });
    expect(bad.status).toBe(400);
    expect((bad.body as ErrorAnswer).error.fields?.["netClass.targetImpedance"]).toContain("above zero");
  });

  it("keeps a class with nets until it is told where they go", async () => {
    const made = await call(classesRoutes.POST, designer, "POST", here(), { netClass: aClass("Data") });
    const { id, lineageId } = made.body as { id: string; lineageId: string };
    const nets = [aNet("D0", { classLineageId: lineageId })];
    await applyLayoutLists(designer, project.id, { nets }, { mode: "merge", summary: "1 net" });
    const at = { ...here(), classId: id };
    const refused = await call(classRoutes.DELETE, designer, "DELETE", at, { version: 0 });
    expect(refused).toMatchObject({
      status: 422,
      body: { error: { code: "class-in-use", detail: { nets: 1 } } },
    });
    expect(
      (await call(classRoutes.DELETE, designer, "DELETE", at, { version: 0, reassignTo: null })).status,
    ).toBe(204);
  });

  it("edits nets in bulk and filters them by the query", async () => {
    const list = await call(netsRoutes.GET, designer, "GET", here(), undefined, "?class=none");
    const [net] = (list.body as { nets: { id: string; version: number }[] }).nets;
    const patch = {
      nets: [{ id: net?.id, version: net?.version }],
      change: { scope: "out", scopeKind: "test" },
    };
    expect(await call(netsRoutes.PATCH, designer, "PATCH", here(), patch)).toEqual({
      status: 200,
      body: { changed: 1 },
    });
    expect(
      (await call(netsRoutes.PATCH, designer, "PATCH", here(), { ...patch, change: { scope: "in" } })).status,
    ).toBe(409);
    const out = await call(netsRoutes.GET, designer, "GET", here(), undefined, "?scope=out&search=D");
    expect(out.body).toMatchObject({ total: 1 });
  });

  it("shows an overview with counts of nets and what blocks release", async () => {
    const overview = await call(overviewRoutes.GET, data.own.actors.reviewer, "GET", here());
    expect(overview.body).toMatchObject({
      revision: { letter: "A", state: "draft" },
      scopes: { in: 0, out: 1, incomplete: 0 },
      run: null,
      blockers: [{ kind: "no run" }],
    });
  });

  it("is closed to nobody, another team and a manufacturer", async () => {
    expect((await call(projectRoutes.GET, null, "GET", here())).status).toBe(401);
    expect((await call(projectRoutes.GET, data.other.actors.owner, "GET", here())).status).toBe(404);
    expect((await call(projectRoutes.GET, data.own.actors.manufacturer, "GET", here())).status).toBe(404);
    expect((await call(projectRoutes.GET, designer, "GET", { projectId: "no-id" })).status).toBe(404);
  });

  it("archives what is then read as before and edited no more", async () => {
    expect((await call(projectRoutes.DELETE, designer, "DELETE", here())).status).toBe(204);
    expect((await call(projectRoutes.GET, designer, "GET", here())).status).toBe(200);
    const refused = await call(classesRoutes.POST, designer, "POST", here(), { netClass: aClass("Late") });
    expect(refused).toMatchObject({ status: 422, body: { error: { code: "archived" } } });
    // That there is no draft is a state, not a fault: the bar above every page asks.
    expect(await call(readinessRoutes.GET, designer, "GET", here())).toMatchObject({
      status: 200,
      body: { draft: null, why: expect.stringContaining("is archived") as string },
    });
    const list = await call(projectsRoutes.GET, designer, "GET", {}, undefined, "?archived=true");
    expect(list.body).toMatchObject({ projects: [{ id: project.id }] });
  });
});
