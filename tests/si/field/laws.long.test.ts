import { describe, expect, it } from "vitest";
import { laws, shareWithinEstimate } from "./laws";

describe("field solutions of 10,000 random cross-sections a law", () => {
  for (const law of laws) it(law.name, () => law.check(10_000));

  it.each(["live", "standard"] as const)(
    "%s: the error estimate holds in at least 95 percent",
    (accuracy) => {
      const { within, worst } = shareWithinEstimate(2_000, accuracy);
      expect(within).toBeGreaterThanOrEqual(0.95);
      expect(worst).toBeLessThan(accuracy === "live" ? 0.02 : 0.005);
    },
  );
});
