import { describe, expect, it } from "vitest";
import { simulate, wavesAlong } from "@/lib/si";
import { pointToPoint, readAt } from "./nets";

const T = 5e-9;

describe("voltage along a line", () => {
  const { time, waves, voltage } = simulate(
    pointToPoint({ volts: 60, resistance: 100, load: 25, delay: T }),
    { until: 12 * T, waves: true },
  );
  const section = waves![0]!;
  const total = (x: number, t: number) => {
    const { forward, backward } = wavesAlong(section, time, x, t);
    return forward + backward;
  };

  it("mid-line 20 → 13.333 → 11.111 → 11.852 → 12.099 V, to 1e-3 (university lattice-diagram example)", () => {
    [20, 13.333, 11.111, 11.852, 12.099].forEach((volts, k) =>
      expect(total(0.5, (k + 1) * T)).toBeCloseTo(volts, 3),
    );
  });

  it("is the node voltage at either end, to 1e-12 (law)", () => {
    for (let t = 0.3 * T; t < 11 * T; t += 0.7 * T) {
      expect(total(0, t)).toBeCloseTo(readAt(time, voltage.source!, t), 12);
      expect(total(1, t)).toBeCloseTo(readAt(time, voltage.load!, t), 12);
    }
  });

  it("starts from the DC waves of a line at rest: their sum the voltage, their difference Z·I (law)", () => {
    const net = pointToPoint({ resistance: 50, load: 50, delay: T });
    net.drivers[0] = {
      ...net.drivers[0]!,
      kind: "thevenin",
      resistance: 50,
      wave: { kind: "pwl", time: [0, 0], value: [2, 0] },
    };
    const rest = simulate(net, { until: T, waves: true }).waves![0]!;
    expect(rest.a.outgoing[0]).toBeCloseTo(1, 9);
    expect(rest.a.incident[0]).toBeCloseTo(0, 9);
  });
});
