import { describe, expect, it } from "vitest";
import { measureEdge, simulate } from "@/lib/si";
import { pointToPoint, readAt } from "./nets";

const T = 1e-9;

/** Voltages just after 1, 3, 5 … one-way delays at the load, 0, 2, 4 … at the source. */
function steps(
  volts: number,
  resistance: number,
  load: number | null,
  where: "source" | "load",
  count: number,
): number[] {
  const { time, voltage } = simulate(pointToPoint({ volts, resistance, load, delay: T }), {
    until: (2 * count + 1) * T,
  });
  return Array.from({ length: count }, (_, k) =>
    readAt(time, voltage[where]!, (2 * k + (where === "load" ? 1 : 0) + 0.5) * T),
  );
}

describe("lattice voltages after a step, to 1e-3 V", () => {
  it.each([
    ["2 V, 75 Ω, open, load (computed; textbook kind, from memory)", 2, 75, null, "load", [1.6, 1.92, 1.984]],
    [
      "2 V, 75 Ω, open, source (computed; textbook kind, from memory)",
      2,
      75,
      null,
      "source",
      [0.8, 1.76, 1.952],
    ],
    ["2 V, 25 Ω, open (computed)", 2, 25, null, "load", [2.667, 1.778, 2.074, 1.975]],
    ["3.3 V, 10 Ω, open (computed)", 3.3, 10, null, "load", [5.5, 1.833, 4.278, 2.648, 3.735]],
    ["3.3 V, 17 Ω, open (computed)", 3.3, 17, null, "load", [4.925, 2.499, 3.694, 3.106]],
    ["1 V, 50 Ω, short, source (computed)", 1, 50, 0, "source", [0.5, 0]],
    ["1 V, 50 Ω, short, load (common practice, no source)", 1, 50, 0, "load", [0, 0]],
    ["1 V, 0 Ω, open: never settles (computed)", 1, 0, null, "load", [2, 0, 2, 0, 2, 0]],
    ["10 V, 30 Ω, 150 Ω (computed)", 10, 30, 150, "load", [9.375, 8.203, 8.35]],
    ["60 V, 100 Ω, 25 Ω, load (university lattice-diagram example)", 60, 100, 25, "load", [13.333, 11.852]],
  ] as const)("%s", (_, volts, resistance, load, where, values) => {
    const found = steps(volts, resistance, load, where, values.length);
    values.forEach((value, i) => expect(Math.abs(found[i]! - value)).toBeLessThan(1e-3));
  });

  it("3.3 V, 17 Ω with 33 Ω in series (E24): flat 3.3 V at an open end, to 1e-12 (computed)", () => {
    const net = pointToPoint({ volts: 3.3, resistance: 17, load: null, delay: T });
    net.drivers[0]!.node = "pin";
    net.parts.push({ name: "R1", kind: "R", a: "pin", b: "a", value: 33 });
    const { time, voltage } = simulate(net, { until: 10 * T });
    for (const t of [1.5, 3.5, 7.5]) expect(readAt(time, voltage.load!, t * T)).toBeCloseTo(3.3, 12);
  });
});

describe("junctions (law)", () => {
  it.each([
    [75, 0.2],
    [25, -1 / 3],
  ])("50 Ω to %d Ω reflects %f and passes 1 + that, to 1e-12", (impedance, rho) => {
    const net = pointToPoint({ resistance: 50, load: null, delay: T });
    net.sections.push({ name: "T2", kind: "line", a: "b", b: "c", impedance, delay: 10 * T });
    const { time, voltage, waves } = simulate(net, { until: 5 * T, waves: true });
    expect(readAt(time, voltage.load!, 1.5 * T)).toBeCloseTo(0.5 * (1 + rho), 12);
    const end = waves![0]!.b;
    expect(readAt(time, end.incident, 1.5 * T)).toBeCloseTo(0.5, 12);
    expect(readAt(time, end.outgoing, 1.5 * T)).toBeCloseTo(0.5 * rho, 12);
  });
});

describe("overshoot of a straight ramp at an open 50 Ω line, % of the swing, to 0.05 (computed)", () => {
  const ratios = [2, 3, 4, 6, 8, 10];
  it.each([
    [10, [66.7, 29.6, 11.1, 17.3, 8.0, 9.1]],
    [17, [49.3, 24.7, 12.5, 12.3, 7.8, 6.8]],
    [25, [33.3, 18.5, 11.1, 8.6, 6.2, 5.0]],
    [33, [20.5, 12.3, 8.1, 5.7, 4.2, 3.4]],
    [50, [0, 0, 0, 0, 0, 0]],
  ])("%d Ω driver", (resistance, row) => {
    ratios.forEach((ratio, i) => {
      const until = 200 * T;
      const { time, voltage } = simulate(
        pointToPoint({ resistance, load: null, delay: T, ramp: ratio * T }),
        { until },
      );
      const { overshoot } = measureEdge(time, voltage.load!, {
        edge: "rise",
        from: 0,
        to: until,
        low: 0,
        high: 1,
        vil: 0.3,
        vih: 0.7,
        vmeas: 0.5,
      });
      expect(Math.abs(100 * overshoot - row[i]!)).toBeLessThan(0.0501);
    });
  });
});
