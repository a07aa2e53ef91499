import { afterAll, beforeAll, expect, it } from "vitest";
import { getBindings } from "@/lib/db/binding";
import { applyLayoutLists } from "@/lib/db/layout-lists";
import { listNets } from "@/lib/db/net";
import { createProject } from "@/lib/db/project";
import { findRevision } from "@/lib/db/revision";
import { undo } from "@/lib/db/undo";
import { confirmProposals, proposeForDraft } from "@/lib/jobs/name-proposals";
import { aNet } from "../support/documents";
import { createTestDatabase, type TestDatabase } from "../support/database";

let data: TestDatabase;
beforeAll(async () => {
  data = await createTestDatabase();
});
afterAll(() => data.close());

it("proposes from names, writes what is confirmed as undoable edits, and does not propose it again", async () => {
  const { designer } = data.own.actors;
  const { id: projectId } = await createProject(designer, {
    name: "Tide gauge controller",
    template: "6-layers",
  });
  const names = ["+3V3", "CLK_P", "CLK_N", "DQ0", "DQ1", "DQ2", "DQ3", "RESET"];
  await applyLayoutLists(
    designer,
    projectId,
    { nets: names.map((name) => aNet(name)) },
    { mode: "merge", summary: "nets" },
  );
  const draft = await findRevision(designer, projectId);

  const found = await proposeForDraft(designer, projectId);
  expect(found.outOfScope.map(({ net }) => net)).toEqual(["+3V3"]);
  expect(found.pairs.map(({ name }) => name)).toEqual(["CLK"]);
  expect(found.buses.map(({ label }) => label)).toEqual(["DQ[0..3]"]);
  expect(found.matchGroups.map(({ ids }) => ids.length)).toEqual([4]);
  expect(found.pins.pins).toHaveLength(16);

  const changed = await confirmProposals(designer, projectId, {
    outOfScope: found.outOfScope.map(({ id, kind, reason }) => ({ id, kind, reason })),
    pairs: found.pairs.map(({ positive, negative }) => ({ positive: positive.id, negative: negative.id })),
    buses: found.buses.map(({ name, members }) => ({ name, members })),
    matchGroups: found.matchGroups.map(({ name, ids }) => ({ name, ids })),
    bindings: {
      version: found.bindings.version,
      bindings: [
        {
          referencePattern: "U1",
          partNumberPattern: "*",
          pinPattern: "*",
          netPattern: "*",
          role: "driver",
          modelLineageId: null,
        },
      ],
    },
  });
  expect(changed).toBe(7);
  const { nets } = await listNets(designer, draft);
  const net = (name: string) => nets.find((row) => row.name === name);
  expect(net("+3V3")).toMatchObject({ scope: "out", scopeKind: "power" });
  expect(net("CLK_P")).toMatchObject({ pairPartner: "CLK_N" });
  expect(net("DQ3")).toMatchObject({ bus: "DQ", matchGroup: "DQ" });
  expect((await getBindings(designer, draft)).bindings).toMatchObject([
    { referencePattern: "U1", role: "driver" },
  ]);

  const again = await proposeForDraft(designer, projectId);
  expect([again.outOfScope, again.pairs, again.buses, again.matchGroups]).toEqual([[], [], [], []]);

  await undo(designer, projectId);
  await undo(designer, projectId);
  expect((await listNets(designer, draft, { scope: "out" })).total).toBe(0);
});

it("is a designer's: a reviewer and another team see nothing of it", async () => {
  const { id: projectId } = await createProject(data.own.actors.designer, {
    name: "Other",
    template: "6-layers",
  });
  for (const actor of [data.own.actors.reviewer, data.own.actors.manufacturer, data.other.actors.owner])
    await expect(proposeForDraft(actor, projectId)).rejects.toThrow(/does not exist/);
});
