import { createHash } from "node:crypto";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import type { ReleaseRow } from "@/lib/db/release";
import { closeCheckPool } from "@/lib/jobs/check-pool";
import { reportFiles, ruleReport } from "@/lib/reports/rule-report";
import { createTestDatabase, type TestDatabase } from "../support/database";
import { draftBoard, releaseBoard, runToEnd } from "../support/released-board";

let database: TestDatabase;
let projectId: string;
let release: ReleaseRow;

beforeAll(async () => {
  database = await createTestDatabase();
  const [team] = database.teams;
  const { project } = await draftBoard(team);
  projectId = project.id;
  const run = await runToEnd(team, projectId);
  release = (await releaseBoard(team, projectId, run.id)).release;
});
afterAll(async () => {
  await closeCheckPool();
  await database.close();
});

async function zipBytes(): Promise<Buffer> {
  const { zip } = await ruleReport(database.teams[0].actors.reviewer, projectId, release.id);
  const parts: Uint8Array[] = [];
  for await (const part of zip as unknown as AsyncIterable<Uint8Array>) parts.push(part);
  return Buffer.concat(parts);
}

const sha256 = (content: string | Buffer) => createHash("sha256").update(content).digest("hex");

describe("rule report", () => {
  it("is byte-identical in 20 repeats", async () => {
    const first = sha256(await zipBytes());
    for (let repeat = 1; repeat < 20; repeat++) expect(sha256(await zipBytes())).toBe(first);
  });

  it("holds a manifest whose sums are those of the files, all of them", async () => {
    const files = await reportFiles(database.teams[0].actors.reviewer, projectId, release);
    const manifest = JSON.parse(files.find((file) => file.name === "manifest.json")?.content ?? "{}") as {
      files: { name: string; bytes: number; sha256: string }[];
    };
    const others = files.filter((file) => file.name !== "manifest.json");
    expect(manifest.files.map((entry) => entry.name)).toEqual(others.map((file) => file.name).sort());
    for (const entry of manifest.files) {
      const file = others.find((other) => other.name === entry.name);
      expect(entry.sha256).toBe(sha256(file?.content ?? ""));
      expect(entry.bytes).toBe(Buffer.byteLength(file?.content ?? ""));
    }
  });

  it("draws every failing path at its worst corner, at most 2,000 points, and holds no time but the release's", async () => {
    const files = await reportFiles(database.teams[0].actors.reviewer, projectId, release);
    const drawn = files.filter((file) => file.name.startsWith("waveforms/"));
    expect(drawn.map((file) => file.name)).toEqual(["waveforms/PUMP_CLK.csv", "waveforms/PUMP_CLK.svg"]);
    expect(drawn[0]?.content.trim().split("\r\n").length).toBeLessThanOrEqual(2_001);
    const years = files.flatMap((file) => file.content.match(/"[a-zA-Z]*At":\d{13}/g) ?? []);
    expect(new Set(years)).toEqual(new Set([`"releasedAt":${release.releasedAt}`]));
  });

  it("is not there for another team", async () => {
    await expect(ruleReport(database.teams[1].actors.reviewer, projectId, release.id)).rejects.toThrow(
      /does not exist/,
    );
  });
});
