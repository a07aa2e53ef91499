import { expect, it } from "vitest";
import { readBroken } from "./mutations";

// A slice; the whole campaign is fuzz.long.test.ts.
it("400 broken files are read or refused, none crashes or hangs", () => {
  expect(readBroken(400, 1)).toBeGreaterThan(0);
});
