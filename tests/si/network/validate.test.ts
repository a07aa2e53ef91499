import { describe, expect, it } from "vitest";
import { DomainError, simulate, type Network } from "@/lib/si";
import { pointToPoint } from "../lattice/nets";

type Change = (net: Network) => void;

/** Each is refused with the field it is about. */
const faults: [string, string, Change][] = [
  [
    "impedance of nothing",
    "sections[0].impedance",
    (net) => Object.assign(net.sections[0]!, { impedance: 0 }),
  ],
  ["delay below zero", "sections[0].delay", (net) => Object.assign(net.sections[0]!, { delay: -1 })],
  [
    "a resistance that is no number",
    "drivers[0].resistance",
    (net) => Object.assign(net.drivers[0]!, { resistance: NaN }),
  ],
  ["a resistor below zero", "parts[0].value", (net) => Object.assign(net.parts[0]!, { value: -5 })],
  [
    "a wave that goes back in time",
    "drivers[0].wave.time[1]",
    (net) => Object.assign(net.drivers[0]!, { wave: { kind: "pwl", time: [2e-9, 1e-9], value: [0, 1] } }),
  ],
  [
    "a wave without points",
    "drivers[0].wave.time",
    (net) => Object.assign(net.drivers[0]!, { wave: { kind: "pwl", time: [], value: [] } }),
  ],
  [
    "an I-V table that falls back in volts",
    "parts[0].points[1]",
    (net) =>
      (net.parts[0] = {
        name: "X",
        kind: "iv",
        a: "b",
        b: "0",
        points: [
          [1, 0],
          [0, 1],
        ],
      }),
  ],
  ["a probe at a node that nothing touches", "probes[0].node", (net) => (net.probes[0]!.node = "nowhere")],
  ["two probes of one name", "probes[1].name", (net) => (net.probes[1]!.name = net.probes[0]!.name)],
];

describe("a network that means nothing is refused, naming the field", () => {
  it.each(faults)("%s", (_, field, change) => {
    const net = pointToPoint({ resistance: 50, load: 50, delay: 1e-9 });
    change(net);
    try {
      simulate(net, { until: 1e-8 });
      expect.unreachable();
    } catch (error) {
      expect(error).toBeInstanceOf(DomainError);
      expect((error as DomainError).field).toBe(field);
    }
  });

  it.each([0, -1, NaN, Infinity])("a window of %d s", (until) => {
    expect(() => simulate(pointToPoint({ resistance: 50, load: 50, delay: 1e-9 }), { until })).toThrow(
      DomainError,
    );
  });

  it("two ideal voltages in one node, by name", () => {
    const net = pointToPoint({ resistance: 0, load: null, delay: 1e-9 });
    net.rails.push({ name: "VDD", node: "a", volts: 3.3 });
    expect(() => simulate(net, { until: 1e-8 })).toThrow(/U1 and VDD/);
  });

  it("a driver at rest above 0 V shorted through a line has no state of rest", () => {
    const net = pointToPoint({ resistance: 0, load: 0, delay: 1e-9 });
    Object.assign(net.drivers[0]!, { wave: { kind: "pwl", time: [0], value: [1] } });
    expect(() => simulate(net, { until: 1e-8 })).toThrow(/no state of rest/);
  });

  it("a node that only capacitors hold rests at 0 V instead of failing", () => {
    const net = pointToPoint({ resistance: 50, load: 50, delay: 1e-9, ramp: 1e-10 });
    net.parts.push(
      { name: "C1", kind: "C", a: "b", b: "c", value: 1e-12 },
      { name: "C2", kind: "C", a: "c", b: "0", value: 1e-12 },
    );
    net.probes.push({ name: "between", node: "c" });
    const { voltage } = simulate(net, { until: 1e-8 });
    expect(voltage.between![0]).toBe(0);
    expect(voltage.between!.at(-1)).toBeCloseTo(voltage.load!.at(-1)! / 2, 4);
  });
});
