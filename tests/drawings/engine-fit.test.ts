import { describe, expect, it } from "vitest";
import { raysFromTable } from "@/lib/drawings/bounce-rays";
import { voltagesAlong } from "@/lib/drawings/line-voltages";
import { rowFromNetwork } from "@/lib/drawings/row-from-network";
import { voltsAt } from "@/lib/drawings/wave-samples";
import { wavesOfRow } from "@/lib/drawings/waves-of-row";
import { bounceTable } from "@/lib/si/lattice/bounce-table";
import { simulate } from "@/lib/si/lattice/simulate";
import type { Network } from "@/lib/si/network/types";

const ns = 1e-9;
const network: Network = {
  rails: [],
  drivers: [
    {
      name: "U1",
      kind: "thevenin",
      node: "u1",
      resistance: 20,
      wave: { kind: "pwl", time: [0, 0.3 * ns], value: [0, 3.3] },
    },
  ],
  sections: [
    { name: "s1", kind: "line", a: "u1", b: "via", impedance: 50, delay: 0.6 * ns },
    { name: "s2", kind: "line", a: "u7", b: "via", impedance: 75, delay: 0.9 * ns },
  ],
  parts: [{ name: "RT", kind: "R", a: "u7", b: "0", value: 1000 }],
  probes: [
    { name: "u1", node: "u1" },
    { name: "via", node: "via" },
    { name: "u7", node: "u7" },
  ],
};
const found = rowFromNetwork(network, "u1", "u7");
if (!found) throw new Error("the row leads from u1 to u7");

describe("drawings of a simulated network", () => {
  it("has along the line, at each node, the voltage of its probe, to 1e-6 V", () => {
    const simulation = simulate(network, { until: 8 * ns, waves: true });
    const waves = wavesOfRow(simulation, found.sections);
    if (!waves) throw new Error("the simulation reports waves");
    for (const time of [0.5, 1.9, 3.35, 6.6]) {
      const places = voltagesAlong(found.row, waves, time * ns);
      const at = (section: number, share: number) =>
        places.find((p) => p.section === section && p.share === share)?.total ?? NaN;
      const probe = (name: string) =>
        voltsAt({ time: simulation.time, volts: simulation.voltage[name] ?? [] }, time * ns) ?? NaN;
      expect(Math.abs(at(0, 0) - probe("u1"))).toBeLessThan(1e-6);
      expect(Math.abs(at(0, 1) - probe("via"))).toBeLessThan(1e-6);
      expect(Math.abs(at(1, 1) - probe("u7"))).toBeLessThan(1e-6);
    }
  });

  it("has rays that start with the divided step and bounce by the reflection coefficients, to 1e-9 (computed)", () => {
    const { rays } = raysFromTable(bounceTable(network, { until: 4 * ns }), found.sections, found.nodes, {
      swing: 3.3,
      start: () => 0,
    });
    const [first, ...rest] = rays.filter((r) => r.amplitude !== 0).sort((a, b) => a.start - b.start);
    expect(first).toMatchObject({ section: 0, outward: true, start: 0 });
    expect(first?.amplitude).toBeCloseTo((3.3 * 50) / 70, 9);
    const back = rest.find((r) => r.section === 0 && !r.outward);
    expect(back?.amplitude).toBeCloseTo(((3.3 * 50) / 70) * 0.2, 9);
    const fromFar = rest.find((r) => r.section === 1 && !r.outward);
    expect((fromFar?.start ?? 0) / ns).toBeCloseTo(1.5, 9);
  });
});
