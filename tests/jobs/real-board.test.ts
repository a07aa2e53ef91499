import { existsSync, readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { putBindings, getBindings } from "@/lib/db/binding";
import { createModel } from "@/lib/db/model";
import { createProject } from "@/lib/db/project";
import { findRevision } from "@/lib/db/revision";
import { readInputs } from "@/lib/db/snapshot";
import { confirmImport, receiveList } from "@/lib/jobs/import-list";
import { importWorkerIdle } from "@/lib/jobs/import-worker";
import { confirmProposals, proposeForDraft } from "@/lib/jobs/name-proposals";
import { resolvePaths } from "@/lib/resolve/resolve-paths";
import { modelDoc } from "@/lib/schemas/model";
import { allCorners, checkPath } from "@/lib/si";
import { createTestDatabase, type TestDatabase } from "../support/database";

const file = fileURLToPath(new URL("../../../shared/reference/boards/outer-sections.csv", import.meta.url));
const present = existsSync(file);
if (!present)
  process.stdout.write(
    "Skipped: the real board's section list is not beside this repository (shared/reference/boards).\n",
  );

let data: TestDatabase;
beforeAll(async () => {
  data = await createTestDatabase();
});
afterAll(() => data.close());

describe.skipIf(!present)("the real board, end to end", () => {
  it("comes in whole; with 'U1 drives' every complete route is judged or says what is missing", async () => {
    const { designer } = data.own.actors;
    const { id: projectId } = await createProject(designer, { name: "Real board", template: "18-layers" });
    const received = await receiveList(designer, projectId, {
      bytes: readFileSync(file),
      fileName: "outer-sections.csv",
    });
    expect(received.preview).toMatchObject({ total: 881, good: 881, badRows: 0, duplicateCount: 1 });
    await confirmImport(designer, projectId, received.import.id, "merge");
    await importWorkerIdle();

    const proposals = await proposeForDraft(designer, projectId);
    const supplies = proposals.outOfScope.filter(({ kind }) => kind === "power");
    expect(supplies.map(({ net }) => net)).toEqual(["+12V", "VDDD", "VREFL", "VREFR"]);
    await confirmProposals(designer, projectId, {
      outOfScope: supplies.map(({ id, kind, reason }) => ({ id, kind, reason })),
      pairs: [],
      buses: [],
      matchGroups: [],
      bindings: null,
    });
    const draft = await findRevision(designer, projectId);
    const model = await createModel(designer, projectId, aPort());
    const any = { partNumberPattern: "*", pinPattern: "*", netPattern: "*", modelLineageId: model.lineageId };
    await putBindings(designer, projectId, (await getBindings(designer, draft)).version, [
      { ...any, referencePattern: "U1", role: "driver" },
      { ...any, referencePattern: "*", role: "receiver" },
    ]);

    const inputs = await readInputs(designer, draft.id);
    const { paths } = resolvePaths(inputs);
    const complete = inputs.nets.filter(({ scope }) => scope === "in");
    expect(complete).toHaveLength(50);
    const netsOnPaths = paths.flatMap((path) => path.nets.map(({ name }) => name));
    expect(complete.filter(({ name }) => !netsOnPaths.includes(name))).toEqual([]);

    const judged = paths.map((path) => ({ path, result: checkPath(path, { corners: allCorners }) }));
    const simulated = judged.filter(({ result }) =>
      result.findings.some(({ rule, value }) => rule === "overshoot" && value !== null),
    );
    const ready = judged.filter(({ path }) => path.missing.length === 0);
    expect(ready.length).toBeGreaterThan(0);
    expect(simulated.map(({ path }) => path.name)).toEqual(ready.map(({ path }) => path.name));
    for (const { path, result } of judged)
      if (path.missing.length > 0) {
        expect(result.verdict).toBe("no data");
        expect(path.missing.every(({ input, detail }) => input.length > 0 && detail.length > 0)).toBe(true);
      }
  });
});

function aPort() {
  const corners = <T>(value: T) => ({ slow: value, typical: value, fast: value });
  const volts = (value: string) => ({ value, unit: "V" });
  const farads = { value: "3", unit: "pF" };
  return modelDoc.parse({
    name: "Port",
    driver: {
      vdd: volts("3.3"),
      resistance: corners({ value: "25", unit: "Ω" }),
      riseTime: corners({ value: "0.5", unit: "ns" }),
    },
    receiver: {
      vdd: volts("3.3"),
      capacitance: { min: farads, typical: farads, max: farads },
      vil: volts("0.8"),
      vih: volts("2"),
    },
  });
}
