import { expect, it } from "vitest";
import { killDuringImport } from "./import-kill";

// A slice of the campaign in import-kill.long.test.ts, at times over the whole length of the work.
it("leaves nothing or all of an import after kill -9 at 4 times, and finishes it at the next start", async () => {
  const early = await killDuringImport([20, 250, 700, 1200]);
  expect(early).toBeGreaterThan(0);
}, 180_000);
