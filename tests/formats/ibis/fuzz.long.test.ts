import { expect, it } from "vitest";
import { readBroken } from "./mutations";

it("100,000 broken files are read or refused, none crashes, none takes 2 s", () => {
  let slowest = 0;
  for (let seed = 1; seed <= 100; seed++) slowest = Math.max(slowest, readBroken(1000, seed));
  process.stdout.write(`slowest of 100,000: ${slowest.toFixed(0)} ms\n`);
  expect(slowest).toBeLessThan(2000);
}, 3_600_000);
