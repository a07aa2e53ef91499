import { describe, expect, it } from "vitest";
import { laws, shareWithinEstimate } from "./laws";

/** CI runs a slice; `npm run test:long` runs laws.long.test.ts, 10,000 sections a law. */
describe("field solutions of random cross-sections", () => {
  for (const law of laws) it(law.name, () => law.check(150));

  it.each(["live", "standard"] as const)(
    "%s: the error estimate holds in at least 95 percent",
    (accuracy) => {
      const { within, worst } = shareWithinEstimate(60, accuracy);
      expect(within).toBeGreaterThanOrEqual(0.95);
      expect(worst).toBeLessThan(accuracy === "live" ? 0.02 : 0.003);
    },
  );
});
