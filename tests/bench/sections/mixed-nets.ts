import type { LineSection, Network, Part } from "@/lib/si";

const PS = 1e-12;

/** A seeded sequence of numbers in 0 … 1, the same on every machine. */
export function sequence(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
    return state / 2 ** 32;
  };
}

export interface BenchNet {
  network: Network;
  /** [s] */
  until: number;
}

/** Point to point with a capacitive receiver: every net its own length, load, driver and edge. */
export function pointToPointNet(random: () => number): BenchNet {
  const delay = (150 + 500 * random()) * PS;
  const network = start(15 + 40 * random(), (300 + 700 * random()) * PS);
  addLine(network, "n0", "n1", 45 + 20 * random(), delay);
  addLoad(network, "n1", 1 + 4 * random());
  return { network, until: 20 * delay };
}

/**
 * One of the kinds that a board is made of: point to point, series resistor, cascade with a via, tee, star, fly-by,
 * clamped receiver, coupled pair; delays as drawn, without a common measure.
 */
export function mixedNet(random: () => number, { clamps = true } = {}): BenchNet {
  const kind = Math.floor(8 * random());
  const network = start(15 + 40 * random(), (200 + 600 * random()) * PS);
  const delay = () => (80 + 300 * random()) * PS;
  const impedance = () => 45 + 25 * random();
  const load = () => 1 + 4 * random();
  let from = "n0";
  if (kind === 1 || kind === 6) {
    network.parts.push({ name: "rs", kind: "R", a: "n0", b: "pin", value: 10 + 25 * random() });
    from = "pin";
  }
  let way = 0;
  const line = (a: string, b: string, ohms = impedance()) => {
    const long = delay();
    way = Math.max(way, long);
    addLine(network, a, b, ohms, long);
  };
  if (kind === 2) {
    line(from, "v");
    addPart(network, { name: "via", kind: "C", a: "v", b: "0", value: (0.3 + random()) * PS });
    line("v", "n1");
    addLoad(network, "n1", load());
  } else if (kind === 3 || kind === 4) {
    line(from, "hub");
    for (let i = 1; i <= (kind === 3 ? 2 : 4); i++) {
      line("hub", `n${i}`);
      addLoad(network, `n${i}`, load());
    }
  } else if (kind === 5) {
    let before = from;
    for (let i = 1; i <= 6; i++) {
      line(before, `n${i}`);
      addLoad(network, `n${i}`, load());
      before = `n${i}`;
    }
  } else if (kind === 7) {
    const long = delay();
    way = long;
    network.sections.push({
      name: "pair",
      kind: "pair",
      a1: from,
      a2: "q0",
      b1: "n1",
      b2: "q1",
      even: { impedance: 58, delay: long * 1.03 },
      odd: { impedance: 46, delay: long },
    });
    network.parts.push({ name: "rq", kind: "R", a: "q0", b: "0", value: 50 });
    addLoad(network, "n1", load());
    addLoad(network, "q1", load());
  } else {
    line(from, "n1");
    addLoad(network, "n1", load());
    if (kind === 6 && clamps) {
      network.rails.push({ name: "vdd", node: "vdd", volts: 3.3 });
      for (const [a, b] of [
        ["n1", "vdd"],
        ["0", "n1"],
      ] as const)
        addPart(network, {
          name: `d${a}`,
          kind: "diode",
          a,
          b,
          saturationCurrent: 1e-14,
          emission: 1.05,
          thermalVoltage: 0.0258649,
          seriesResistance: 5,
        });
    }
  }
  return { network, until: Math.min(15e-9, Math.max(4e-9, 20 * way)) };
}

function start(resistance: number, ramp: number): Network {
  return {
    rails: [],
    drivers: [
      {
        name: "U1",
        kind: "thevenin",
        node: "n0",
        resistance,
        wave: { kind: "pwl", time: [0, ramp], value: [0, 3.3] },
      },
    ],
    sections: [],
    parts: [],
    probes: [],
  };
}

function addLine(network: Network, a: string, b: string, impedance: number, delay: number) {
  const section: LineSection = { name: `t${network.sections.length}`, kind: "line", a, b, impedance, delay };
  network.sections.push(section);
}

function addLoad(network: Network, node: string, pf: number) {
  addPart(network, { name: `c${node}`, kind: "C", a: node, b: "0", value: pf * PS });
  network.probes.push({ name: node, node });
}

function addPart(network: Network, part: Part) {
  network.parts.push(part);
}
