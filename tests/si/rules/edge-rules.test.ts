import { describe, expect, it } from "vitest";
import { aboveRail } from "@/lib/si/rules/above-rail";
import { belowRail } from "@/lib/si/rules/below-rail";
import { flightTime } from "@/lib/si/rules/flight-time";
import { levelMargin } from "@/lib/si/rules/level-margin";
import { overshoot } from "@/lib/si/rules/overshoot";
import { ringback } from "@/lib/si/rules/ringback";
import type { EdgeRule, Observation } from "@/lib/si/rules/rule";
import { settling } from "@/lib/si/rules/settling";
import { judge } from "@/lib/si/rules/tally";
import { observation } from "../../support/observation";
import { pointToPoint, driverModel, receiverModel } from "../../support/resolved-path";

function verdict(
  rule: EdgeRule,
  seen: Observation,
  limit = rule.limit(seen.path, seen.receiver, seen.edge).limit,
) {
  return judge(rule.definition, rule.read(seen).value, limit).verdict;
}

describe("each rule just inside near, at and just beyond its limit (limits: lib/si/rules, common practice)", () => {
  const cases: {
    rule: EdgeRule;
    pass: Partial<Observation>;
    near: Partial<Observation>;
    at: Partial<Observation>;
    fail: Partial<Observation>;
    limit?: number;
  }[] = [
    { rule: aboveRail, pass: { max: 3.549 }, near: { max: 3.551 }, at: { max: 3.6 }, fail: { max: 3.601 } },
    {
      rule: belowRail,
      pass: { edge: "fall", min: -0.249 },
      near: { edge: "fall", min: -0.251 },
      at: { edge: "fall", min: -0.3 },
      fail: { edge: "fall", min: -0.301 },
    },
    { rule: overshoot, pass: { max: 3.62 }, near: { max: 3.64 }, at: { max: 3.96 }, fail: { max: 3.97 } },
    {
      rule: overshoot,
      pass: { edge: "fall", min: -0.32 },
      near: { edge: "fall", min: -0.34 },
      at: { edge: "fall", min: -0.66 },
      fail: { edge: "fall", min: -0.67 },
    },
    {
      rule: ringback,
      pass: { ringbackMargin: 0.101 },
      near: { ringbackMargin: 0.099 },
      at: { ringbackMargin: 0 },
      fail: { ringbackMargin: -0.001 },
    },
    {
      rule: settling,
      pass: { settled: 19.1e-9 },
      near: { settled: 19.3e-9 },
      at: { settled: 21.2e-9 },
      fail: { settled: 21.21e-9 },
    },
    {
      rule: levelMargin,
      pass: { high: 2.38 },
      near: { high: 2.37 },
      at: { high: 2.33 },
      fail: { high: 2.32 },
    },
    {
      rule: levelMargin,
      pass: { edge: "fall", low: 0.42 },
      near: { edge: "fall", low: 0.43 },
      at: { edge: "fall", low: 0.47 },
      fail: { edge: "fall", low: 0.48 },
    },
    {
      rule: flightTime,
      limit: 1010,
      pass: { measCrossing: 1.49e-9 },
      near: { measCrossing: 1.505e-9 },
      at: { measCrossing: 1.51e-9 },
      fail: { measCrossing: 1.511e-9 },
    },
  ];
  for (const { rule, limit, ...steps } of cases)
    it(`${rule.definition.id}, ${steps.pass.edge ?? "rise"}`, () => {
      const said = (change: Partial<Observation>) => verdict(rule, observation(change), limit);
      expect(said(steps.pass)).toBe("pass");
      expect(said(steps.near)).toBe("near");
      // A value that equals its limit passes; it is near, not failing.
      expect(said(steps.at)).toBe("near");
      expect(said(steps.fail)).toBe("fail");
    });
});

describe("where a rule has no value", () => {
  it("settling fails a receiver still ringing at the end of the window", () => {
    expect(settling.read(observation({ settled: null }))).toEqual({ value: null, time: null, fails: true });
  });
  it("flight time fails a receiver that never crosses", () => {
    expect(flightTime.read(observation({ measCrossing: null })).fails).toBe(true);
  });
  it("ringback fails a receiver that never gets across, by what it is short of VIH", () => {
    const reading = ringback.read(observation({ ringbackMargin: null, max: 1.9 }));
    expect(reading.fails).toBe(true);
    expect(reading.value).toBeCloseTo(-100, 9);
  });
});

describe("where a rule speaks, and what it lacks", () => {
  const path = pointToPoint(driverModel(17, 1e-9), 50, 1e-9);
  it("overshoot is silent where the part states its own maximum on that side", () => {
    const receiver = receiverModel({ maxAbove: 0.5 });
    expect(overshoot.applies(path, receiver, "rise")).toBe(false);
    expect(overshoot.applies(path, receiver, "fall")).toBe(true);
  });
  it("thresholds that the model does not state are asked for by the model's name", () => {
    const receiver = receiverModel({ vih: null });
    expect(ringback.lacks(path, receiver)?.input).toBe("thresholds of IN");
    expect(levelMargin.lacks(path, receiver)?.input).toBe("thresholds of IN");
  });
  it("settling asks for the class's rate, and is silent on slow signals", () => {
    expect(settling.lacks({ ...path, bitTime: null }, receiverModel())?.input).toBe("rate of class Data");
    expect(settling.applies({ ...path, bitTime: null, signal: "slow" }, null, "rise")).toBe(false);
  });
  it("flight time is silent without a limit", () => {
    expect(flightTime.applies(path, null, "rise")).toBe(false);
  });
  it("a part's maximum outranks the project; a class may only be stricter", () => {
    const receiver = receiverModel({ maxAbove: 0.5 });
    const limits = (limit: number, origin: "class" | "project") => ({
      "above-rail": { enabled: true, limit, origin, severity: "error" as const },
    });
    expect(aboveRail.limit({ ...path, limits: limits(0.3, "project") }, receiver, "rise")).toEqual({
      limit: 0.5,
      origin: "model",
    });
    expect(aboveRail.limit({ ...path, limits: limits(0.2, "class") }, receiver, "rise")).toEqual({
      limit: 0.2,
      origin: "class",
    });
    expect(aboveRail.limit({ ...path, limits: limits(0.9, "class") }, receiver, "rise")).toEqual({
      limit: 0.5,
      origin: "model",
    });
  });
});
