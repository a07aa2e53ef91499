import { sql } from "drizzle-orm";
import { afterAll, beforeAll, expect, it } from "vitest";
import { listAudit, recordAudit, verifyAuditChain } from "@/lib/db/audit";
import { createProject, updateProject } from "@/lib/db/project";
import { createTestDatabase, type TestDatabase } from "../support/database";

let data: TestDatabase;
beforeAll(async () => {
  data = await createTestDatabase();
});
afterAll(() => data.close());

const note = (action: string) => ({ action, subjectKind: "test", subjectId: null, projectId: null });

it("200 entries of two teams at one moment make two whole chains, none lost or doubled", async () => {
  const actors = [data.own, data.other].flatMap((team) => [team.actors.owner, team.actors.designer]);
  await Promise.all(
    actors.flatMap((actor) =>
      Array.from({ length: 50 }, (_, index) =>
        recordAudit(actor, { ...note(`test.${index}`), detail: { index, share: index / 3 } }),
      ),
    ),
  );
  for (const team of [data.own, data.other]) {
    expect(await verifyAuditChain(team.actors.owner)).toMatchObject({
      entries: 100,
      intact: true,
      brokenAt: null,
    });
    const seqs = (await listAudit(team.actors.owner)).map((entry) => entry.seq);
    expect(seqs).toEqual(Array.from({ length: 100 }, (_, index) => 100 - index));
  }
});

it("a change that is refused leaves no entry, one that is made leaves one", async () => {
  const { owner } = data.own.actors;
  const project = await createProject(owner, { name: "Board" });
  const before = await verifyAuditChain(owner);
  const change = { name: "Board two", description: "", unit: "mil" as const };
  await expect(updateProject(owner, project.id, { version: 7, ...change })).rejects.toMatchObject({
    name: "ConflictError",
    changed: ["name", "unit"],
  });
  expect((await verifyAuditChain(owner)).entries).toBe(before.entries);
  await updateProject(owner, project.id, { version: 0, ...change });
  expect((await verifyAuditChain(owner)).entries).toBe(before.entries + 1);
  expect(await listAudit(owner, { search: "board two" })).toHaveLength(1);
});

it("an entry that was altered or taken out is found, at its place", async () => {
  const { owner } = data.other.actors;
  const { db } = data.open;
  const team = data.other.id;
  await db.run(sql`update audit_entry set detail = '{"index":0}' where team_id = ${team} and seq = 40`);
  expect(await verifyAuditChain(owner)).toMatchObject({ intact: false, brokenAt: 40 });
  await db.run(sql`delete from audit_entry where team_id = ${team} and seq = 7`);
  expect(await verifyAuditChain(owner)).toMatchObject({ intact: false, brokenAt: 7 });
  expect((await verifyAuditChain(data.own.actors.owner)).intact).toBe(true);
});

it("designers and manufacturers do not read it", async () => {
  for (const role of ["designer", "manufacturer"] as const)
    await expect(listAudit(data.own.actors[role])).rejects.toThrow(/does not exist/);
});
