import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { listAudit, verifyAuditChain } from "@/lib/db/audit";
import { getBindings, putBindings } from "@/lib/db/binding";
import { startDraft } from "@/lib/db/draft-copy";
import { hasEdited, listEditors } from "@/lib/db/edit";
import { applyLayoutLists } from "@/lib/db/layout-lists";
import {
  createMaterial,
  getMaterial,
  listMaterials,
  putMaterial,
  removeMaterial,
  restoreMaterial,
} from "@/lib/db/material";
import { createModel, deleteModel, getModel, listModels, putModel } from "@/lib/db/model";
import { listNeighbours } from "@/lib/db/neighbour";
import { getNet, listNets } from "@/lib/db/net";
import { createNetClass, deleteNetClass, getNetClass, listNetClasses, putNetClass } from "@/lib/db/net-class";
import { patchNets } from "@/lib/db/net-fields";
import { listParts } from "@/lib/db/part";
import { archiveProject, createProject, getProject, listProjects, updateProject } from "@/lib/db/project";
import { findRevision, getRevision, type RevisionRef } from "@/lib/db/revision";
import { getRuleSet, putRuleSet } from "@/lib/db/rule-set";
import { currentInputHash, freezeInputs, readInputs, thawInputs } from "@/lib/db/snapshot";
import { getStackup, putStackup } from "@/lib/db/stackup";
import { redo, undo } from "@/lib/db/undo";
import type { UserActor } from "@/lib/schemas/actor";
import { aClass, aMaterial, aModel, aNet } from "../support/documents";
import { createTestDatabase, type TestDatabase } from "../support/database";

let data: TestDatabase;
let designer: UserActor;
let projectId: string;
let draft: RevisionRef;
let ids: { classId: string; modelId: string; materialId: string; netId: string };
let chunks: { name: string; sha256: string }[];

beforeAll(async () => {
  data = await createTestDatabase();
  designer = data.own.actors.designer;
  const project = await createProject(designer, { name: "Tide gauge controller", template: "6-layers" });
  projectId = project.id;
  draft = await findRevision(designer, projectId);
  const netClass = await createNetClass(designer, projectId, aClass("Data"));
  const model = await createModel(designer, projectId, aModel("Port"));
  const material = await createMaterial(designer, aMaterial("Thin laminate"));
  await applyLayoutLists(designer, projectId, { nets: [aNet("D0")] }, { mode: "merge", summary: "1 net" });
  const [net] = (await listNets(designer, draft)).nets;
  ids = { classId: netClass.id, modelId: model.id, materialId: material.id, netId: net?.id ?? "" };
  ({ chunks } = await freezeInputs(designer, await readInputs(designer, draft.id)));
});
afterAll(() => data.close());

type Act = (actor: UserActor) => Promise<unknown>;

const reads: Record<string, Act> = {
  getProject: (actor) => getProject(actor, projectId),
  findRevision: (actor) => findRevision(actor, projectId),
  getRevision: (actor) => getRevision(actor, draft.id),
  getStackup: (actor) => getStackup(actor, draft),
  getNetClass: (actor) => getNetClass(actor, draft, ids.classId),
  getModel: (actor) => getModel(actor, draft, ids.modelId),
  getMaterial: (actor) => getMaterial(actor, ids.materialId),
  getBindings: (actor) => getBindings(actor, draft),
  getRuleSet: (actor) => getRuleSet(actor, draft),
  getNet: (actor) => getNet(actor, draft, ids.netId),
  readInputs: (actor) => readInputs(actor, draft.id),
  currentInputHash: (actor) => currentInputHash(actor, draft.id),
  thawInputs: (actor) => thawInputs(actor, chunks),
};

const lists: Record<string, (actor: UserActor) => Promise<unknown[]>> = {
  listNetClasses: (actor) => listNetClasses(actor, draft),
  listModels: (actor) => listModels(actor, draft),
  listMaterials: (actor) => listMaterials(actor),
  listNets: async (actor) => (await listNets(actor, draft)).nets,
  listParts: (actor) => listParts(actor, draft),
  listNeighbours: (actor) => listNeighbours(actor, draft),
  listEditors: (actor) => listEditors(actor, draft.id),
};

const writes: Record<string, Act> = {
  updateProject: (actor) =>
    updateProject(actor, projectId, { version: 0, name: "Theirs", description: "", unit: "mm" }),
  archiveProject: (actor) => archiveProject(actor, projectId),
  putStackup: (actor) => putStackup(actor, projectId, 0, { name: "Theirs", layers: [] }),
  createNetClass: (actor) => createNetClass(actor, projectId, aClass("Theirs")),
  putNetClass: (actor) => putNetClass(actor, projectId, ids.classId, 0, aClass("Theirs")),
  deleteNetClass: (actor) => deleteNetClass(actor, projectId, ids.classId, 0),
  createModel: (actor) => createModel(actor, projectId, aModel("Theirs")),
  putModel: (actor) => putModel(actor, projectId, ids.modelId, 0, aModel("Theirs")),
  deleteModel: (actor) => deleteModel(actor, projectId, ids.modelId, 0),
  putMaterial: (actor) => putMaterial(actor, ids.materialId, 0, aMaterial("Theirs")),
  removeMaterial: (actor) => removeMaterial(actor, ids.materialId, 0),
  restoreMaterial: (actor) => restoreMaterial(actor, ids.materialId),
  putBindings: (actor) => putBindings(actor, projectId, 0, []),
  putRuleSet: (actor) => putRuleSet(actor, projectId, 0, { rules: {}, judgedAt: "die" }),
  patchNets: (actor) => patchNets(actor, projectId, [{ id: ids.netId, fields: { scope: "out" } }], "theirs"),
  applyLayoutLists: (actor) =>
    applyLayoutLists(actor, projectId, { nets: [aNet("X")] }, { mode: "replace", summary: "theirs" }),
  undo: (actor) => undo(actor, projectId),
  redo: (actor) => redo(actor, projectId),
  startDraft: (actor) => startDraft(actor, projectId),
};

describe("another team", () => {
  it.each(Object.keys(reads))("%s finds nothing", async (name) => {
    for (const actor of Object.values(data.other.actors))
      await expect(reads[name]?.(actor)).rejects.toThrow(/does not exist/);
  });
  it.each(Object.keys(lists))("%s is empty", async (name) => {
    for (const actor of Object.values(data.other.actors)) expect(await lists[name]?.(actor)).toEqual([]);
  });
  it.each(Object.keys(writes))("%s finds nothing to write", async (name) => {
    for (const actor of Object.values(data.other.actors))
      await expect(writes[name]?.(actor)).rejects.toThrow(/does not exist/);
  });
  it("lists none of the projects", async () => {
    expect(await listProjects(data.other.actors.owner)).toEqual([]);
  });
});

describe("a manufacturer of the same team", () => {
  it.each(Object.keys({ ...reads, ...writes }))("%s answers as if it did not exist", async (name) => {
    await expect((reads[name] ?? writes[name])?.(data.own.actors.manufacturer)).rejects.toThrow(
      /does not exist/,
    );
  });
  it.each(Object.keys(lists))("%s is empty", async (name) => {
    expect(await lists[name]?.(data.own.actors.manufacturer)).toEqual([]);
  });
});

describe("a reviewer of the same team", () => {
  it.each(Object.keys(reads))("%s is theirs to see", async (name) => {
    await expect(reads[name]?.(data.own.actors.reviewer)).resolves.toBeDefined();
  });
  const designersOnly = [
    "updateProject",
    "archiveProject",
    "putStackup",
    "createNetClass",
    "deleteNetClass",
    "createModel",
    "putModel",
    "deleteModel",
    "putMaterial",
    "removeMaterial",
    "restoreMaterial",
    "putBindings",
    "applyLayoutLists",
    "startDraft",
  ];
  it.each(designersOnly)("%s is the designers'", async (name) => {
    await expect(writes[name]?.(data.own.actors.reviewer)).rejects.toThrow(/does not exist/);
  });
  it("sets limits of a class and nothing else of it", async () => {
    const { reviewer } = data.own.actors;
    const netClass = await getNetClass(reviewer, draft, ids.classId);
    const limits = { overshoot: { enabled: true, limit: "15", note: "" } };
    await expect(
      putNetClass(reviewer, projectId, ids.classId, netClass.version, { ...aClass("Other"), limits }),
    ).rejects.toThrow(/limits; the rest/);
    const changed = await putNetClass(reviewer, projectId, ids.classId, netClass.version, {
      ...aClass("Data"),
      limits,
    });
    expect(changed.limits).toEqual(limits);
    await expect(
      putNetClass(designer, projectId, ids.classId, changed.version, aClass("Data")),
    ).rejects.toThrow(/set by a reviewer/);
  });
});

it("a designer cannot set the project's rules", async () => {
  await expect(writes.putRuleSet?.(designer)).rejects.toThrow(/does not exist/);
});

it("nothing that was refused left a trace", async () => {
  const { owner } = data.own.actors;
  const actors = new Set((await listAudit(owner)).map((entry) => entry.actorId));
  expect(actors).toEqual(new Set([designer.userId, data.own.actors.reviewer.userId]));
  expect(await listAudit(data.other.actors.owner)).toEqual([]);
  expect(await hasEdited(data.other.actors.owner, draft.id)).toBe(false);
  expect((await verifyAuditChain(owner)).intact).toBe(true);
});
