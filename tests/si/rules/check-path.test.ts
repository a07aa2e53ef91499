import fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { ResolvedPath } from "@/lib/si/path/types";
import { allCorners, checkPath } from "@/lib/si/rules";
import type { Finding, PathResult } from "@/lib/si/rules";
import { driverModel, pointToPoint, receiverModel, section } from "../../support/resolved-path";

const nominal = [{ driver: "typical", impedance: "nominal" }] as const;
const check = (path: ResolvedPath) => checkPath(path, { corners: [...nominal] });
function finding(result: PathResult, rule: string): Finding {
  const found = result.findings.find((entry) => entry.rule === rule);
  if (!found) throw new Error(`no finding of ${rule}`);
  return found;
}
const series = (ohms: number, driver = driverModel(17, 1e-9)) =>
  pointToPoint(driver, 50, 1e-9, {
    sections: [section("R1.2", "U2.1", 50, 1e-9)],
    parts: [{ reference: "R1", kind: "R", a: "U1.1", b: "R1.2", value: ohms, role: "series" }],
  });

describe("check values: linear-ramp overshoot, % of swing, 50 Ω line, open end (check-values.md, computed)", () => {
  const table: [number, number[]][] = [
    [10, [66.7, 29.6, 11.1, 17.3, 8.0, 9.1]],
    [17, [49.3, 24.7, 12.5, 12.3, 7.8, 6.8]],
    [25, [33.3, 18.5, 11.1, 8.6, 6.2, 5.0]],
    [33, [20.5, 12.3, 8.1, 5.7, 4.2, 3.4]],
    [50, [0, 0, 0, 0, 0, 0]],
  ];
  const ramps = [2, 3, 4, 6, 8, 10];
  for (const [rs, row] of table)
    it(`${rs} Ω: ${row.join(", ")} at a 0–100 % edge of ${ramps.join(", ")} delays, to the table's last digit`, () => {
      row.forEach((percent, i) => {
        const value = finding(
          check(pointToPoint(driverModel(rs, (ramps[i] ?? 0) * 1e-9), 50, 1e-9, { bitTime: null })),
          "overshoot",
        ).value;
        expect(Math.abs((value ?? NaN) - percent)).toBeLessThan(0.0501);
      });
    });
});

describe("17 Ω on an open 50 Ω line (check-values.md, computed)", () => {
  const bare = check(pointToPoint(driverModel(17, 1e-9), 50, 1e-9));
  it("overshoots 49.25 % of 3.3 V and fails", () => {
    expect(finding(bare, "overshoot").value).toBeCloseTo(100 * (2 / (1 + 17 / 50) - 1), 6);
    expect(finding(bare, "above-rail").value).toBeCloseTo(1.6254, 4);
    expect(bare.verdict).toBe("fail");
  });
  it("says why, with its numbers", () => {
    expect(finding(bare, "above-rail").cause).toBe(
      "The driver is 17 Ω on a 50 Ω line and reflects −0.49; the open end at U2.1 returns all of it; the peak at 2 ns is 4.93 V, 1.63 V above the 3.30 V rail.",
    );
  });
  it("is one problem, not one a rule", () => {
    expect(bare.problems.map((problem) => problem.mechanism)).toEqual(["driver mismatch"]);
    expect(bare.problems[0]?.findings.length).toBeGreaterThan(3);
  });
  it("with 33 Ω in series is flat at 3.3 V and passes", () => {
    const cured = check(series(33));
    expect(finding(cured, "overshoot").value).toBeCloseTo(0, 9);
    expect(cured.verdict).toBe("pass");
    expect(cured.problems).toEqual([]);
  });
  it("dips back to 2.4994 V, on the falling edge to 0.8006 V: 0.6 mV through a VIL of 0.8 V", () => {
    const rho = (17 - 50) / (17 + 50);
    expect(finding(bare, "ringback")).toMatchObject({ edge: "fall", verdict: "fail" });
    expect(finding(bare, "ringback").value).toBeCloseTo(1e3 * (0.8 - 3.3 * rho * rho), 6);
  });
});

describe("the other rules through a simulation", () => {
  it("flight time is the line's delay where the source is matched", () => {
    const limits = {
      "flight-time": { enabled: true, limit: 1005, origin: "class" as const, severity: "error" as const },
    };
    expect(finding(check({ ...series(33), limits }), "flight-time")).toMatchObject({ verdict: "near" });
    expect(finding(check({ ...series(33), limits }), "flight-time").value).toBeCloseTo(1000, 3);
  });
  it("a 50 Ω end to ground on a 33 Ω driver leaves 3.3 · 50 / 83 V: level margin −0.4 % of VDD to VIH 2 V", () => {
    const path = pointToPoint(driverModel(33, 1e-9), 50, 1e-9, {
      parts: [{ reference: "R9", kind: "R", a: "U2.1", b: "rail GND", value: 50, role: "termination" }],
      rails: [{ name: "GND", node: "rail GND", volts: 0 }],
    });
    const margin = finding(check(path), "level-margin");
    expect(margin).toMatchObject({ verdict: "fail", mechanism: "level", edge: "rise" });
    expect(margin.value).toBeCloseTo((100 * ((3.3 * 50) / 83 - 2)) / 3.3, 9);
    expect(margin.cause).toBe(
      "R9 (50 Ω) against the 33 Ω driver of 3.30 V leaves a steady high level of 1.99 V at U2.1, 12 mV short of VIH of 2.00 V; 0.33 V is asked for.",
    );
  });
  it("a 5 V driver on a 3.3 V input is a static level, not ringing", () => {
    const above = finding(check(series(33, driverModel(17, 1e-9, { vdd: 5 }))), "above-rail");
    expect(above).toMatchObject({ verdict: "fail", mechanism: "static level" });
    expect(above.value).toBeCloseTo(1.7, 9);
  });
  it("ringing that outlasts half the bit fails settling", () => {
    expect(
      finding(check(pointToPoint(driverModel(8, 1e-9), 50, 1e-9, { bitTime: 10e-9 })), "settling").verdict,
    ).toBe("fail");
    expect(
      finding(check(pointToPoint(driverModel(8, 1e-9), 50, 1e-9, { bitTime: 100e-9 })), "settling").verdict,
    ).toBe("pass");
  });
  it("a stub that rings longer than estimated is watched until it settles, not failed", () => {
    const path = pointToPoint(driverModel(48, 0.3e-9), 50, 1e-9, { bitTime: 400e-9 });
    const [pin] = path.receivers;
    if (!pin) throw new Error("the fixture receives");
    path.sections = [
      section("U1.1", "v", 50, 0.1e-9),
      section("v", "U2.1", 50, 0.8e-9),
      section("v", "U3.1", 50, 0.75e-9),
      section("v", "U4.1", 50, 0.9e-9),
    ];
    path.receivers.push({ ...pin, pin: "U3.1", node: "U3.1" }, { ...pin, pin: "U4.1", node: "U4.1" });
    const settled = finding(check(path), "settling");
    expect(settled.value).not.toBeNull();
    expect(settled.verdict).toBe("pass");
  });
  it("a step on the way is named where it reflects more than the driver", () => {
    const path = series(33);
    path.sections = [
      section("R1.2", "v", 50, 1e-9),
      section("v", "U2.1", 110, 1e-9, { layer: "L3", width: 0.07e-3 }),
    ];
    const over = finding(check(path), "overshoot");
    expect(over.mechanism).toBe("impedance step");
    expect(over.cause).toContain("The line steps from 50 Ω to 110 Ω on L3");
  });
  it("a resistor at the far end is no part of the source", () => {
    const path = pointToPoint(driverModel(17, 1e-9), 50, 1e-9, {
      sections: [section("U1.1", "R1.1", 50, 1e-9), section("R1.2", "U2.1", 50, 0.05e-9)],
      parts: [{ reference: "R1", kind: "R", a: "R1.1", b: "R1.2", value: 33, role: "series" }],
    });
    const above = finding(check(path), "above-rail");
    expect(above.cause).toContain("The driver is 17 Ω on a 50 Ω line and reflects −0.49");
  });
  it("falling edges are the mirror of rising ones", () => {
    const result = check(pointToPoint(driverModel(17, 1e-9), 50, 1e-9));
    expect(finding(result, "below-rail").value).toBeCloseTo(finding(result, "above-rail").value ?? NaN, 9);
  });
  it("a branch is simulated, and each receiver judged", () => {
    const path = series(33);
    const [pin] = path.receivers;
    if (!pin) throw new Error("the fixture receives");
    path.sections = [
      section("R1.2", "v", 50, 1e-9),
      section("v", "U2.1", 50, 0.5e-9),
      section("v", "U3.1", 50, 0.7e-9),
    ];
    path.receivers.push({ ...pin, pin: "U3.1", node: "U3.1" });
    const result = check(path);
    expect(result.verdict).not.toBe("no data");
    expect(
      result.findings
        .filter((entry) => entry.verdict === "fail" || entry.verdict === "near")
        .some((entry) => entry.mechanism === "branch"),
    ).toBe(true);
  });
});

describe("corners", () => {
  const driver = driverModel(17, 1e-9, {
    resistance: { slow: 40, typical: 30, fast: 12 },
    riseTime: { slow: 1.2e-9, typical: 0.8e-9, fast: 0.5e-9 },
  });
  const path = pointToPoint(driver, 50, 1e-9, {
    sections: [section("U1.1", "U2.1", 50, 1e-9, { impedance: { low: 45, nominal: 50, high: 55 } })],
  });
  const result = checkPath(path, { corners: [...allCorners] });
  it("keeps the worst and counts how many fail", () => {
    expect(finding(result, "above-rail")).toMatchObject({ corner: "fast/high", ofCorners: 9 });
    expect(finding(result, "above-rail").value).toBeCloseTo(3.3 * ((2 * 55) / 67 - 1), 6);
    const failing = result.corners.filter((entry) => entry.rule === "above-rail" && entry.verdict === "fail");
    expect(finding(result, "above-rail").failsAt).toBe(failing.length);
    expect(failing.length).toBeGreaterThan(2);
  });
  it("records every simulated rule at every corner", () => {
    expect(result.corners.filter((entry) => entry.rule === "ringback")).toHaveLength(9);
    expect(result.simulations).toBe(9);
  });
  it("a pin that can do either drives in turn", () => {
    const both = structuredClone(path);
    both.drivers.push({
      pin: "U2.1",
      node: "U2.1",
      net: "NET",
      driver: driverModel(5, 0.5e-9),
      receiver: receiverModel(),
    });
    both.receivers.push({ pin: "U1.1", node: "U1.1", net: "NET", driver, receiver: receiverModel() });
    const judged = checkPath(both, { corners: [...allCorners] });
    expect(judged.simulations).toBe(18);
    expect(finding(judged, "above-rail")).toMatchObject({ driver: "U2.1", pin: "U1.1" });
  });
});

describe("no data never passes", () => {
  const missing = [{ input: "driver model of U1", detail: "No model." }];
  it("a path that lacks an input has no data by every simulated rule, grouped under the input", () => {
    const result = check({ ...series(33), missing });
    expect(result.verdict).toBe("no data");
    expect(result.simulations).toBe(0);
    expect(result.problems).toMatchObject([
      { mechanism: "missing input", verdict: "no data", title: "Missing: driver model of U1" },
    ]);
    expect(
      result.findings.filter((entry) => entry.verdict === "no data").every((entry) => entry.missing !== null),
    ).toBe(true);
  });
  it("thresholds unknown leave ringback and level margin without data, and the path too", () => {
    const path = series(33);
    path.receivers = path.receivers.map((pin) => ({
      ...pin,
      receiver: receiverModel({ vih: null, vil: null }),
    }));
    const result = check(path);
    expect(finding(result, "level-margin")).toMatchObject({
      verdict: "no data",
      missing: "thresholds of IN",
    });
    expect(finding(result, "overshoot").verdict).toBe("pass");
    expect(result.verdict).toBe("no data");
  });
  it("a failure stands beside missing data", () => {
    const path = pointToPoint(driverModel(17, 1e-9), 50, 1e-9, {}, receiverModel({ vih: null, vil: null }));
    expect(check(path).verdict).toBe("fail");
  });
  it("selectors are shown but never decide the verdict", () => {
    const result = check(pointToPoint(driverModel(50, 1e-9), 50, 1e-9));
    expect(finding(result, "critical-length")).toMatchObject({ verdict: "fail", counts: false });
    expect(finding(result, "spacing")).toMatchObject({ verdict: "no data", counts: false });
    expect(result.verdict).toBe("pass");
  });
  it("a rule that is switched off gives no finding", () => {
    const limits = {
      overshoot: { enabled: false, limit: 20, origin: "class" as const, severity: "error" as const },
    };
    expect(check({ ...series(33), limits }).findings.some((entry) => entry.rule === "overshoot")).toBe(false);
  });
});

describe("odd paths still end in a verdict", () => {
  it("pins side by side: no line at all", () => {
    const path = pointToPoint(
      driverModel(17, 1e-9),
      50,
      0,
      {},
      receiverModel({ capacitance: { min: 2e-12, typical: 2e-12, max: 2e-12 } }),
    );
    expect(check(path).verdict).toBe("pass");
  });
  it("an ideal source, and an edge far shorter than the line", () => {
    expect(check(pointToPoint(driverModel(0, 1e-12), 50, 1e-9)).verdict).toBe("fail");
  });
  it("a receiver shorted to ground has no swing, which is said", () => {
    const path = pointToPoint(driverModel(17, 1e-9), 50, 1e-9, {
      parts: [{ reference: "R1", kind: "R", a: "U2.1", b: "rail GND", value: 0, role: "termination" }],
      rails: [{ name: "GND", node: "rail GND", volts: 0 }],
    });
    const result = check(path);
    expect(result.verdict).toBe("no data");
    expect(result.problems[0]?.cause).toContain("U2.1 has no swing");
  });
  it("a large coupling capacitor passes the edge about its bias", () => {
    const path = pointToPoint(driverModel(50, 1e-9), 50, 1e-9, {
      sections: [section("U1.1", "C1.1", 50, 0.5e-9), section("C1.2", "U2.1", 50, 0.5e-9)],
      parts: [
        { reference: "C1", kind: "C", a: "C1.1", b: "C1.2", value: 1e-6, role: "series" },
        { reference: "R1", kind: "R", a: "U2.1", b: "rail VREF", value: 100e3, role: "termination" },
      ],
      rails: [{ name: "VREF", node: "rail VREF", volts: 1.65 }],
    });
    const result = check(path);
    expect(finding(result, "level-margin").verdict).toBe("pass");
    expect(Math.abs(finding(result, "above-rail").value ?? NaN)).toBeLessThan(0.01);
  });
});

describe("laws over random paths", () => {
  const ohms = fc.double({ min: 5, max: 150, noNaN: true });
  const delay = fc.double({ min: 20e-12, max: 1e-9, noNaN: true });
  const path = fc
    .record({
      rs: ohms,
      z: fc.array(fc.record({ z: fc.double({ min: 25, max: 120, noNaN: true }), delay }), {
        minLength: 1,
        maxLength: 3,
      }),
      ramp: fc.double({ min: 50e-12, max: 5e-9, noNaN: true }),
      c: fc.double({ min: 0, max: 8e-12, noNaN: true }),
      branch: fc.boolean(),
      pull: fc.option(ohms),
    })
    .map(({ rs, z, ramp, c, branch, pull }): ResolvedPath => {
      const built = pointToPoint(
        driverModel(rs, ramp),
        50,
        1e-9,
        {},
        receiverModel({ capacitance: { min: c, typical: c, max: c } }),
      );
      built.sections = z.map((entry, i) =>
        section(i === 0 ? "U1.1" : `v${i}`, i === z.length - 1 ? "U2.1" : `v${i + 1}`, entry.z, entry.delay),
      );
      const [pin] = built.receivers;
      if (branch && pin && z.length > 1) {
        built.sections.push(section("v1", "U3.1", 60, 0.3e-9));
        built.receivers.push({ ...pin, pin: "U3.1", node: "U3.1" });
      }
      if (pull !== null) {
        built.parts.push({
          reference: "R1",
          kind: "R",
          a: "U2.1",
          b: "rail VTT",
          value: pull,
          role: "termination",
        });
        built.rails.push({ name: "VTT", node: "rail VTT", volts: 1.65 });
      }
      return built;
    });

  it("never throws, never holds NaN, and a simulated verdict rests on values", () => {
    fc.assert(
      fc.property(path, (built) => {
        const result = check(built);
        const numbers = JSON.stringify(result, (_key, value: unknown) =>
          typeof value === "number" && !Number.isFinite(value) ? "broken" : value,
        );
        expect(numbers).not.toContain("broken");
        expect(numbers).not.toContain("NaN");
        for (const entry of result.findings) {
          if (entry.verdict === "no data") expect(entry.missing).not.toBeNull();
          // Whatever the engine refuses stands here too: nothing random is refused.
          expect(entry.missing ?? "").not.toContain("simulation of");
          if (entry.verdict === "fail" || entry.verdict === "near") expect(entry.cause).toBeTruthy();
        }
      }),
      { numRuns: 150, seed: 7 },
    );
  });

  it("is deterministic", () => {
    fc.assert(
      fc.property(path, (built) => {
        expect(check(structuredClone(built))).toEqual(check(built));
      }),
      { numRuns: 20, seed: 3 },
    );
  });

  it("resistors alone never overshoot by more than |ρ| of the source allows", () => {
    fc.assert(
      fc.property(ohms, fc.double({ min: 0.1e-9, max: 5e-9, noNaN: true }), (rs, ramp) => {
        const value = finding(check(pointToPoint(driverModel(rs, ramp), 50, 1e-9)), "overshoot").value ?? NaN;
        expect(value).toBeLessThanOrEqual(100 * Math.max(0, (50 - rs) / (50 + rs)) + 1e-6);
      }),
      { numRuns: 40, seed: 5 },
    );
  });
});
