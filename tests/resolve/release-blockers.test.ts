import { describe, expect, it } from "vitest";
import { releaseBlockers, type ReleaseReadiness } from "@/lib/resolve/release-blockers";

const ready: ReleaseReadiness = {
  run: { number: 4, state: "done", inputHash: "h" },
  draftInputHash: "h",
  judgedPaths: 31,
  failuresNotWaived: 0,
  missingNotAccepted: [],
  lineConflicts: [],
  openFlags: 0,
  signedOff: true,
  signerEdited: false,
};

describe("releaseBlockers", () => {
  it("is empty when nothing stands in the way", () => {
    expect(releaseBlockers(ready)).toEqual([]);
  });
  it.each([
    ["no run", { run: null }],
    ["unfinished run", { run: { number: 4, state: "running", inputHash: "h" } }],
    ["stale run", { draftInputHash: "other" }],
    ["nothing judged", { judgedPaths: 0 }],
    ["failures", { failuresNotWaived: 1 }],
    ["no data", { missingNotAccepted: [{ missing: "driver model of U5", paths: 3 }] }],
    ["lines", { lineConflicts: ["0.18 mm on L1 is to be 50 Ω for A and 60 Ω for B"] }],
    ["flags", { openFlags: 2 }],
    ["editor signs", { signedOff: false }],
  ] as const)("blocks and says so: %s", (kind, change) => {
    const blockers = releaseBlockers({ ...ready, ...change } as ReleaseReadiness);
    expect(blockers.map((blocker) => blocker.kind)).toEqual([kind]);
    expect(blockers[0]?.text).toMatch(/\.$/);
  });
});
