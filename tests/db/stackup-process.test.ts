import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { listEdits } from "@/lib/db/edit";
import { createProject } from "@/lib/db/project";
import { findRevision, type RevisionRef } from "@/lib/db/revision";
import { getStackup, putStackup } from "@/lib/db/stackup";
import { redo, undo } from "@/lib/db/undo";
import type { UserActor } from "@/lib/schemas/actor";
import { usualProcess } from "@/lib/schemas/process";
import { createTestDatabase, type TestDatabase } from "../support/database";

let data: TestDatabase;
let designer: UserActor;
let projectId: string;
let draft: RevisionRef;

beforeAll(async () => {
  data = await createTestDatabase();
  ({ designer } = data.own.actors);
  projectId = (await createProject(designer, { name: "Process board", template: "4-layers" })).id;
  draft = await findRevision(designer, projectId);
});
afterAll(() => data.close());

const tight = { ...usualProcess, widthPercent: "6", minWidth: { value: "3", unit: "mil" } };

describe("the fabricator's process", () => {
  it("is absent until it is entered, kept as typed, and taken back and put again like any edit", async () => {
    const before = await getStackup(designer, draft);
    expect(before.process).toBeUndefined();
    await putStackup(designer, projectId, before.version, {
      name: before.name,
      process: tight,
      layers: before.layers,
    });
    expect((await getStackup(designer, draft)).process).toEqual(tight);
    const edits = await listEdits(designer, draft.id, 1);
    expect(edits[0]?.summary).toContain("fabricator’s process");
    await undo(designer, projectId);
    expect((await getStackup(designer, draft)).process).toBeUndefined();
    await redo(designer, projectId);
    expect((await getStackup(designer, draft)).process).toEqual(tight);
  });

  it("refuses a tolerance beyond 50 % and a least width of zero, and keeps what stood", async () => {
    const { version, name, layers } = await getStackup(designer, draft);
    const wrong = [
      { ...tight, dkPercent: "51" },
      { ...tight, widthPercent: "-1" },
      { ...tight, minGap: { value: "0", unit: "mm" } },
    ];
    for (const process of wrong)
      await expect(putStackup(designer, projectId, version, { name, process, layers })).rejects.toThrow();
    expect((await getStackup(designer, draft)).process).toEqual(tight);
  });
});
