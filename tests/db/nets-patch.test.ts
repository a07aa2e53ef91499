import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { listEdits } from "@/lib/db/edit";
import { applyLayoutLists } from "@/lib/db/layout-lists";
import { getNet, listNets } from "@/lib/db/net";
import { createNetClass } from "@/lib/db/net-class";
import { patchNets } from "@/lib/db/net-fields";
import { createProject } from "@/lib/db/project";
import { findRevision, type RevisionRef } from "@/lib/db/revision";
import { netsPatch } from "@/lib/schemas/project-query";
import { aClass, aNet } from "../support/documents";
import { createTestDatabase, type TestDatabase } from "../support/database";

let data: TestDatabase;
let projectId: string;
let draft: RevisionRef;

beforeAll(async () => {
  data = await createTestDatabase();
  const { owner } = data.own.actors;
  projectId = (await createProject(owner, { name: "Board", template: "4-layers" })).id;
  draft = await findRevision(owner, projectId);
});
afterAll(() => data.close());

describe("a change to many nets", () => {
  it("tells only what it was told: no field comes back to its default", () => {
    const nets = [{ id: "0190a000-0000-7000-8000-000000000001", version: 0 }];
    expect(netsPatch.parse({ nets, change: { scope: "in" } }).change).toEqual({ scope: "in" });
    expect(netsPatch.parse({ nets, change: {} }).change).toEqual({});
  });

  it("puts a complete route in scope and leaves one with gaps incomplete; its entry names what differs", async () => {
    const { owner } = data.own.actors;
    const made = await createNetClass(owner, projectId, aClass("Data"));
    const of = { classLineageId: made.lineageId, scope: "out", scopeKind: "test" } as const;
    const gaps = [{ kind: "one pin", text: "U1.1 is the only pin." } as const];
    const nets = [
      aNet("D0", of),
      aNet("D1", { ...of, gaps }),
      aNet("D2", { ...of, scope: "incomplete", gaps }),
    ];
    await applyLayoutLists(owner, projectId, { nets }, { mode: "merge", summary: "3 nets" });
    const before = (await listNets(owner, draft)).nets;
    const changed = await patchNets(
      owner,
      projectId,
      before.map(({ id, version }) => ({ id, version, fields: { scope: "in" } })),
      (fields, count) => `${count} nets: ${fields.join(", ")}`,
    );
    expect(changed).toBe(2);
    const after = await Promise.all(before.map(({ id }) => getNet(owner, draft, id)));
    expect(after.map(({ scope }) => scope)).toEqual(["in", "incomplete", "incomplete"]);
    expect(after.map(({ classLineageId }) => classLineageId)).toEqual(Array(3).fill(made.lineageId));
    const [edit] = await listEdits(owner, draft.id, 1);
    expect(edit?.summary).toBe("2 nets: scope");
  });
});
