import { describe, expect, it } from "vitest";
import { judgeWaiver, type WaiverRecord } from "@/lib/resolve/waiver-state";

// The bounds (2 % of the limit, 5 mV) are this product's own decision: product.md, "Waiver".
const waiver: WaiverRecord = {
  waived: [{ rule: "above-rail", value: 0.5, limit: 0.3, unit: "V", margin: -0.2, corner: "fast/high" }],
  expiresAt: 2000,
  revokedAt: null,
};
const failing = (margin: number, rule = "above-rail") => [{ rule, verdict: "fail" as const, margin }];

describe("judgeWaiver", () => {
  it("keeps a waiver whose inputs are unchanged", () => {
    expect(judgeWaiver(waiver, failing(-0.2), true, 1000)).toMatchObject({ state: "active", covers: true });
  });
  it("carries it over changed inputs when the value is the same or better", () => {
    expect(judgeWaiver(waiver, failing(-0.2), false, 1000)).toMatchObject({ state: "carried", covers: true });
    expect(judgeWaiver(waiver, failing(-0.1), false, 1000)).toMatchObject({ state: "carried", covers: true });
    expect(judgeWaiver(waiver, [], false, 1000)).toMatchObject({ state: "carried", covers: true });
  });
  it("asks for another look when it is worse by at most 2 % of the limit or 5 mV, and does not cover", () => {
    expect(judgeWaiver(waiver, failing(-0.2059), false, 1000)).toMatchObject({
      state: "look again",
      covers: false,
    });
  });
  it("is void beyond that", () => {
    expect(judgeWaiver(waiver, failing(-0.2061), false, 1000)).toMatchObject({
      state: "void",
      covers: false,
    });
  });
  it("never covers a rule that it did not waive", () => {
    expect(judgeWaiver(waiver, failing(-0.01, "ringback"), true, 1000)).toMatchObject({
      state: "void",
      covers: false,
    });
  });
  it("ends at its expiry and when revoked", () => {
    expect(judgeWaiver(waiver, failing(-0.2), true, 2000).state).toBe("expired");
    expect(judgeWaiver({ ...waiver, revokedAt: 5 }, failing(-0.2), true, 1000).state).toBe("revoked");
  });
});
