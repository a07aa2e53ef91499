import { describe, expect, it } from "vitest";
import type { ResolvedPath } from "@/lib/si/path/types";
import { criticalLength } from "@/lib/si/rules/critical-length";
import { staticFinding } from "@/lib/si/rules/findings";
import type { StaticReading, StaticRule } from "@/lib/si/rules/rule";
import { spacing } from "@/lib/si/rules/spacing";
import { terminationValue } from "@/lib/si/rules/termination-value";
import { driverModel, pointToPoint, section } from "../../support/resolved-path";

function read(rule: StaticRule, path: ResolvedPath): StaticReading {
  const reading = rule.read(path);
  if (!reading || "input" in reading) throw new Error("the rule has a value here");
  return reading;
}
const finding = (rule: StaticRule, path: ResolvedPath) =>
  staticFinding(path, rule.definition, read(rule, path)).finding;

/** Driver of `rdrv`, resistor R1 of `rs` beside it, 50 Ω line of 1 ns. */
function seriesPath(rdrv: number, rs: number): ResolvedPath {
  return pointToPoint(driverModel(rdrv, 1e-9), 50, 1e-9, {
    sections: [section("R1.2", "U2.1", 50, 1e-9)],
    parts: [{ reference: "R1", kind: "R", a: "U1.1", b: "R1.2", value: rs, role: "series" }],
  });
}

/** Driver, 50 Ω line, R1 of `ohms` from the receiver to ground. */
function parallelPath(ohms: number): ResolvedPath {
  return pointToPoint(driverModel(17, 1e-9), 50, 1e-9, {
    parts: [{ reference: "R1", kind: "R", a: "U2.1", b: "rail GND", value: ohms, role: "termination" }],
    rails: [{ name: "GND", node: "rail GND", volts: 0 }],
  });
}

describe("termination value (common practice, no source)", () => {
  it("series: |Rs − (Z0 − Rdrv)| / Z0, near from 10 %, at 15 % still passing", () => {
    expect(read(terminationValue, seriesPath(17, 33)).corners[0]?.value).toBeCloseTo(0, 12);
    expect(finding(terminationValue, seriesPath(17, 28.1)).verdict).toBe("pass");
    expect(finding(terminationValue, seriesPath(17, 27)).verdict).toBe("near");
    expect(finding(terminationValue, seriesPath(17, 25.5))).toMatchObject({ verdict: "near", value: 15 });
    expect(finding(terminationValue, seriesPath(17, 25.4)).verdict).toBe("fail");
  });
  it("says which resistor, and what would match", () => {
    expect(finding(terminationValue, seriesPath(17, 10)).cause).toBe(
      "R1 of 10 Ω with the 17 Ω driver stands before a 50 Ω line; 33 Ω would match it.",
    );
  });
  it("parallel: |R − Z0| / Z0", () => {
    expect(finding(terminationValue, parallelPath(50)).verdict).toBe("pass");
    expect(finding(terminationValue, parallelPath(57.5))).toMatchObject({ verdict: "near", value: 15 });
    expect(finding(terminationValue, parallelPath(57.6)).verdict).toBe("fail");
  });
  it("Thevenin: the two resistors in parallel", () => {
    const path = parallelPath(100);
    path.rails.push({ name: "+3V3", node: "rail +3V3", volts: 3.3 });
    path.parts.push({
      reference: "R2",
      kind: "R",
      a: "U2.1",
      b: "rail +3V3",
      value: 100,
      role: "termination",
    });
    expect(read(terminationValue, path).corners[0]?.value).toBeCloseTo(0, 12);
  });
  it("a pull-up of 10 kΩ is no termination", () => {
    expect(terminationValue.read(parallelPath(10e3))).toBeNull();
  });
  it("a class that asks for a series resistor judges a path without one as 0 Ω, but not one that is short for its edge", () => {
    const path = pointToPoint(driverModel(17, 1e-9), 50, 1e-9);
    path.termination.scheme = "series";
    expect(read(terminationValue, path).corners[0]?.value).toBeCloseTo(66, 9);
    const short = pointToPoint(driverModel(17, 1e-9), 50, 0.1e-9);
    short.termination.scheme = "series";
    expect(terminationValue.read(short)).toBeNull();
  });
  it("a class that asks for an end resistor names it as missing where no part ends the path", () => {
    const path = pointToPoint(driverModel(17, 1e-9), 50, 1e-9);
    path.termination.scheme = "parallel";
    expect(terminationValue.read(path)).toMatchObject({ input: "end resistor of NET" });
  });
});

describe("critical length (common practice, no source)", () => {
  const at = (delay: number) => pointToPoint(driverModel(17, 1e-9 / 0.8), 50, delay);
  it("is the one-way delay over the 10–90 % time; at the limit it passes", () => {
    expect(finding(criticalLength, at(0.1666e-9)).verdict).toBe("pass");
    expect(finding(criticalLength, at(0.1667e-9)).verdict).toBe("pass");
    expect(finding(criticalLength, at(0.1668e-9)).verdict).toBe("fail");
  });
  it("takes the fast edge as worst", () => {
    const path = at(0.15e-9);
    const [pin] = path.drivers;
    if (!pin?.driver) throw new Error("the fixture drives");
    pin.driver = { ...pin.driver, riseTime: { slow: 2e-9, typical: 1e-9, fast: 0.5e-9 } };
    expect(finding(criticalLength, path)).toMatchObject({
      corner: "fast/nominal",
      failsAt: 1,
      ofCorners: 3,
      failsAtNominal: false,
    });
  });
  it("is not asked of a terminated path", () => {
    expect(criticalLength.read(seriesPath(17, 33))).toBeNull();
    expect(criticalLength.read(parallelPath(50))).toBeNull();
  });
});

describe("spacing (common practice, no source)", () => {
  const beside = (gap: number, over: Partial<ResolvedPath> = {}) =>
    pointToPoint(driverModel(17, 1e-9), 50, 1e-9, {
      geometryKnown: true,
      neighbours: [{ neighbour: "OTHER", layer: "L1", gap, parallelLength: 20e-3, heightOverPlane: 0.1e-3 }],
      ...over,
    });
  it("is gap over height; three heights pass", () => {
    expect(finding(spacing, beside(0.301e-3)).verdict).toBe("pass");
    expect(finding(spacing, beside(0.3e-3)).verdict).toBe("pass");
    expect(finding(spacing, beside(0.299e-3)).verdict).toBe("fail");
  });
  it("takes the class's own spacing as its limit", () => {
    expect(finding(spacing, beside(0.39e-3, { spacing: 0.4e-3 }))).toMatchObject({
      verdict: "fail",
      limitOrigin: "class",
    });
  });
  it("has no data without a neighbour list, nor without a plane", () => {
    expect(spacing.read(beside(1e-3, { geometryKnown: false }))).toMatchObject({ input: "neighbour list" });
    const blind = beside(1e-3);
    for (const row of blind.neighbours) row.heightOverPlane = null;
    expect(spacing.read(blind)).toMatchObject({ input: "reference plane of layer L1" });
  });
});
