import { afterAll, beforeAll, beforeEach, describe, expect, it } from "vitest";
import { cancelImport, getImport, listImports } from "@/lib/db/import-batch";
import { getNet, listNets } from "@/lib/db/net";
import { listNeighbours } from "@/lib/db/neighbour";
import { patchNets } from "@/lib/db/net-fields";
import { listParts } from "@/lib/db/part";
import { createProject } from "@/lib/db/project";
import { findRevision, type RevisionRef } from "@/lib/db/revision";
import {
  confirmImport,
  importProblemsCsv,
  receiveList,
  remapImport,
  showImport,
} from "@/lib/jobs/import-list";
import { importWorkerIdle } from "@/lib/jobs/import-worker";
import type { UserActor } from "@/lib/schemas/actor";
import { NotFoundError, RefusedError } from "@/lib/schemas/errors";
import type { ImportMode } from "@/lib/schemas/import-list";
import { createTestDatabase, type TestDatabase } from "../support/database";

let data: TestDatabase;
let designer: UserActor;
let projectId: string;
let draft: RevisionRef;
let count = 0;

beforeAll(async () => {
  data = await createTestDatabase();
  designer = data.own.actors.designer;
});
afterAll(() => data.close());
beforeEach(async () => {
  projectId = (await createProject(designer, { name: `Board ${++count}`, template: "6-layers" })).id;
  draft = await findRevision(designer, projectId);
});

const HEADER = "net,from,to,layer,width_mm,length_mm\n";
const bytes = (text: string) => new TextEncoder().encode(text);
const receive = (text: string) =>
  receiveList(designer, projectId, { bytes: bytes(text), fileName: "list.csv" });

async function importNow(text: string, mode: ImportMode = "merge") {
  const received = await receive(text);
  await confirmImport(designer, projectId, received.import.id, mode);
  await importWorkerIdle();
  return getImport(designer, projectId, received.import.id);
}

describe("an import", () => {
  it("shows what it read, writes nothing until it is confirmed, then writes the good rows", async () => {
    const received = await receive(
      `${HEADER}A,U1.1,U2.1,TOP,0.1,10\nA,U2.1,U3.1,L6 Bottom,0.1,x\nB,U1.2,via1,TOP,0.1,5\n`,
    );
    expect(received.preview).toMatchObject({
      total: 3,
      good: 2,
      badRows: 1,
      effect: { things: "nets", added: 2, incomplete: 1 },
    });
    expect(received.preview.layers[0]).toMatchObject({ name: "TOP", rows: 2 });
    expect(
      received.preview.copper.find(({ lineageId }) => lineageId === received.preview.layers[0]?.lineageId)
        ?.name,
    ).toMatch(/top/i);
    expect((await listNets(designer, draft)).total).toBe(0);

    await confirmImport(designer, projectId, received.import.id, "merge");
    await importWorkerIdle();
    const done = await showImport(designer, projectId, received.import.id);
    expect(done.import).toMatchObject({
      state: "applied",
      progress: 1,
      report: { total: 3, good: 2, badRows: 1, added: 2, updated: 0 },
    });
    const { nets } = await listNets(designer, draft);
    expect(nets.map(({ name, scope }) => [name, scope])).toEqual([
      ["A", "in"],
      ["B", "incomplete"],
    ]);
    expect(await importProblemsCsv(designer, projectId, received.import.id)).toContain("3,length,x,");
  });

  it("is read anew under another mapping", async () => {
    const { import: list } = await receive("net,from,to,layer,width,length\nA,U1.1,U2.1,TOP,5,400\n");
    const mapping = structuredClone(list.mapping);
    for (const field of ["width", "length"])
      mapping.fields[field] = { column: mapping.fields[field]?.column ?? null, unit: "mil" };
    mapping.layers = { TOP: null };
    const again = await remapImport(designer, projectId, list.id, mapping);
    expect(again.preview.layers).toEqual([{ name: "TOP", rows: 1, lineageId: null }]);
    await confirmImport(designer, projectId, list.id, "merge");
    await importWorkerIdle();
    const [row] = (await listNets(designer, draft)).nets;
    const net = await getNet(designer, draft, row?.id ?? "");
    expect(net.topology.sections[0]).toMatchObject({
      width: { value: "5", unit: "mil" },
      layerLineageId: null,
    });
  });

  it("keeps lineage and what people set when a net comes again; replacing removes what is not named", async () => {
    await importNow(`${HEADER}A,U1.1,U2.1,TOP,0.1,10\nB,U1.2,U2.2,TOP,0.1,10\n`);
    const before = (await listNets(designer, draft)).nets;
    await patchNets(
      designer,
      projectId,
      [{ id: before[0]?.id ?? "", fields: { matchGroup: "G1" } }],
      "group",
    );
    const row = await importNow(`${HEADER}A,U1.1,U2.1,TOP,0.1,20\n`, "replace");
    expect(row.report).toMatchObject({ added: 0, updated: 1, removed: 1 });
    const after = (await listNets(designer, draft)).nets;
    expect(after).toHaveLength(1);
    expect(after[0]).toMatchObject({ name: "A", lineageId: before[0]?.lineageId, matchGroup: "G1" });
    expect(after[0]?.length_m).toBeCloseTo(0.02, 12);
  });

  it("keeps the drivers a net list named when the sections come", async () => {
    await importNow("net,layer,width,length,driver,receivers\nA,TOP,0.1,10,U1.1,U2.1\n");
    await importNow(`${HEADER}A,U1.1,via1,TOP,0.1,5\nA,via1,U2.1,TOP,0.1,5\n`);
    const [row] = (await listNets(designer, draft)).nets;
    const net = await getNet(designer, draft, row?.id ?? "");
    expect(net.topology.sections).toHaveLength(2);
    expect(net.topology.pins.map(({ node, role }) => [node, role])).toEqual([
      ["U1.1", "driver"],
      ["U2.1", "receiver"],
    ]);
  });

  it("takes parts and neighbours, warning of what it cannot use", async () => {
    const parts = await receive("reference,part number,value,pins\nR1,RC,33R,2\nR2,RC,see note,2\n");
    expect(parts.preview.warningCount).toBe(1);
    await confirmImport(designer, projectId, parts.import.id, "merge");
    const neighbours = await receive("net,neighbour,layer,gap_mm,parallel_mm\nA,B,TOP,0.2,10\n");
    expect(neighbours.preview.warnings.map(({ column }) => column)).toEqual(["net", "neighbour"]);
    await confirmImport(designer, projectId, neighbours.import.id, "merge");
    await importWorkerIdle();
    expect((await listParts(designer, draft)).map(({ reference }) => reference)).toEqual(["R1", "R2"]);
    expect(await listNeighbours(designer, draft)).toHaveLength(1);
  });

  it("refuses what is no table, with the reason", async () => {
    await expect(
      receiveList(designer, projectId, { bytes: bytes("%PDF-1.7 x"), fileName: "nets.csv" }),
    ).rejects.toThrow(/PDF document/);
    await expect(receive("")).rejects.toThrow(RefusedError);
  });

  it("is not confirmed while a required column is missing", async () => {
    const { import: list } = await receiveList(designer, projectId, {
      bytes: bytes("net,foo\nA,1\n"),
      fileName: "x",
      kind: "section list",
    });
    await expect(confirmImport(designer, projectId, list.id, "merge")).rejects.toThrow(
      /No column is chosen for from/,
    );
  });

  it("leaves nothing when it is cancelled, before or while it is applied", async () => {
    const first = await receive(`${HEADER}A,U1.1,U2.1,TOP,0.1,10\n`);
    await cancelImport(designer, projectId, first.import.id);
    await expect(confirmImport(designer, projectId, first.import.id, "merge")).rejects.toThrow(/was dropped/);
    const second = await receive(`${HEADER}A,U1.1,U2.1,TOP,0.1,10\n`);
    await confirmImport(designer, projectId, second.import.id, "merge");
    await cancelImport(designer, projectId, second.import.id);
    await importWorkerIdle();
    const row = await getImport(designer, projectId, second.import.id);
    expect(row.state).toBe("cancelled");
    expect((await listNets(designer, draft)).total).toBe(0);
  });

  it("is applied once, and not confirmed twice", async () => {
    const { import: list } = await receive(`${HEADER}A,U1.1,U2.1,TOP,0.1,10\n`);
    await confirmImport(designer, projectId, list.id, "merge");
    await importWorkerIdle();
    await expect(confirmImport(designer, projectId, list.id, "merge")).rejects.toThrow(/is in already/);
  });

  it("does not exist for another team, nor for a manufacturer; a reviewer reads but does not import", async () => {
    const { import: list } = await receive(`${HEADER}A,U1.1,U2.1,TOP,0.1,10\n`);
    for (const actor of [data.other.actors.owner, data.own.actors.manufacturer]) {
      await expect(getImport(actor, projectId, list.id)).rejects.toThrow(NotFoundError);
      await expect(confirmImport(actor, projectId, list.id, "merge")).rejects.toThrow(NotFoundError);
      await expect(cancelImport(actor, projectId, list.id)).rejects.toThrow(NotFoundError);
      await expect(receiveList(actor, projectId, { bytes: bytes(HEADER), fileName: "x" })).rejects.toThrow(
        NotFoundError,
      );
      expect(await listImports(actor, projectId)).toEqual([]);
    }
    const { reviewer } = data.own.actors;
    expect((await showImport(reviewer, projectId, list.id)).import.id).toBe(list.id);
    await expect(confirmImport(reviewer, projectId, list.id, "merge")).rejects.toThrow(NotFoundError);
    await expect(cancelImport(reviewer, projectId, list.id)).rejects.toThrow(NotFoundError);
  });
});

it("takes in 20,000 rows", async () => {
  const rows = Array.from(
    { length: 20_000 },
    (_, i) =>
      `N${i >> 1},${i % 2 ? `v${i}` : `U1.${i}`},${i % 2 ? `U2.${i}` : `v${i + 1}`},TOP,0.127,${1 + (i % 50)}`,
  );
  const row = await importNow(HEADER + rows.join("\n"));
  expect(row.report).toMatchObject({ total: 20_000, good: 20_000, added: 10_000, incomplete: 0 });
  expect((await listNets(designer, draft, { limit: 1 })).total).toBe(10_000);
});
