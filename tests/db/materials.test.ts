import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { listAudit, verifyAuditChain } from "@/lib/db/audit";
import {
  createMaterial,
  getMaterial,
  listMaterials,
  putMaterial,
  removeMaterial,
  restoreMaterial,
} from "@/lib/db/material";
import { material } from "@/lib/db/schema";
import { ConflictError, RefusedError } from "@/lib/schemas/errors";
import { materialDoc } from "@/lib/schemas/material";
import { aMaterial } from "../support/documents";
import { createTestDatabase, type TestDatabase } from "../support/database";

let data: TestDatabase;
beforeAll(async () => {
  data = await createTestDatabase();
});
afterAll(() => data.close());

const caught = (promise: Promise<unknown>) =>
  promise.then(
    () => null,
    (error: unknown) => error,
  );

describe("a team's own materials", () => {
  it("are kept as typed, with derived SI values and who made them; each team sees its own", async () => {
    const { designer, reviewer } = data.own.actors;
    const made = await createMaterial(
      designer,
      aMaterial("Thin core", { thickness: { value: "4", unit: "mil" } }),
    );
    expect(made).toMatchObject({
      name: "Thin core",
      version: 0,
      createdByName: designer.name,
      thickness: { value: "4", unit: "mil" },
    });
    const [row] = await data.db.select().from(material);
    expect(row).toMatchObject({ thickness_m: 101.6e-6, dkFrequency_hz: 1e10, roughness_m: null });
    expect((await listMaterials(reviewer)).map(({ name }) => name)).toEqual(["Thin core"]);
    expect(await listMaterials(data.other.actors.owner)).toEqual([]);
    await expect(createMaterial(reviewer, aMaterial("Theirs"))).rejects.toThrow(/does not exist/);
    await expect(createMaterial(data.own.actors.manufacturer, aMaterial("Theirs"))).rejects.toThrow(
      /does not exist/,
    );
  });

  it("have one name in a team, and any in another", async () => {
    const { designer } = data.own.actors;
    await createMaterial(designer, aMaterial("Once"));
    const refusal = await caught(createMaterial(designer, aMaterial("Once")));
    expect(refusal).toBeInstanceOf(RefusedError);
    expect((refusal as RefusedError).fields.name).toMatch(/named Once already/);
    await createMaterial(data.other.actors.designer, aMaterial("Once"));
  });

  it("the second of two writers is turned back, told what is there now and in what it differs", async () => {
    const { designer, owner } = data.own.actors;
    const read = await createMaterial(designer, aMaterial("Shared"));
    await putMaterial(owner, read.id, read.version, aMaterial("Shared", { dk: "3.7" }));
    const refusal = await caught(
      putMaterial(designer, read.id, read.version, aMaterial("Shared", { df: "0.005" })),
    );
    expect(refusal).toBeInstanceOf(ConflictError);
    expect(refusal).toMatchObject({ changed: ["dk", "df"], current: { version: 1, dk: "3.7" } });
    const over = await putMaterial(designer, read.id, 1, aMaterial("Shared", { df: "0.005" }));
    expect(over).toMatchObject({ version: 2, df: "0.005", dk: "3.62" });
    expect(await putMaterial(designer, read.id, 2, aMaterial("Shared", { df: "0.005" }))).toMatchObject({
      version: 2,
    });
    expect(await caught(removeMaterial(designer, read.id, 1))).toBeInstanceOf(ConflictError);
  });

  it("what is taken away is gone from the list and comes back by an undo, unless its name was given to another", async () => {
    const { designer } = data.own.actors;
    const gone = await createMaterial(designer, aMaterial("Gone"));
    await removeMaterial(designer, gone.id, gone.version);
    expect((await listMaterials(designer)).map(({ name }) => name)).not.toContain("Gone");
    await expect(getMaterial(designer, gone.id)).rejects.toThrow(/does not exist/);
    const back = await restoreMaterial(designer, gone.id);
    expect(back).toMatchObject({ name: "Gone", dk: gone.dk, id: gone.id });
    expect(await restoreMaterial(designer, gone.id)).toEqual(back);
    await removeMaterial(designer, gone.id, back.version);
    await createMaterial(designer, aMaterial("Gone"));
    expect(await caught(restoreMaterial(designer, gone.id))).toBeInstanceOf(RefusedError);
  });

  it("every act is in the audit log, whose chain holds", async () => {
    const { owner } = data.own.actors;
    const actions = (await listAudit(owner, { search: "material" })).map(({ action }) => action);
    expect(new Set(actions)).toEqual(
      new Set(["material.create", "material.update", "material.remove", "material.restore"]),
    );
    expect(await verifyAuditChain(owner)).toMatchObject({ intact: true });
  });
});

describe("the document of a material", () => {
  const refused = (over: object) =>
    materialDoc
      .safeParse({ ...aMaterial("M"), ...over })
      .error?.issues.map(({ path, message }) => `${path.join(".")}: ${message}`);

  it("a dielectric needs Dk and its frequency; a foil a thickness or a roughness, and nothing of a dielectric", () => {
    expect(refused({ dk: null, frequency: null })).toEqual([
      "dk: A laminate needs a Dk.",
      "frequency: Say at which frequency Dk and Df hold.",
    ]);
    expect(refused({ kind: "foil" })).toHaveLength(3);
    expect(refused({ kind: "foil", dk: null, df: null, frequency: null })).toBeUndefined();
    expect(refused({ kind: "foil", dk: null, df: null, frequency: null, thickness: null })).toEqual([
      "thickness: A foil has a thickness, a roughness, or both: fill one.",
    ]);
    expect(refused({ roughness: { value: "1", unit: "µm" } })).toEqual([
      "roughness: Roughness is the foil's: leave this empty.",
    ]);
    expect(refused({ kind: "mask", resinPercent: "50" })).toEqual([
      "resinPercent: A mask has no glass: leave this empty.",
    ]);
  });

  it("Dk below air, resin beyond 100 %, a negative thickness and no source are refused", () => {
    expect(refused({ dk: "0.9" })?.[0]).toMatch(/at least 1/);
    expect(refused({ resinPercent: "101" })?.[0]).toMatch(/100 %/);
    expect(refused({ thickness: { value: "-1", unit: "mm" } })?.[0]).toMatch(/above zero/);
    expect(refused({ source: " " })?.[0]).toMatch(/where these values come from/);
  });
});
