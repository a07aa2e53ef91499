import { describe, expect, it } from "vitest";
import { dcLevels } from "@/lib/si/path/levels";
import { PathNetwork } from "@/lib/si/path/network";
import { simulate } from "@/lib/si/lattice/simulate";
import type { Network } from "@/lib/si/network";
import { cannotSimulate } from "@/lib/si/path/simulable";
import { NodeMap } from "@/lib/si/path/node-map";
import { watchWindow } from "@/lib/si/path/window";
import type { ResolvedPath } from "@/lib/si/path/types";
import { driverModel, pointToPoint, receiverModel, section } from "../../support/resolved-path";

const nominal = { driver: "typical", impedance: "nominal" } as const;

function prepare(path: ResolvedPath): PathNetwork {
  const [pin] = path.drivers;
  if (!pin?.driver) throw new Error("the fixture drives");
  return new PathNetwork(path, pin, pin.driver);
}

describe("DC levels (Ohm's law)", () => {
  it("a divider of 17 Ω and 50 Ω", () => {
    const [volts] = dcLevels(
      [
        { a: "s", b: "n", ohms: 17 },
        { a: "n", b: "0", ohms: 50 },
      ],
      new Map([["s", 3.3]]),
      new NodeMap(),
      ["n"],
    );
    expect(volts).toBeCloseTo((3.3 * 50) / 67, 12);
  });
  it("a bridge of five resistors, by superposition", () => {
    const bridge = [
      ["s", "a", 1],
      ["s", "b", 2],
      ["a", "b", 3],
      ["a", "0", 4],
      ["b", "0", 5],
    ] as const;
    const [a = 0, b = 0] = dcLevels(
      bridge.map(([x, y, ohms]) => ({ a: x, b: y, ohms })),
      new Map([["s", 1]]),
      new NodeMap(),
      ["a", "b"],
    );
    // currents balance at both inner nodes
    expect((1 - a) / 1).toBeCloseTo((a - b) / 3 + a / 4, 12);
    expect((1 - b) / 2 + (a - b) / 3).toBeCloseTo(b / 5, 12);
  });
  it("a floating node is an error that names it", () => {
    expect(() => dcLevels([{ a: "x", b: "y", ohms: 1 }], new Map([["s", 1]]), new NodeMap(), ["x"])).toThrow(
      "x has no DC path",
    );
  });
});

describe("a path as a network", () => {
  it("sections of one impedance in a chain become one line; a change of impedance, a pin and a part keep theirs", () => {
    const path = pointToPoint(driverModel(17, 1e-9), 50, 1e-9, {
      sections: [
        section("U1.1", "v1", 50, 0.2e-9),
        section("v2", "v1", 50, 0.3e-9),
        section("v2", "v3", 60, 0.1e-9),
        section("v3", "U2.1", 50, 0.2e-9),
      ],
    });
    const { lines } = prepare(path);
    expect(lines.map((line) => Math.round(line.delay * 1e12)).sort()).toEqual([100, 200, 500]);
    expect(lines.reduce((sum, line) => sum + line.delay, 0)).toBeCloseTo(0.8e-9, 18);
  });

  it("pieces 200 times shorter than the edge join their line, or become capacitance, and change the wave by less than 0.2 % of swing", () => {
    const ends = (pieces: ResolvedPath["sections"]) => {
      const path = pointToPoint(driverModel(17, 1e-9), 50, 1e-9, { sections: pieces });
      const prepared = prepare(path);
      const { network, until } = prepared.at(nominal);
      return { prepared, network, until };
    };
    const pieces = [
      section("U1.1", "a", 50, 0.4e-9),
      section("a", "b", 70, 3e-12),
      section("b", "U2.1", 50, 0.5e-9),
    ];
    const short = ends(pieces);
    expect(short.prepared.lines).toHaveLength(1);
    const exact: Network = {
      ...short.network,
      sections: pieces.map(({ a, b, impedance, length, delayPerMeter }, i) => ({
        name: `s${i}`,
        kind: "line",
        a,
        b,
        impedance: impedance?.nominal ?? 0,
        delay: length * (delayPerMeter ?? 0),
      })),
    };
    const one = simulate(short.network, { until: short.until, accuracy: "reference" });
    const all = simulate(exact, { until: short.until, accuracy: "reference" });
    const at = (wave: typeof one, t: number) => {
      const v = wave.voltage["U2.1"] ?? new Float64Array();
      let i = 1;
      while (i < wave.time.length - 1 && (wave.time[i] ?? 0) < t) i++;
      const [t0 = 0, t1 = 0] = [wave.time[i - 1], wave.time[i]];
      const [v0 = 0, v1 = 0] = [v[i - 1], v[i]];
      return t1 > t0 ? v0 + ((v1 - v0) * (t - t0)) / (t1 - t0) : v1;
    };
    for (let t = 0; t < short.until; t += 13e-12)
      expect(Math.abs(at(one, t) - at(all, t))).toBeLessThan(0.002 * 3.3);
  });

  it("a piece between a pin and a resistor becomes its capacitance", () => {
    const path = pointToPoint(driverModel(17, 1e-9), 50, 1e-9, {
      sections: [section("U1.1", "R1.1", 50, 2e-12), section("R1.2", "U2.1", 50, 1e-9)],
      parts: [{ reference: "R1", kind: "R", a: "U1.1", b: "R1.2", value: 33, role: "series" }],
    });
    path.parts = [{ reference: "R1", kind: "R", a: "R1.1", b: "R1.2", value: 33, role: "series" }];
    const { network } = prepare(path).at(nominal);
    expect(network.sections).toHaveLength(1);
    expect(network.parts.find((part) => part.kind === "C")).toMatchObject({ value: 2e-12 / 50 });
  });

  it("corners fill in one network: weak, long and heavily loaded when slow", () => {
    const driver = driverModel(17, 1e-9, {
      resistance: { slow: 25, typical: 17, fast: 11 },
      riseTime: { slow: 1.6e-9, typical: 0.8e-9, fast: 0.4e-9 },
    });
    const path = pointToPoint(
      driver,
      50,
      1e-9,
      { sections: [section("U1.1", "U2.1", 50, 1e-9, { impedance: { low: 45, nominal: 50, high: 55 } })] },
      receiverModel({ capacitance: { min: 2e-12, typical: 3e-12, max: 5e-12 } }),
    );
    const prepared = prepare(path);
    const slow = prepared.at({ driver: "slow", impedance: "low" });
    expect(slow.network.sections[0]).toMatchObject({ impedance: 45 });
    expect(slow.network.drivers[0]).toMatchObject({
      resistance: 25,
      wave: { time: [0, 2e-9], value: [0, 3.3] },
    });
    expect(slow.network.parts[0]).toMatchObject({ kind: "C", value: 5e-12 });
    const fast = prepared.at({ driver: "fast", impedance: "high" });
    expect(fast.network).toBe(slow.network);
    expect(fast.network.parts[0]).toMatchObject({ value: 2e-12 });
    expect(fast.ramp).toBeCloseTo(0.5e-9, 18);
  });

  it("0 Ω links and copper of no length are one node", () => {
    const path = pointToPoint(driverModel(17, 1e-9), 50, 1e-9, {
      sections: [section("U1.1", "R1.1", 50, 0), section("R1.2", "U2.1", 50, 1e-9)],
      parts: [{ reference: "R1", kind: "R", a: "R1.1", b: "R1.2", value: 0, role: "series" }],
    });
    const { network } = prepare(path).at(nominal);
    expect(network.parts.filter((part) => part.kind === "R")).toEqual([]);
    expect(network.sections).toHaveLength(1);
    expect(network.sections[0]).toMatchObject({ a: network.drivers[0]?.node });
  });

  it("levels follow end resistors to their rails", () => {
    const path = pointToPoint(driverModel(50, 1e-9), 50, 1e-9, {
      parts: [{ reference: "R1", kind: "R", a: "U2.1", b: "rail VTT", value: 50, role: "termination" }],
      rails: [{ name: "VTT", node: "rail VTT", volts: 1.65 }],
    });
    const levels = prepare(path).probes[0]?.levels.typical;
    expect(levels?.low).toBeCloseTo(0.825, 12);
    expect(levels?.high).toBeCloseTo(2.475, 12);
  });

  it("a coupling capacitor passes the edge and takes its middle from the bias; without bias there is no data", () => {
    const base = pointToPoint(driverModel(50, 1e-9), 50, 1e-9, {
      sections: [section("U1.1", "C1.1", 50, 0.5e-9), section("C1.2", "U2.1", 50, 0.5e-9)],
      parts: [{ reference: "C1", kind: "C", a: "C1.1", b: "C1.2", value: 1e-6, role: "series" }],
    });
    expect(cannotSimulate(base)?.input).toBe("bias of NET");
    expect(cannotSimulate(base)?.detail).toContain("Import the resistor that does");
    const biased: ResolvedPath = {
      ...base,
      parts: [
        ...base.parts,
        { reference: "R1", kind: "R", a: "U2.1", b: "rail 1V0", value: 100e3, role: "termination" },
      ],
      rails: [{ name: "1V0", node: "rail 1V0", volts: 1 }],
    };
    expect(cannotSimulate(biased)).toBeNull();
    const levels = prepare(biased).probes[0]?.levels.typical;
    expect(((levels?.low ?? 0) + (levels?.high ?? 0)) / 2).toBeCloseTo(1, 9);
    expect((levels?.high ?? 0) - (levels?.low ?? 0)).toBeCloseTo(3.3, 2);
  });

  it("a series capacitor too small for a bit is no data", () => {
    const path = pointToPoint(driverModel(50, 1e-9), 50, 1e-9, {
      sections: [section("U1.1", "C1.1", 50, 0.5e-9), section("C1.2", "U2.1", 50, 0.5e-9)],
      parts: [{ reference: "C1", kind: "C", a: "C1.1", b: "C1.2", value: 10e-12, role: "series" }],
    });
    expect(cannotSimulate(path)?.input).toBe("simulation of C1");
  });
});

describe("the window", () => {
  const base = { ramp: 1e-9, delay: 1e-9, allDelays: 1e-9, roundTripGain: 0.5, timeConstants: 0 };
  it("ends with the next edge", () => {
    expect(watchWindow({ ...base, bitTime: 10e-9 })).toEqual({ until: 10e-9, isBit: true });
  });
  it("without a rate is the edge and the round trips down to 2 % of the ringing", () => {
    const { until, isBit } = watchWindow({ ...base, bitTime: null });
    expect(until).toBeCloseTo(1e-9 + 2e-9 * (Math.log(0.02) / Math.log(0.5) + 1), 15);
    expect(isBit).toBe(false);
  });
  it("lasts until a strong mismatch has rung down to 2 %, at most 60 round trips", () => {
    expect(watchWindow({ ...base, roundTripGain: 0.9, bitTime: null }).until).toBeCloseTo(
      1e-9 + 2e-9 * (Math.log(0.02) / Math.log(0.9) + 1),
      15,
    );
    expect(watchWindow({ ...base, roundTripGain: 1, bitTime: null }).until).toBeCloseTo(123e-9, 15);
  });
});
