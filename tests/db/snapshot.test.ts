import { and, eq, sql } from "drizzle-orm";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { putBindings } from "@/lib/db/binding";
import { startDraft } from "@/lib/db/draft-copy";
import { applyLayoutLists } from "@/lib/db/layout-lists";
import { createModel } from "@/lib/db/model";
import { countScopes, listNets } from "@/lib/db/net";
import { createNetClass, deleteNetClass, putNetClass } from "@/lib/db/net-class";
import { patchNets } from "@/lib/db/net-fields";
import { createProject } from "@/lib/db/project";
import { findRevision, getRevision, type RevisionRef } from "@/lib/db/revision";
import { putRuleSet } from "@/lib/db/rule-set";
import { chunk, revision } from "@/lib/db/schema";
import { currentInputHash, freezeInputs, hashInputs, readInputs, thawInputs } from "@/lib/db/snapshot";
import { getStackup, putStackup } from "@/lib/db/stackup";
import { redo, undo } from "@/lib/db/undo";
import type { UserActor } from "@/lib/schemas/actor";
import { RefusedError } from "@/lib/schemas/errors";
import { bindingDoc } from "@/lib/schemas/model";
import { aClass, aModel, aNet } from "../support/documents";
import { createTestDatabase, type TestDatabase } from "../support/database";

const NETS = 10_000;

let data: TestDatabase;
let owner: UserActor;
let projectId: string;
let draft: RevisionRef;
let classId: string;

beforeAll(async () => {
  data = await createTestDatabase();
  ({ owner } = data.own.actors);
  projectId = (await createProject(owner, { name: "Large board", template: "18-layers" })).id;
  draft = await findRevision(owner, projectId);
  const netClass = await createNetClass(owner, projectId, aClass("Data"));
  classId = netClass.id;
  const model = await createModel(owner, projectId, aModel("Port"));
  await putBindings(owner, projectId, 0, [
    bindingDoc.parse({ role: "driver", modelLineageId: model.lineageId }),
  ]);
  await applyLayoutLists(
    owner,
    projectId,
    {
      nets: Array.from({ length: NETS }, (_, index) =>
        aNet(`N${index}`, { classLineageId: netClass.lineageId }),
      ),
      parts: [{ reference: "U1", partNumber: "P-1", value: "", kind: "ic", pins: ["1"] }],
      neighbours: [
        {
          net: "N1",
          neighbour: "N2",
          layer: "L1 Top",
          gap: { value: "5", unit: "mil" },
          parallelLength: { value: "10", unit: "mm" },
        },
      ],
    },
    { mode: "replace", summary: `${NETS} nets` },
  );
});
afterAll(() => data.close());

describe("a board of 10,000 nets", () => {
  it("is all there, with its derived columns", async () => {
    const { total, nets } = await listNets(owner, draft);
    expect(total).toBe(NETS);
    expect(nets).toHaveLength(NETS);
    expect(nets[0]).toMatchObject({
      name: "N0",
      className: "Data",
      pinCount: 2,
      sectionCount: 1,
      length_m: 0.0254,
    });
    expect(await countScopes(owner, draft)).toEqual({ in: NETS, out: 0, incomplete: 0 });
    expect(
      (await listNets(owner, draft, { search: "N999", limit: 3, sort: "length", descending: true })).total,
    ).toBe(11);
  });

  it("freezes and thaws to the same inputs and the same hash, each part once", async () => {
    const inputs = await readInputs(owner, draft.id);
    expect(inputs.nets).toHaveLength(NETS);
    const frozen = await freezeInputs(owner, inputs);
    expect(frozen.chunks).toHaveLength(7 + NETS / 500);
    expect(await thawInputs(owner, frozen.chunks)).toEqual(inputs);
    const again = await freezeInputs(owner, await readInputs(owner, draft.id));
    expect(again).toEqual(frozen);
    const rows = await data.open.db.select({ sha256: chunk.sha256 }).from(chunk);
    expect(rows).toHaveLength(new Set(frozen.chunks.map((part) => part.sha256)).size);
    expect(await hashInputs(inputs)).toBe(frozen.inputHash);
  });

  it("has another hash after an edit and the former one after undo", async () => {
    const before = await currentInputHash(owner, draft.id);
    await putNetClass(owner, projectId, classId, 0, aClass("Data", { signal: "clock" }));
    const edited = await currentInputHash(owner, draft.id);
    expect(edited).not.toBe(before);
    await undo(owner, projectId);
    expect(await currentInputHash(owner, draft.id)).toBe(before);
    await redo(owner, projectId);
    expect(await currentInputHash(owner, draft.id)).toBe(edited);
    await undo(owner, projectId);
  });

  it("is edited in bulk as one unit, and back", async () => {
    const { nets } = await listNets(owner, draft);
    const before = await currentInputHash(owner, draft.id);
    const changed = await patchNets(
      owner,
      projectId,
      nets.map(({ id, version }) => ({ id, version, fields: { scope: "out", scopeKind: "static" } })),
      "all out",
    );
    expect(changed).toBe(NETS);
    expect(await countScopes(owner, draft)).toEqual({ in: 0, out: NETS, incomplete: 0 });
    await undo(owner, projectId);
    expect(await currentInputHash(owner, draft.id)).toBe(before);
  });

  it("a damaged part of a snapshot is not read", async () => {
    const frozen = await freezeInputs(owner, await readInputs(owner, draft.id));
    const [first, second] = frozen.chunks;
    await data.open.db
      .update(chunk)
      .set({ content: sql`(select content from chunk where sha256 = ${second?.sha256})` })
      .where(and(eq(chunk.teamId, owner.teamId), eq(chunk.sha256, first?.sha256 ?? "")));
    await expect(thawInputs(owner, frozen.chunks)).rejects.toThrow(/damaged/);
  });
});

describe("an import that comes again", () => {
  it("keeps lineage and what people set; replace takes away what is not named", async () => {
    const board = (await createProject(owner, { name: "Reimported", template: "4-layers" })).id;
    const itsDraft = await findRevision(owner, board);
    const lists = { nets: [aNet("A"), aNet("B"), aNet("C", { matchGroup: "G" })] };
    await applyLayoutLists(owner, board, lists, { mode: "merge", summary: "first" });
    const first = (await listNets(owner, itsDraft)).nets;
    await patchNets(
      owner,
      board,
      [{ id: first[0]?.id ?? "", fields: { scope: "out", scopeKind: "test" } }],
      "out",
    );
    await applyLayoutLists(
      owner,
      board,
      { nets: [aNet("A"), aNet("C")] },
      { mode: "replace", summary: "second" },
    );
    const second = (await listNets(owner, itsDraft)).nets;
    expect(
      second.map(({ name, lineageId, scope, matchGroup }) => ({ name, lineageId, scope, matchGroup })),
    ).toEqual([
      { name: "A", lineageId: first[0]?.lineageId, scope: "out", matchGroup: null },
      { name: "C", lineageId: first[2]?.lineageId, scope: "in", matchGroup: "G" },
    ]);
  });
});

describe("a released revision", () => {
  it("is changed by nothing, and its copy keeps every lineage", async () => {
    await expect(startDraft(owner, projectId)).rejects.toThrow(/is a draft already/);
    await data.open.db
      .update(revision)
      .set({ state: "released", releasedAt: 1 })
      .where(eq(revision.id, draft.id));
    const { nets } = await listNets(owner, draft);
    const stackup = await getStackup(owner, draft);
    const { editCount } = await getRevision(owner, draft.id);
    const before = await currentInputHash(owner, draft.id);
    const writes = [
      () => putStackup(owner, projectId, stackup.version, { name: "x", layers: [] }),
      () => createNetClass(owner, projectId, aClass("New")),
      () => deleteNetClass(owner, projectId, classId, 2, null),
      () => createModel(owner, projectId, aModel("New")),
      () => putBindings(owner, projectId, 1, []),
      () => putRuleSet(owner, projectId, 0, { rules: {}, judgedAt: "die" }),
      () => patchNets(owner, projectId, [{ id: nets[0]?.id ?? "", fields: { scope: "out" } }], "out"),
      () => applyLayoutLists(owner, projectId, { nets: [] }, { mode: "replace", summary: "none" }),
      () => undo(owner, projectId),
    ];
    for (const write of writes) await expect(write()).rejects.toBeInstanceOf(RefusedError);
    expect((await getRevision(owner, draft.id)).editCount).toBe(editCount);
    expect(await currentInputHash(owner, draft.id)).toBe(before);

    const next = await startDraft(owner, projectId);
    expect(next).toMatchObject({ letter: "B", state: "draft", parentRevisionId: draft.id, editCount: 0 });
    const [a, b] = [await readInputs(owner, draft.id), await readInputs(owner, next.id)];
    expect({ ...b, revision: "A" }).toEqual(a);
    const copied = await listNets(owner, next);
    expect(copied.nets.map((net) => net.lineageId)).toEqual(nets.map((net) => net.lineageId));
    expect(copied.nets.some((net, index) => net.id === nets[index]?.id)).toBe(false);
  });

  it("a write that had begun before the release is turned back whole", async () => {
    const board = (await createProject(owner, { name: "Raced", template: "4-layers" })).id;
    const itsDraft = await findRevision(owner, board);
    const write = createNetClass(owner, board, aClass("Late"));
    const release = data.open.db
      .update(revision)
      .set({ state: "released" })
      .where(eq(revision.id, itsDraft.id));
    const [written] = await Promise.allSettled([write, release]);
    const after = await readInputs(owner, itsDraft.id);
    expect(after.classes).toHaveLength(written.status === "fulfilled" ? 1 : 0);
    if (written.status === "rejected") expect(written.reason).toBeInstanceOf(RefusedError);
  });
});
