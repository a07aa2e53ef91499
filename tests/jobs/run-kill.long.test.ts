import { expect, it } from "vitest";
import { killDuringRun } from "./run-kill";

it("resumes a run after kill -9, 20 times in five runs, loses nothing, doubles nothing, finds the same", async () => {
  let early = 0;
  for (let round = 0; round < 5; round++)
    early += await killDuringRun([
      400 + round * 70,
      700 + round * 90,
      1000 + round * 110,
      1300 + round * 130,
    ]);
  expect(early).toBeGreaterThan(5);
}, 1_800_000);
