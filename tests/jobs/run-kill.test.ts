import { expect, it } from "vitest";
import { killDuringRun } from "./run-kill";

// A slice of the campaign in run-kill.long.test.ts.
it("resumes a run after kill -9 at 3 times, loses nothing, doubles nothing, finds the same", async () => {
  const early = await killDuringRun([600, 1100, 1500]);
  expect(early).toBeGreaterThan(0);
}, 240_000);
