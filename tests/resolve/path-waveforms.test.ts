import { describe, expect, it } from "vitest";
import { pathWaveforms } from "@/lib/resolve/path-waveforms";
import { checkPath } from "@/lib/si/rules/check-path";
import { allCorners, parseCorner } from "@/lib/si/rules/corners";
import type { Finding } from "@/lib/si/rules/types";
import { driverModel, pointToPoint, receiverModel, section } from "../support/resolved-path";

const ns = 1e-9;
const spread = { slow: 30, typical: 20, fast: 14 };
const edges = { slow: 1.2 * ns, typical: 0.8 * ns, fast: 0.5 * ns };
const driver = driverModel(20, 1 * ns, { resistance: spread, riseTime: edges });
const ohms = { low: 45, nominal: 50, high: 55 };
const bare = pointToPoint(driver, 50, 1.3 * ns, {
  sections: [section("U1.1", "U2.1", 50, 1.3 * ns, { impedance: ohms })],
});
const loaded = pointToPoint(
  driver,
  50,
  1.3 * ns,
  { sections: bare.sections },
  receiverModel({ capacitance: { min: 2e-12, typical: 4e-12, max: 6e-12 } }),
);

function findingOf(path: typeof bare, rule: string): Finding {
  const found = checkPath(path, { corners: [...allCorners] }).findings.find((entry) => entry.rule === rule);
  if (!found?.corner || found.value === null) throw new Error(`${rule} is judged`);
  return found;
}

function extremes(path: typeof bare, found: Finding) {
  const drawn = pathWaveforms(path, {
    driverPin: found.driver ?? undefined,
    corner: parseCorner(found.corner ?? ""),
    edge: found.edge ?? "rise",
  });
  const wave = drawn.probes.find((probe) => probe.pin === found.pin);
  if (!wave) throw new Error("the finding's pin is drawn");
  const inside = Array.from(wave.voltage).filter((_, i) => (drawn.time[i] ?? 0) <= drawn.until);
  return { drawn, max: Math.max(...inside), min: Math.min(...inside) };
}

describe("waveforms of a path", () => {
  it.each([
    ["bare", bare],
    ["loaded", loaded],
  ])("have as their maximum and minimum the findings' values, %s end, to 1e-6 V (checkPath)", (_, path) => {
    const above = findingOf(path, "above-rail");
    expect(extremes(path, above).max - 3.3).toBeCloseTo(above.value ?? NaN, 6);
    const below = findingOf(path, "below-rail");
    expect(-extremes(path, below).min).toBeCloseTo(below.value ?? NaN, 6);
  });

  it("pass a limit line exactly where checkPath fails the rule, to 1e-6 V", () => {
    for (const rule of ["above-rail", "below-rail"]) {
      const found = findingOf(bare, rule);
      const { drawn, max, min } = extremes(bare, found);
      const line = drawn.limits.find((limit) => limit.rule === rule);
      const beyond = line?.side === "max" ? max - line.volts : (line?.volts ?? NaN) - min;
      expect(found.verdict).toBe("fail");
      expect(beyond).toBeCloseTo(-(found.margin ?? NaN), 6);
    }
  });

  it("judge the dip back only after the input was read once", () => {
    const drawn = pathWaveforms(bare, { corner: { driver: "fast", impedance: "high" }, edge: "rise" });
    const line = drawn.limits.find((limit) => limit.rule === "ringback");
    expect(line).toMatchObject({ volts: 2, side: "min", probes: ["U2.1"] });
    expect(line?.from).toBeGreaterThan(1.3 * ns);
    expect(line?.from).toBeLessThan(2.5 * ns);
  });

  it("draw no line for a rule that is switched off", () => {
    const off = { enabled: false, limit: 0.3, severity: "error", origin: "project" } as const;
    const drawn = pathWaveforms(
      { ...bare, limits: { "above-rail": off } },
      { corner: { driver: "fast", impedance: "high" }, edge: "rise" },
    );
    expect(drawn.limits.map((limit) => limit.rule)).not.toContain("above-rail");
  });

  it("give, at each section's ends, waves whose sum is the pin's voltage, to 0.5 mV (peaks of curves are refined)", () => {
    const drawn = pathWaveforms(loaded, {
      corner: { driver: "fast", impedance: "low" },
      edge: "fall",
      waves: true,
    });
    const far = drawn.waves?.[0]?.b;
    const end = drawn.probes[1]?.voltage;
    drawn.time.forEach((_, i) =>
      expect((far?.incident[i] ?? 0) + (far?.outgoing[i] ?? 0)).toBeCloseTo(end?.[i] ?? NaN, 3),
    );
  });

  it("say what is missing where a path cannot be simulated", () => {
    const path = { ...bare, missing: [{ input: "driver model of U1", detail: "U1.1 has no driver model." }] };
    expect(() => pathWaveforms(path, { corner: { driver: "fast", impedance: "low" }, edge: "rise" })).toThrow(
      "U1.1 has no driver model.",
    );
  });
});
