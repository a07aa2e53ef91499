import { describe, expect, it } from "vitest";
import { topologyFromPath } from "@/lib/drawings/topology-from-path";
import { topologyStrip } from "@/lib/drawings/topology-strip.geometry";
import type { ResolvedPath } from "@/lib/si/path/types";

const spread = (nominal: number) => ({ low: nominal * 0.9, nominal, high: nominal * 1.1 });
const driver = {
  name: "buffer",
  vdd: 3.3,
  resistance: { slow: 30, typical: 20, fast: 15 },
  riseTime: { slow: 1e-9, typical: 6e-10, fast: 4e-10 },
  capacitance: null,
  assumed: false,
};
const path: ResolvedPath = {
  id: "p",
  name: "SPI_CLK",
  nets: [],
  className: null,
  classLineageId: null,
  signal: "clock",
  bitTime: null,
  target: null,
  sections: [
    {
      id: "s1",
      net: "SPI_CLK",
      a: "n0",
      b: "n1",
      layer: "L1",
      width: 1e-4,
      length: 0.01,
      impedance: spread(52),
      delayPerMeter: 6e-9,
      method: null,
      missing: null,
    },
    {
      id: "s2",
      net: "SPI_CLK_R",
      a: "n2",
      b: "n3",
      layer: "L3",
      width: 1e-4,
      length: 0.05,
      impedance: null,
      delayPerMeter: null,
      method: null,
      missing: "Dk of L3",
    },
  ],
  parts: [
    { reference: "R1", kind: "R", a: "n1", b: "n2", value: 33, role: "series" },
    { reference: "R2", kind: "R", a: "x", b: "n3", value: 50, role: "termination" },
    { reference: "C2", kind: "C", a: "0", b: "x", value: 1e-10, role: "termination" },
    { reference: "R3", kind: "R", a: "n3", b: "vtt", value: 100, role: "termination" },
  ],
  rails: [{ name: "VTT", node: "vtt", volts: 1.65 }],
  drivers: [{ pin: "U1.3", node: "n0", net: "SPI_CLK", driver, receiver: null }],
  receivers: [{ pin: "U4.6", node: "n3", net: "SPI_CLK_R", driver: null, receiver: null }],
  viaCount: 0,
  neighbours: [],
  geometryKnown: false,
  termination: { scheme: "none", resistance: null, resistanceLow: null, capacitance: null, voltage: null },
  flightTimeMax: null,
  spacing: null,
  missing: [],
  limits: {},
};

describe("topologyFromPath", () => {
  const topology = topologyFromPath(path, "U1.3", new Map([["U4.6", "no data"]]));

  it("follows terminations from the line to their rail, whichever way round a part is", () => {
    expect(topology.terminations.map((t) => [t.node, t.rail, t.parts.map((p) => p.reference)])).toEqual([
      ["n3", "GND", ["R2", "C2"]],
      ["n3", "VTT", ["R3"]],
    ]);
  });

  it("keeps what is not known as no data and tells it so", () => {
    const { description } = topologyStrip(topology, { width: 800 });
    expect(description).toContain(
      "From driver U1.3 (20\u2009\u03a9): section 52\u2009\u03a9, 60\u2009ps on L1, then resistor R1 33\u2009\u03a9, then section no data, no delay on L3, then receiver U4.6, no data.",
    );
    expect(description).toContain(
      "At n3: resistor R2 50\u2009\u03a9, then capacitor C2 100\u2009pF, then to GND.",
    );
  });
});
