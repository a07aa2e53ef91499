import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { simulate, type Network, type Pwl, type Section } from "@/lib/si";
import { edge, pointToPoint, readAt } from "./nets";

const PS = 1e-12;
const settings = { numRuns: 25, seed: 20 };

interface Tree {
  lines: { parent: number; impedance: number; delay: number; farads: number; ohms: number }[];
  resistance: number;
  ramp: number;
}

/** A tree of lines, each end with perhaps a capacitor and a resistor. Delays in whole 10 ps. */
const trees = (most: number, reactive: boolean): fc.Arbitrary<Tree> =>
  fc.record({
    lines: fc.array(
      fc.record({
        parent: fc.nat(1000),
        impedance: fc.double({ min: 30, max: 100, noNaN: true }),
        delay: fc.integer({ min: 2, max: 30 }),
        farads: reactive ? fc.constantFrom(0, 0, 1, 2, 5) : fc.constant(0),
        ohms: fc.constantFrom(0, 0, 40, 75, 200),
      }),
      { minLength: 1, maxLength: most },
    ),
    resistance: fc.double({ min: 5, max: 90, noNaN: true }),
    ramp: fc.integer({ min: 5, max: 40 }),
  });

function treeNet({ lines, resistance, ramp }: Tree, scale = { ohms: 1, time: 1 }, wave?: Pwl): Network {
  const net: Network = {
    rails: [],
    drivers: [
      {
        name: "U1",
        kind: "thevenin",
        node: "n0",
        resistance: resistance * scale.ohms,
        wave: wave ?? edge(1, ramp * 10 * PS * scale.time),
      },
    ],
    sections: [],
    parts: [],
    probes: [{ name: "n0", node: "n0" }],
  };
  lines.forEach((line, i) => {
    const node = `n${i + 1}`;
    net.sections.push({
      name: `s${i}`,
      kind: "line",
      a: `n${line.parent % (i + 1)}`,
      b: node,
      impedance: line.impedance * scale.ohms,
      delay: line.delay * 10 * PS * scale.time,
    });
    if (line.farads)
      net.parts.push({
        name: `c${i}`,
        kind: "C",
        a: node,
        b: "0",
        value: (line.farads * PS * scale.time) / scale.ohms,
      });
    if (line.ohms)
      net.parts.push({ name: `r${i}`, kind: "R", a: node, b: "0", value: line.ohms * scale.ohms });
    net.probes.push({ name: node, node });
  });
  return net;
}

/** Final voltage of a tree, whose lines are wires at DC. */
const dcLevel = ({ lines, resistance }: Tree) =>
  1 / (1 + resistance * lines.reduce((sum, { ohms }) => (ohms ? sum + 1 / ohms : sum), 0));

describe("laws of the lattice", () => {
  it("superposition: the answer to a + b is the sum of the answers, to 1e-9 resistive and 0.1 % with capacitors", () => {
    fc.assert(
      fc.property(trees(5, true), (tree) => {
        const waves = [
          edge(1, 200 * PS),
          edge(-0.4, 300 * PS, 700 * PS),
          { kind: "pwl" as const, time: [0, 200 * PS, 700 * PS, 1000 * PS], value: [0, 1, 1, 0.6] },
        ];
        const isPlain = tree.lines.every((line) => !line.farads);
        const runs = waves.map((wave) => simulate(treeNet(tree, undefined, wave), { until: 6e-9 }));
        for (let t = 0; t < 6e-9; t += 3.7e-11) {
          const [one, two, both] = runs.map(({ time, voltage }) => readAt(time, voltage.n1!, t));
          expect(Math.abs(one! + two! - both!)).toBeLessThan(isPlain ? 1e-9 : 1e-3);
        }
      }),
      settings,
    );
  });

  it("a later source gives the same later, to 1e-4 of the swing (a round peak may be marked or not)", () => {
    fc.assert(
      fc.property(trees(5, true), fc.integer({ min: 1, max: 900 }), (tree, late) => {
        const now = simulate(treeNet(tree), { until: 4e-9 });
        const later = simulate(treeNet(tree, undefined, edge(1, tree.ramp * 10 * PS, late * PS)), {
          until: 4e-9 + late * PS,
        });
        now.time.forEach((t, i) => {
          if (t <= 4e-9)
            expect(
              Math.abs(readAt(later.time, later.voltage.n1!, t + late * PS) - now.voltage.n1![i]!),
            ).toBeLessThan(1e-4);
        });
      }),
      settings,
    );
  });

  it("impedances times k leave voltages alone; times times k stretch them; both to 1e-6", () => {
    fc.assert(
      fc.property(trees(5, true), fc.constantFrom(0.5, 2, 4), (tree, k) => {
        const plain = simulate(treeNet(tree), { until: 4e-9 });
        const ohms = simulate(treeNet(tree, { ohms: k, time: 1 }), { until: 4e-9 });
        const time = simulate(treeNet(tree, { ohms: 1, time: k }), { until: 4e-9 * k });
        for (let t = 1e-13; t < 4e-9; t += 5.3e-11) {
          const wanted = readAt(plain.time, plain.voltage.n1!, t);
          expect(Math.abs(readAt(ohms.time, ohms.voltage.n1!, t) - wanted)).toBeLessThan(1e-6);
          expect(Math.abs(readAt(time.time, time.voltage.n1!, t * k) - wanted)).toBeLessThan(1e-6);
        }
      }),
      settings,
    );
  });

  it("energy never grows: once the source is back at 0 the waves under way carry less and less (resistive, 1e-9)", () => {
    fc.assert(
      fc.property(trees(6, false), (tree) => {
        const pulse: Pwl = { kind: "pwl", time: [0, 100 * PS, 200 * PS, 300 * PS], value: [0, 1, 1, 0] };
        const net = treeNet(tree, undefined, pulse);
        const { time, waves } = simulate(net, { until: 6e-9, waves: true });
        const energy = (from: number) =>
          waves!.reduce((sum, { impedance, delay, a, b }) => {
            let integral = 0;
            for (let k = 0; k < 200; k++) {
              const t = from - delay + (delay * (k + 0.5)) / 200;
              integral += readAt(time, a.outgoing, t) ** 2 + readAt(time, b.outgoing, t) ** 2;
            }
            return sum + (integral * delay) / 200 / impedance;
          }, 0);
        let before = Infinity;
        for (let t = 0.8e-9; t < 5.9e-9; t += 0.5e-9) {
          const now = energy(t);
          // The sum over 200 slices is itself good to about 1 %.
          expect(now).toBeLessThan(before * 1.02 + 1e-20);
          before = now;
        }
      }),
      settings,
    );
  });

  it("ends at the resistive divider, to 0.1 % of the swing", () => {
    fc.assert(
      fc.property(trees(4, true), (tree) => {
        // A damped tree: every end terminated, so that it has settled.
        const damped = { ...tree, lines: tree.lines.map((line) => ({ ...line, ohms: line.ohms || 75 })) };
        const { voltage, time } = simulate(treeNet(damped), { until: 60e-9 });
        expect(Math.abs(voltage.n1![time.length - 1]! - dcLevel(damped))).toBeLessThan(1e-3);
      }),
      settings,
    );
  });

  it("is a number everywhere and time never goes back, up to 40 sections", () => {
    fc.assert(
      fc.property(trees(40, true), (tree) => {
        const { time, voltage } = simulate(treeNet(tree), { until: 3e-9, accuracy: "live" });
        for (const values of Object.values(voltage))
          for (const v of values) if (!Number.isFinite(v) || Math.abs(v) > 50) throw new Error(`${v}`);
        for (let i = 1; i < time.length; i++) if (!(time[i]! >= time[i - 1]!)) throw new Error(`${time[i]}`);
        expect(time[0]).toBe(0);
        expect(time[time.length - 1]).toBeGreaterThanOrEqual(3e-9 * (1 - 1e-12));
      }),
      { numRuns: 12, seed: 4 },
    );
  });

  it("equal legs of a star see equal voltages, exactly", () => {
    const leg = (i: number): Section => ({
      name: `leg${i}`,
      kind: "line",
      a: "hub",
      b: `r${i}`,
      impedance: 60,
      delay: 333.3 * PS,
    });
    const net: Network = {
      rails: [],
      drivers: [{ name: "U1", kind: "thevenin", node: "hub", resistance: 20, wave: edge(3.3, 150 * PS) }],
      sections: [0, 1, 2, 3].map(leg),
      parts: [],
      probes: [],
    };
    for (let i = 0; i < 4; i++) {
      net.parts.push({ name: `c${i}`, kind: "C", a: `r${i}`, b: "0", value: 3e-12 });
      net.probes.push({ name: `r${i}`, node: `r${i}` });
    }
    const { voltage } = simulate(net, { until: 10e-9 });
    for (let i = 1; i < 4; i++) expect(voltage[`r${i}`]).toEqual(voltage.r0);
  });

  it("a net that never settles ends (0 Ω into an open line, with and without a capacitor)", () => {
    const net = pointToPoint({ resistance: 0, load: null, delay: 10 * PS, ramp: 50 * PS });
    expect(simulate(net, { until: 100e-9 }).time.length).toBeLessThan(50_000);
    net.parts.push({ name: "C", kind: "C", a: "b", b: "0", value: 1e-12 });
    expect(Number.isFinite(simulate(net, { until: 100e-9 }).voltage.load!.at(-1))).toBe(true);
  });
});
