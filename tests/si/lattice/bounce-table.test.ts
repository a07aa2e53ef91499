import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { bounceTable, DomainError, simulate, UnsupportedError, type Network, type Section } from "@/lib/si";
import { networkOf, referenceCases } from "../network/reference-case";
import { pointToPoint } from "./nets";

describe("bounce table", () => {
  it.each(referenceCases("A").map((entry) => [entry.id, entry] as const))(
    "%s: every row of the exact rational table, to 1e-9",
    (_, entry) => {
      const table = bounceTable(networkOf(entry), { until: entry.settings.t_stop_ps * 1e-12, floor: 1e-15 });
      for (const row of entry.bounce_table!.rows) {
        const ends = new Set([...Object.keys(row.incident), ...Object.keys(row.outgoing)]);
        for (const end of ends) {
          const found = table.find(
            (bounce) =>
              Math.abs(bounce.time * 1e12 - row.t_ps) < 1e-6 && `${bounce.section}.${bounce.end}` === end,
          );
          expect(found, `${row.t_ps} ${end}`).toBeDefined();
          expect(found!.incident).toBeCloseTo(row.incident[end]?.[0] ?? 0, 9);
          expect(found!.outgoing).toBeCloseTo(row.outgoing[end]?.[0] ?? 0, 9);
          expect(found!.voltage).toBeCloseTo(row.v_node_running[0], 9);
        }
      }
    },
  );

  it("waves of 60 V, 100 Ω, 50 Ω, 25 Ω are 20, −6.667, −2.222, 0.741, 0.247, −0.082 V (university lattice-diagram example)", () => {
    const table = bounceTable(pointToPoint({ resistance: 100, load: 25, delay: 5e-9 }), { until: 26e-9 });
    const launched = table.filter((bounce) => bounce.outgoing !== 0).map((bounce) => 60 * bounce.outgoing);
    [20, -6.667, -2.222, 0.741, 0.247, -0.082].forEach((wave, i) => expect(launched[i]).toBeCloseTo(wave, 3));
  });

  it("drops waves below the floor and ends even where nothing dies out (0 Ω into an open line)", () => {
    const table = bounceTable(pointToPoint({ resistance: 0, load: null, delay: 1e-9 }), { until: 50e-9 });
    expect(table).toHaveLength(51);
    expect(
      bounceTable(pointToPoint({ resistance: 25, load: null, delay: 1e-9 }), { until: 1e-6, floor: 1e-3 })
        .length,
    ).toBeLessThan(20);
  });

  it("refuses what has no single height: a capacitor, by name", () => {
    const net = pointToPoint({ resistance: 25, load: null, delay: 1e-9 });
    net.parts.push({ name: "C7", kind: "C", a: "b", b: "0", value: 1e-12 });
    expect(() => bounceTable(net, { until: 1e-8 })).toThrow(UnsupportedError);
    expect(() => bounceTable(net, { until: 1e-8 })).toThrow("C7");
  });
});

interface Wire {
  a: string;
  b: string;
  impedance: number;
  /** in whole ticks */
  delay: number;
}

interface Mesh {
  wires: Wire[];
  /** to ground, by node */
  ohms: Record<string, number>;
  resistance: number;
}

const TICK = 10e-12;

/** Any graph on up to five nodes: trees, rings, parallel lines, lines from a node to itself. */
const meshes: fc.Arbitrary<Mesh> = fc.record({
  wires: fc.array(
    fc.record({
      a: fc.constantFrom("n0", "n1", "n2", "n3", "n4"),
      b: fc.constantFrom("n0", "n1", "n2", "n3", "n4"),
      impedance: fc.integer({ min: 25, max: 110 }),
      delay: fc.integer({ min: 1, max: 7 }),
    }),
    { minLength: 1, maxLength: 7 },
  ),
  ohms: fc.dictionary(fc.constantFrom("n0", "n1", "n2", "n3", "n4"), fc.integer({ min: 10, max: 300 })),
  resistance: fc.integer({ min: 5, max: 100 }),
});

function meshNet({ wires, ohms, resistance }: Mesh): Network {
  const sections: Section[] = [
    { name: "feed", kind: "line", a: "n0", b: "n1", impedance: 50, delay: TICK },
    ...wires.map(({ a, b, impedance, delay }, i): Section => ({
      name: `w${i}`,
      kind: "line",
      a,
      b,
      impedance,
      delay: delay * TICK,
    })),
  ];
  const nodes = [...new Set(sections.flatMap((s) => (s.kind === "line" ? [s.a, s.b] : [])))];
  return {
    rails: [],
    drivers: [
      {
        name: "U1",
        kind: "thevenin",
        node: "n0",
        resistance,
        wave: { kind: "pwl", time: [0, 0], value: [0, 1] },
      },
    ],
    sections,
    parts: Object.entries(ohms)
      .filter(([node]) => nodes.includes(node))
      .map(([node, value]) => ({ name: `R${node}`, kind: "R", a: node, b: "0", value })),
    probes: nodes.map((node) => ({ name: node, node })),
  };
}

/** Every tick, every node, the textbook way: v = 2 Σ Y·arriving / (G + Σ Y). Its own code, shares nothing with the engine. */
function bruteForce(mesh: Mesh, ticks: number): Record<string, number[]> {
  const lines: Wire[] = [{ a: "n0", b: "n1", impedance: 50, delay: 1 }, ...mesh.wires];
  const sent = lines.map(() => ({ a: [] as number[], b: [] as number[] }));
  const volts: Record<string, number[]> = {};
  for (let n = 0; n <= ticks; n++) {
    const arriving = lines.map(({ delay }, i) => ({
      a: sent[i]!.b[n - delay] ?? 0,
      b: sent[i]!.a[n - delay] ?? 0,
    }));
    const current: Record<string, number> = {};
    const admittance: Record<string, number> = {};
    const add = (node: string, amperes: number, siemens: number) => {
      current[node] = (current[node] ?? 0) + amperes;
      admittance[node] = (admittance[node] ?? 0) + siemens;
    };
    add("n0", 1 / mesh.resistance, 1 / mesh.resistance);
    for (const [node, ohms] of Object.entries(mesh.ohms)) add(node, 0, 1 / ohms);
    lines.forEach(({ a, b, impedance }, i) => {
      add(a, (2 * arriving[i]!.a) / impedance, 1 / impedance);
      add(b, (2 * arriving[i]!.b) / impedance, 1 / impedance);
    });
    for (const node of Object.keys(admittance)) (volts[node] ??= []).push(current[node]! / admittance[node]!);
    lines.forEach(({ a, b }, i) => {
      sent[i]!.a.push(volts[a]![n]! - arriving[i]!.a);
      sent[i]!.b.push(volts[b]![n]! - arriving[i]!.b);
    });
  }
  return volts;
}

describe("any topology, rings and parallel lines too", () => {
  it("running voltages are those of stepping through every tick, to 1e-9 (brute force)", () => {
    fc.assert(
      fc.property(meshes, (mesh) => {
        const ticks = 60;
        const table = bounceTable(meshNet(mesh), { until: (ticks + 0.5) * TICK, floor: 1e-14 });
        const wanted = bruteForce(mesh, ticks);
        for (const { time, node, voltage } of table)
          expect(Math.abs(voltage - wanted[node]![Math.round(time / TICK)]!)).toBeLessThan(1e-9);
      }),
      { numRuns: 150, seed: 11 },
    );
  });

  it("so are the waveforms after a step, to 1e-9 (brute force)", () => {
    fc.assert(
      fc.property(meshes, (mesh) => {
        const ticks = 60;
        const { time, voltage } = simulate(meshNet(mesh), { until: (ticks + 0.5) * TICK });
        const wanted = bruteForce(mesh, ticks);
        for (const [node, values] of Object.entries(voltage))
          for (let n = 0; n <= ticks; n++) {
            let i = 0;
            while (i + 1 < time.length && time[i + 1]! <= (n + 0.25) * TICK) i++;
            expect(Math.abs(values[i]! - wanted[node]![n]!)).toBeLessThan(1e-9);
          }
      }),
      { numRuns: 60, seed: 12 },
    );
  });

  it("with delays that have no common measure every bounce keeps its own time", () => {
    const net = meshNet({
      wires: [
        { a: "n1", b: "n2", impedance: 60, delay: Math.SQRT2 },
        { a: "n2", b: "n0", impedance: 40, delay: Math.PI },
      ],
      ohms: { n2: 75 },
      resistance: 20,
    });
    const table = bounceTable(net, { until: 12 * TICK, floor: 1e-4 });
    for (let i = 1; i < table.length; i++) expect(table[i]!.time).toBeGreaterThanOrEqual(table[i - 1]!.time);
    expect(table.some(({ time }) => Math.abs(time / TICK - (1 + Math.SQRT2 + Math.PI)) < 1e-9)).toBe(true);
  });
});

describe("size", () => {
  /** A star of eight open legs whose lengths have no common measure: its echoes multiply. */
  const star: Network = meshNet({
    wires: Array.from({ length: 8 }, (_, i) => ({
      a: "n1",
      b: `leg${i}`,
      impedance: 50 + i,
      delay: Math.sqrt(2 + i * i * 1.7),
    })),
    ohms: {},
    resistance: 10,
  });

  it("stays within 20,000 moments by a higher floor where none is asked for", () => {
    const table = bounceTable(star, { until: 300 * TICK });
    expect(table.length).toBeGreaterThan(100);
    expect(new Set(table.map(({ time, node }) => `${time} ${node}`)).size).toBeLessThanOrEqual(20_000);
  });

  it("says so where the floor that was asked for needs more", () => {
    expect(() => bounceTable(star, { until: 300 * TICK, floor: 1e-12 })).toThrow(DomainError);
  });
});
