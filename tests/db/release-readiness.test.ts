import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { releaseReadiness } from "@/lib/db/release";
import { findRevision } from "@/lib/db/revision";
import { getRuleSet, putRuleSet } from "@/lib/db/rule-set";
import { cancelRun } from "@/lib/db/run";
import { currentInputHash } from "@/lib/db/snapshot";
import { acceptNoData, missingInputs, signRun } from "@/lib/db/waiver";
import { closeCheckPool } from "@/lib/jobs/check-pool";
import { makeRelease } from "@/lib/jobs/make-release";
import { runWorkerIdle } from "@/lib/jobs/run-worker";
import { startRun } from "@/lib/jobs/start-run";
import { noRuleJudges } from "@/lib/schemas/review";
import { ruleCatalogue } from "@/lib/si/rules";
import { createTestDatabase, type TestDatabase } from "../support/database";
import { draftBoard, releaseBoard, runToEnd } from "../support/released-board";

const maker = { name: "Maker", email: "maker@estuary.example", company: "" };

let data: TestDatabase;

beforeAll(async () => {
  data = await createTestDatabase();
});
afterAll(async () => {
  await runWorkerIdle();
  await closeCheckPool();
  await data.close();
});

async function readiness(projectId: string) {
  const { reviewer } = data.own.actors;
  const draft = await findRevision(reviewer, projectId);
  return releaseReadiness(reviewer, projectId, draft.id, await currentInputHash(reviewer, draft.id));
}

describe("a run with every rule off", () => {
  it("names its paths as not judged, and blocks the release even when that is accepted", async () => {
    const { designer, reviewer, owner } = data.own.actors;
    const projectId = (await draftBoard(data.own, "A", "Unjudged")).project.id;
    const { version, ...ruleSet } = await getRuleSet(designer, await findRevision(designer, projectId));
    const off = ruleCatalogue.map(
      ({ id, severity }) => [id, { enabled: false, limit: null, severity }] as const,
    );
    await putRuleSet(reviewer, projectId, version, { ...ruleSet, rules: Object.fromEntries(off) });
    const run = await runToEnd(data.own, projectId);
    expect(run.counts).toEqual({ "no data": run.total });
    expect(await missingInputs(reviewer, run)).toMatchObject([{ missing: noRuleJudges, paths: run.total }]);
    const kinds = async () => (await readiness(projectId)).blockers.map(({ kind }) => kind);
    expect(await kinds()).toEqual(["nothing judged", "no data", "editor signs"]);
    // The reviewer set the limits, so the owner accepts.
    await acceptNoData(owner, projectId, {
      runId: run.id,
      missing: noRuleJudges,
      reason: "Checked by hand.",
    });
    expect(await kinds()).toEqual(["nothing judged", "editor signs"]);
    await signRun(owner, projectId, run.id, "");
    const release = { runId: run.id, title: "First build", remarks: "", recipients: [maker] };
    await expect(makeRelease(owner, projectId, release)).rejects.toThrow("judged no path");
  });
});

describe("a cancelled run", () => {
  it("does not hide the finished run before it: that one is judged and released", async () => {
    const { designer } = data.own.actors;
    const projectId = (await draftBoard(data.own, "A", "Cancelled")).project.id;
    const good = await runToEnd(data.own, projectId);
    const { id } = await startRun(designer, projectId);
    await cancelRun(designer, projectId, id);
    await runWorkerIdle();
    expect((await readiness(projectId)).run?.id).toBe(good.id);
    const { release } = await releaseBoard(data.own, projectId, good.id);
    expect(release.runId).toBe(good.id);
  });
});
