import { afterAll, beforeAll, beforeEach, describe, expect, it } from "vitest";
import { getBindings, putBindings } from "@/lib/db/binding";
import { setClock } from "@/lib/db/clock";
import { listEditors, listEdits } from "@/lib/db/edit";
import { applyLayoutLists } from "@/lib/db/layout-lists";
import { createModel, deleteModel, listModels } from "@/lib/db/model";
import { getNet, listNets } from "@/lib/db/net";
import { createNetClass, deleteNetClass, getNetClass, listNetClasses, putNetClass } from "@/lib/db/net-class";
import { patchNets } from "@/lib/db/net-fields";
import { createProject } from "@/lib/db/project";
import { findRevision, type RevisionRef } from "@/lib/db/revision";
import { getRuleSet, putRuleSet } from "@/lib/db/rule-set";
import { getStackup, putStackup } from "@/lib/db/stackup";
import { redo, undo, undoState } from "@/lib/db/undo";
import type { UserActor } from "@/lib/schemas/actor";
import { ConflictError, RefusedError } from "@/lib/schemas/errors";
import { bindingDoc } from "@/lib/schemas/model";
import { aClass, aModel, aNet } from "../support/documents";
import { createTestDatabase, type TestDatabase } from "../support/database";

let data: TestDatabase;
let designer: UserActor;
let owner: UserActor;
let projectId: string;
let draft: RevisionRef;
let boards = 0;

beforeAll(async () => {
  data = await createTestDatabase();
  ({ designer, owner } = data.own.actors);
  let time = Date.UTC(2026, 0, 5);
  setClock(() => ++time);
});
afterAll(async () => {
  setClock(null);
  await data.close();
});
beforeEach(async () => {
  projectId = (await createProject(designer, { name: `Board ${++boards}`, template: "4-layers" })).id;
  draft = await findRevision(designer, projectId);
});

async function withThickness(value: string) {
  const stackup = await getStackup(designer, draft);
  const layers = stackup.layers.map((layer) =>
    layer.name === "Core 2-3" ? { ...layer, thickness: { value, unit: "mm" } } : layer,
  );
  return { version: stackup.version, doc: { name: stackup.name, layers } };
}
const prepreg = async () =>
  (await getStackup(designer, draft)).layers.find((layer) => layer.name === "Core 2-3")?.thickness_m;

describe("two people and one thing", () => {
  it("the second write of a stackup is turned back, naming who changed what", async () => {
    const first = await withThickness("0.15");
    const second = await withThickness("0.18");
    await putStackup(owner, projectId, first.version, first.doc);
    const refusal = await putStackup(designer, projectId, second.version, second.doc).catch(
      (error: unknown) => error,
    );
    expect(refusal).toBeInstanceOf(ConflictError);
    expect((refusal as ConflictError).message).toContain("Saltmarsh owner");
    expect((refusal as ConflictError).changed).toEqual(["Core 2-3 thickness"]);
    expect((refusal as ConflictError).current).toMatchObject({ version: 1 });
    expect(await prepreg()).toBe(0.15e-3);
  });

  it("of twelve writes at one moment one is kept and eleven are turned back", async () => {
    const writes = await Promise.allSettled(
      Array.from({ length: 12 }, async (_, index) => {
        const { doc } = await withThickness(`0.${20 + index}`);
        return putStackup(index % 2 ? owner : designer, projectId, 0, doc);
      }),
    );
    const kept = writes.filter((write) => write.status === "fulfilled");
    expect(kept).toHaveLength(1);
    for (const write of writes)
      if (write.status === "rejected") expect(write.reason).toBeInstanceOf(ConflictError);
    expect((await getStackup(designer, draft)).version).toBe(1);
    expect(await listEdits(designer, draft.id)).toHaveLength(1);
  });

  it("a stale class, binding list and net are turned back", async () => {
    const made = await createNetClass(designer, projectId, aClass("Data"));
    await putNetClass(owner, projectId, made.id, 0, aClass("Data", { signal: "clock" }));
    await expect(putNetClass(designer, projectId, made.id, 0, aClass("Data"))).rejects.toMatchObject({
      name: "ConflictError",
      changed: ["signal"],
    });
    await putBindings(owner, projectId, 0, [bindingDoc.parse({ role: "driver" })]);
    await expect(putBindings(designer, projectId, 0, [])).rejects.toBeInstanceOf(ConflictError);
    await applyLayoutLists(designer, projectId, { nets: [aNet("D0")] }, { mode: "merge", summary: "nets" });
    const [net] = (await listNets(designer, draft)).nets;
    await patchNets(owner, projectId, [{ id: net?.id ?? "", version: 0, fields: { scope: "out" } }], "out");
    await expect(
      patchNets(
        designer,
        projectId,
        [{ id: net?.id ?? "", version: 0, fields: { matchGroup: "A" } }],
        "group",
      ),
    ).rejects.toMatchObject({ name: "ConflictError", changed: ["D0"] });
  });
});

describe("the layers of a class", () => {
  it("are copper layers of the draft's stackup; any other is refused", async () => {
    const { layers } = await getStackup(designer, draft);
    const on = (layerLineageId = "") => [{ layerLineageId, width: null, gap: null }];
    const copper = layers.find(({ kind }) => kind === "signal")?.lineageId;
    const core = layers.find(({ kind }) => kind === "core")?.lineageId;
    const made = await createNetClass(designer, projectId, aClass("Data", { layers: on(copper) }));
    for (const wrong of [core, "0190a000-0000-7000-8000-000000000001"]) {
      const doc = aClass("Other", { layers: on(wrong) });
      await expect(createNetClass(designer, projectId, doc)).rejects.toThrow("no such copper layer");
      await expect(putNetClass(designer, projectId, made.id, 0, doc)).rejects.toThrow("no such copper layer");
    }
  });
});

describe("undo and redo", () => {
  it("take a stackup back and bring it on again, the content to the letter", async () => {
    const before = (await getStackup(designer, draft)).layers;
    const { version, doc } = await withThickness("0.15");
    await putStackup(designer, projectId, version, doc);
    const after = (await getStackup(designer, draft)).layers;
    expect(await undoState(designer, draft)).toEqual({ undo: "Stackup: Core 2-3 thickness", redo: null });
    await undo(designer, projectId);
    expect((await getStackup(designer, draft)).layers).toEqual(before);
    expect(await undoState(designer, draft)).toEqual({ undo: null, redo: "Stackup: Core 2-3 thickness" });
    await redo(designer, projectId);
    expect((await getStackup(designer, draft)).layers).toEqual(after);
  });

  it("walk back through every kind of edit and forth again", async () => {
    const data = await createNetClass(owner, projectId, aClass("Data"));
    await createModel(owner, projectId, aModel("Port"));
    await putBindings(owner, projectId, 0, [bindingDoc.parse({ role: "driver", referencePattern: "U*" })]);
    const { version: _version, ...rules } = await getRuleSet(owner, draft);
    await putRuleSet(owner, projectId, 0, { ...rules, judgedAt: "die" });
    await deleteNetClass(owner, projectId, data.id, 0);
    for (let step = 0; step < 5; step++) await undo(owner, projectId);
    expect(await listNetClasses(owner, draft)).toEqual([]);
    expect(await listModels(owner, draft)).toEqual([]);
    expect((await getBindings(owner, draft)).bindings).toEqual([]);
    expect((await getRuleSet(owner, draft)).judgedAt).toBe("pin");
    await expect(undo(owner, projectId)).rejects.toBeInstanceOf(RefusedError);
    for (let step = 0; step < 4; step++) await redo(owner, projectId);
    expect((await listNetClasses(owner, draft)).map((entry) => entry.lineageId)).toEqual([data.lineageId]);
    expect((await getRuleSet(owner, draft)).judgedAt).toBe("die");
    await redo(owner, projectId);
    expect(await listNetClasses(owner, draft)).toEqual([]);
    await expect(redo(owner, projectId)).rejects.toThrow(/no edit to bring back/);
  });

  it("bulk edits of nets go back to what each net had", async () => {
    const made = await createNetClass(designer, projectId, aClass("Data"));
    const nets = [
      aNet("D0"),
      aNet("D1", { scope: "out", scopeKind: "test" }),
      aNet("D2", { matchGroup: "G" }),
    ];
    await applyLayoutLists(designer, projectId, { nets }, { mode: "merge", summary: "3 nets" });
    const read = async () =>
      Promise.all((await listNets(designer, draft)).nets.map(({ id }) => getNet(designer, draft, id)));
    const before = await read();
    const changed = await patchNets(
      designer,
      projectId,
      before.map(({ id, version }) => ({
        id,
        version,
        fields: { classLineageId: made.lineageId, scope: "in" },
      })),
      "3 nets to Data",
    );
    expect(changed).toBe(3);
    expect((await listNets(designer, draft, { classLineageId: made.lineageId, scope: "in" })).total).toBe(3);
    await undo(designer, projectId);
    expect(await read()).toEqual(before.map((net) => ({ ...net, version: net.version + 2 })));
    await redo(designer, projectId);
    expect((await read()).map((net) => net.classLineageId)).toEqual(Array(3).fill(made.lineageId));
  });

  it("take back only one's own edits, and not what another changed since", async () => {
    const first = await withThickness("0.15");
    await putStackup(designer, projectId, first.version, first.doc);
    await expect(undo(owner, projectId)).rejects.toThrow(/no edit of this draft/);
    const second = await withThickness("0.16");
    await putStackup(owner, projectId, second.version, second.doc);
    await expect(undo(designer, projectId)).rejects.toMatchObject({
      name: "ConflictError",
      changed: ["Core 2-3 thickness"],
    });
    expect(await prepreg()).toBe(0.16e-3);
  });

  it("a new edit ends what could be brought back; an import is not taken back", async () => {
    await createModel(designer, projectId, aModel("Port"));
    await undo(designer, projectId);
    await createModel(designer, projectId, aModel("Other"));
    await expect(redo(designer, projectId)).rejects.toThrow(/no edit to bring back/);
    await applyLayoutLists(designer, projectId, { nets: [aNet("D0")] }, { mode: "merge", summary: "1 net" });
    await expect(undo(designer, projectId)).rejects.toThrow(/is an import/);
  });

  it("a class does not come back under a name that was given away", async () => {
    const made = await createNetClass(designer, projectId, aClass("Data"));
    await deleteNetClass(designer, projectId, made.id, 0);
    await createNetClass(owner, projectId, aClass("Data"));
    await expect(undo(designer, projectId)).rejects.toThrow(/its name has been given/);
  });
});

describe("what others rest on", () => {
  it("a class with nets is not taken away until they are moved", async () => {
    const made = await createNetClass(designer, projectId, aClass("Data"));
    const other = await createNetClass(designer, projectId, aClass("Other"));
    const nets = [
      aNet("D0", { classLineageId: made.lineageId }),
      aNet("D1", { classLineageId: made.lineageId }),
    ];
    await applyLayoutLists(designer, projectId, { nets }, { mode: "merge", summary: "2 nets" });
    await expect(deleteNetClass(designer, projectId, made.id, 0)).rejects.toMatchObject({
      code: "class-in-use",
      detail: { nets: 2 },
    });
    await deleteNetClass(designer, projectId, made.id, 0, other.lineageId);
    expect((await listNets(designer, draft, { classLineageId: other.lineageId })).total).toBe(2);
    await expect(getNetClass(designer, draft, made.id)).rejects.toThrow(/does not exist/);
  });

  it("a model in use is not taken away", async () => {
    const model = await createModel(designer, projectId, aModel("Port"));
    await createNetClass(designer, projectId, aClass("Data", { driverModelLineageId: model.lineageId }));
    await putBindings(designer, projectId, 0, [
      bindingDoc.parse({ role: "driver", modelLineageId: model.lineageId }),
    ]);
    await expect(deleteModel(designer, projectId, model.id, 0)).rejects.toMatchObject({
      detail: { users: ["class Data", "1 binding"] },
    });
  });

  it("two classes of one name are refused at the field", async () => {
    await createNetClass(designer, projectId, aClass("Data"));
    const refusal = await createNetClass(designer, projectId, aClass("Data")).catch(
      (error: unknown) => error,
    );
    expect(refusal).toBeInstanceOf(RefusedError);
    expect((refusal as RefusedError).fields.name).toContain("Data");
  });

  it("names everyone who edited, taken-back edits included", async () => {
    await createModel(designer, projectId, aModel("Port"));
    await undo(designer, projectId);
    await createModel(owner, projectId, aModel("Other"));
    const editors = await listEditors(designer, draft.id);
    expect(new Set(editors.map((editor) => editor.userId))).toEqual(new Set([designer.userId, owner.userId]));
  });
});

it("layers keep their lineage when a list without ids is put in their place", async () => {
  const { version, layers, name } = await getStackup(designer, draft);
  const bare = layers.map(({ id: _id, lineageId: _lineageId, ...layer }) => layer);
  const renamed = bare.map((layer) => ({ ...layer, material: "Other" }));
  const after = await putStackup(designer, projectId, version, { name, layers: renamed });
  expect(after.layers.map((layer) => layer.lineageId)).toEqual(layers.map((layer) => layer.lineageId));
});
