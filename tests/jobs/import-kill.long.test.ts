import { expect, it } from "vitest";
import { killDuringImport } from "./import-kill";

it("leaves nothing or all of an import after kill -9, 20 times in five imports", async () => {
  let early = 0;
  for (let round = 0; round < 5; round++)
    early += await killDuringImport([round * 60, 300 + round * 90, 700 + round * 110, 1100 + round * 140]);
  expect(early).toBeGreaterThan(5);
}, 900_000);
