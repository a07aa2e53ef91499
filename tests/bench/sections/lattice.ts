import {
  bounceTable,
  measureEdge,
  pulseResponse,
  simulate,
  standingWave,
  worstEye,
  type LineSection,
  type Network,
  type Section,
} from "@/lib/si";
import { microseconds, type BenchSection } from "../section";
import { mixedNet, pointToPointNet, sequence, type BenchNet } from "./mixed-nets";

const PS = 1e-12;

/** Figures of the lattice, in µs a case. */
export const lattice: BenchSection = {
  title: "Lattice",
  run: () => [
    {
      what: "point to point, open, 20 round trips",
      value: microseconds(() => simulate(pointToPoint(0.5, 0, 17), { until: 20e-9 })),
      unit: "µs",
      goal: 50,
    },
    {
      what: "point to point, 5 pF at the end, 20 round trips",
      value: microseconds(() => simulate(pointToPoint(0.5, 5, 17), { until: 20e-9 })),
      unit: "µs",
    },
    {
      what: "fly-by, 8 loads of 2 pF, 15 ns",
      value: microseconds(() => simulate(flyBy(8, 100), { until: 15e-9 })),
      unit: "µs",
      goal: 300,
    },
    {
      what: "fly-by, 8 loads, lengths all different, 15 ns",
      value: microseconds(() => simulate(flyBy(8, 100, 7.3), { until: 15e-9 })),
      unit: "µs",
    },
    {
      what: "tee, incommensurate, resistive, 15 ns",
      value: microseconds(() => simulate(tee(), { until: 15e-9 })),
      unit: "µs",
    },
    {
      what: "point to point with skin loss, resistive, 20 round trips",
      value: microseconds(() => simulate(lossy(0), { until: 20e-9 })),
      unit: "µs",
    },
    {
      what: "point to point with skin loss, 5 pF at the end, 20 round trips",
      value: microseconds(() => simulate(lossy(5), { until: 20e-9 })),
      unit: "µs",
    },
    {
      what: "standing wave of an 8-load fly-by at one frequency",
      value: microseconds(() => standingWave(flyBy(8, 100), 1e9)),
      unit: "µs",
    },
    {
      what: "bounce table of a tee, 15 ns, floor 1e-3",
      value: microseconds(() => bounceTable(tee(), { until: 15e-9, floor: 1e-3 })),
      unit: "µs",
    },
    { what: "worst eye from a step response of 20 ns", value: eye(), unit: "µs" },
    {
      what: "10,000 different point to point with metrics",
      value: manyDifferent(pointToPointNet),
      unit: "ms",
      goal: 1000,
      note: "processor time",
    },
    {
      what: "10,000 different mixed nets with metrics",
      value: manyDifferent(mixedNet),
      unit: "ms",
      goal: 6000,
      note: "processor time",
    },
  ],
};

function driver(resistance: number, ramp: number): Network["drivers"][number] {
  return {
    name: "U1",
    kind: "thevenin",
    node: "n0",
    resistance,
    wave: { kind: "pwl", time: [0, ramp], value: [0, 3.3] },
  };
}

function pointToPoint(
  delayNs: number,
  pf: number,
  resistance: number,
  impedance = 50,
  ramp = 300 * PS,
): Network {
  return {
    rails: [],
    drivers: [driver(resistance, ramp)],
    sections: [{ name: "s", kind: "line", a: "n0", b: "n1", impedance, delay: delayNs * 1e-9 }],
    parts: pf > 0 ? [{ name: "load", kind: "C", a: "n1", b: "0", value: pf * PS }] : [],
    probes: [{ name: "rx", node: "n1" }],
  };
}

function flyBy(loads: number, delayPs: number, spreadPs = 0): Network {
  const sections: Section[] = [];
  const parts: Network["parts"] = [];
  const probes: Network["probes"] = [];
  for (let i = 1; i <= loads; i++) {
    sections.push({
      name: `s${i}`,
      kind: "line",
      a: `n${i - 1}`,
      b: `n${i}`,
      impedance: 50,
      delay: (delayPs + spreadPs * Math.sqrt(i * i + 1)) * PS,
    });
    parts.push({ name: `c${i}`, kind: "C", a: `n${i}`, b: "0", value: 2 * PS });
    probes.push({ name: `rx${i}`, node: `n${i}` });
  }
  return { rails: [], drivers: [driver(25, 500 * PS)], sections, parts, probes };
}

function tee(): Network {
  const line = (name: string, a: string, b: string, delay: number): Section => ({
    name,
    kind: "line",
    a,
    b,
    impedance: 50,
    delay: delay * PS,
  });
  return {
    rails: [],
    drivers: [driver(20, 300 * PS)],
    sections: [line("t", "n0", "j", 301.7), line("u", "j", "e", 411.13), line("w", "j", "f", 233.91)],
    parts: [],
    probes: [
      { name: "e", node: "e" },
      { name: "f", node: "f" },
    ],
  };
}

function lossy(pf: number): Network {
  const net = pointToPoint(0.5, pf, 17);
  (net.sections[0] as LineSection).skin = 2e-6;
  return net;
}

function eye(): number {
  const { time, voltage } = simulate(pointToPoint(0.5, 3, 30), { until: 20e-9 });
  return microseconds(() => worstEye(pulseResponse({ time, voltage: voltage.rx! }, 1e-9), 1e-9));
}

/** Every net is another, all receivers are measured; the whole in ms. */
function manyDifferent(make: (random: () => number) => BenchNet): number {
  const random = sequence(3);
  const nets = Array.from({ length: 10_000 }, () => make(random));
  let seen = 0;
  const judge = ({ network, until }: BenchNet) => {
    const { time, voltage } = simulate(network, { until });
    for (const { name } of network.probes)
      seen += measureEdge(time, voltage[name]!, {
        edge: "rise",
        from: 0,
        to: time[time.length - 1]!,
        low: 0,
        high: 3.3,
        vil: 0.8,
        vih: 2,
        vmeas: 1.5,
      }).overshoot;
  };
  nets.slice(0, 500).forEach(judge);
  const start = process.cpuUsage();
  nets.forEach(judge);
  const { user, system } = process.cpuUsage(start);
  return seen >= 0 ? (user + system) / 1000 : NaN;
}
