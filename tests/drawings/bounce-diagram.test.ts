import { describe, expect, it } from "vitest";
import { alongLine, alongLineWaves } from "@/lib/drawings/along-line.geometry";
import { alongLineDomain, describeAlong, voltagesAlong } from "@/lib/drawings/line-voltages";
import { bounceCursor, bounceDiagram } from "@/lib/drawings/bounce-diagram.geometry";
import { raysFromTable } from "@/lib/drawings/bounce-rays";
import type { LineRow } from "@/lib/drawings/line-row";
import { rowFromNetwork } from "@/lib/drawings/row-from-network";
import { svgString } from "@/lib/drawings/svg-string";
import type { Network } from "@/lib/si/network/types";
import { texts } from "./texts";

const ns = 1e-9;
const row: LineRow = {
  sections: [
    { id: "s1", impedance: 50, delay: 1 * ns, length: 0.15 },
    { id: "s2", impedance: 75, delay: 3 * ns, length: 0.15 },
  ],
  nodes: ["U1", "via", "U7"],
};
// Source matched to 50 Ω, 1 V: half goes out; at the via 25/125 = 0.2 comes back; the open end doubles (computed).
const table = [
  { time: 0, node: "a", section: "s1", end: "a" as const, incident: 0, outgoing: 0.5, voltage: 0.5 },
  { time: 1 * ns, node: "b", section: "s1", end: "b" as const, incident: 0.5, outgoing: 0.1, voltage: 0.6 },
  { time: 1 * ns, node: "b", section: "s2", end: "a" as const, incident: 0, outgoing: 0.6, voltage: 0.6 },
  { time: 4 * ns, node: "c", section: "s2", end: "b" as const, incident: 0.6, outgoing: 0.6, voltage: 1.2 },
];
const { rays, voltages } = raysFromTable(
  table,
  [
    { section: "s1", near: "a" },
    { section: "s2", near: "a" },
  ],
  ["a", "b", "c"],
  { swing: 3.3, start: () => 0 },
);
const options = { width: 800, span: [0, 10 * ns] as const, unit: "mm" as const };

describe("raysFromTable", () => {
  it("scales by the swing and tells outward from inward", () => {
    expect(rays.map((r) => [r.section, r.outward, Math.round(r.amplitude * 1000)])).toEqual([
      [0, true, 1650],
      [0, false, 330],
      [1, true, 1980],
      [1, false, 1980],
    ]);
    expect(voltages.map((v) => [v.node, Math.round(v.volts * 1000)])).toEqual([
      [0, 1650],
      [1, 1980],
      [2, 3960],
    ]);
  });
});

describe("bounceDiagram", () => {
  const drawing = bounceDiagram(row, rays, voltages, { ...options, emphasis: rays[1]?.id });

  it("places nodes in proportion to delay, to 1e-9", () => {
    const [a = 0, b = 0, c = 0] = drawing.row?.nodes ?? [];
    expect((c - b) / (b - a)).toBeCloseTo(3, 9);
  });

  it("labels rays and ends with their voltages", () => {
    expect(texts(drawing)).toEqual(
      expect.arrayContaining([
        "+1.65\u2009V",
        "+330\u2009mV",
        "1.65\u2009V",
        "3.96\u2009V",
        "50\u2009\u03a9, 1.00\u2009ns",
      ]),
    );
  });

  it("tells the harmful bounce first, in words", () => {
    expect(drawing.description).toContain("The harmful bounce: +330\u2009mV from via at 1.00\u2009ns to U1.");
  });

  it("puts a front where each wave is at the cursor's time", () => {
    const fronts = bounceCursor(drawing, row, 2.5 * ns).filter((m) => m.kind === "circle");
    expect(fronts).toHaveLength(1);
    const [, b = 0, c = 0] = drawing.row?.nodes ?? [];
    expect(fronts[0]?.kind === "circle" && fronts[0].cx).toBeCloseTo((b + c) / 2, 6);
  });

  it("counts the rays it leaves out", () => {
    const many = Array.from({ length: 900 }, (_, i) => ({
      id: `${i}`,
      section: 0,
      outward: i % 2 === 0,
      start: (i * ns) / 100,
      amplitude: 1 / (i + 1),
    }));
    const dense = bounceDiagram(row, many, [], options);
    expect(dense.drawn).toHaveLength(400);
    expect(dense.description).toContain("500 weaker waves are not drawn");
  });

  it.each([
    ["no ray", row, []],
    ["a section without a delay", { ...row, sections: [{ id: "x", impedance: null, delay: 0 }] }, rays],
    ["a row of nothing", { sections: [], nodes: [] }, rays],
  ])("says why there is nothing to draw: %s", (_, line, some) => {
    const none = bounceDiagram(line, some, [], options);
    expect(none.empty).toMatch(/^No /);
    expect(svgString(none)).not.toMatch(/NaN|Infinity/);
  });
});

describe("voltagesAlong", () => {
  const step = (at: number, volts: number) => ({ time: [0, at, at, 20 * ns], volts: [0, 0, volts, volts] });
  const waves = [
    { outward: step(0, 1.65), inward: step(1 * ns, 0.33) },
    { outward: step(1 * ns, 1.98), inward: step(4 * ns, 1.98) },
  ];

  it("is what entered each section a share of its delay ago", () => {
    const places = voltagesAlong(row, waves, 2.5 * ns);
    const at = (section: number, share: number) =>
      places.find((p) => p.section === section && p.share === share)?.total;
    expect(at(0, 0.5)).toBeCloseTo(1.98, 12);
    expect(at(1, 0.25)).toBeCloseTo(1.98, 12);
    expect(at(1, 0.75)).toBe(0);
  });

  it("is continuous where sections meet, to 1e-12 V", () => {
    for (const time of [0.5, 1.5, 3.7, 5, 6.9]) {
      const places = voltagesAlong(row, waves, time * ns);
      const end = places.find((p) => p.section === 0 && p.share === 1)?.total ?? NaN;
      const start = places.find((p) => p.section === 1 && p.share === 0)?.total ?? NaN;
      expect(Math.abs(end - start)).toBeLessThan(1e-12);
    }
  });

  it("draws every wave inside an axis that holds for all times", () => {
    const volts = alongLineDomain(row, waves, [0, 10 * ns]);
    expect(volts[1]).toBeGreaterThan(3.96);
    const drawing = alongLine(row, { width: 700, unit: "mm", volts, by: "length" });
    expect(drawing.row?.by).toBe("length");
    expect(texts({ marks: alongLineWaves(drawing, row, waves, 5 * ns) })).toEqual([
      "incident",
      "reflected",
      "total",
    ]);
    expect(describeAlong(row, waves, 9 * ns)).toContain(
      "U7 3.96\u2009V (incident 1.98\u2009V, reflected 1.98\u2009V)",
    );
  });
});

describe("rowFromNetwork", () => {
  const network: Network = {
    rails: [{ name: "VTT", node: "vtt", volts: 0.75 }],
    drivers: [],
    sections: [
      { name: "L2", kind: "line", a: "far", b: "mid", impedance: 60, delay: 2 * ns },
      { name: "L1", kind: "line", a: "r", b: "mid", impedance: 50, delay: 1 * ns },
    ],
    parts: [
      { name: "R1", kind: "R", a: "drv", b: "r", value: 33 },
      { name: "RT", kind: "R", a: "mid", b: "vtt", value: 50 },
    ],
    probes: [],
  };

  it("runs from the driver through series parts to the receiver and knows each section's near end", () => {
    const found = rowFromNetwork(network, "drv", "far", {
      node: new Map([
        ["drv", "U1.1"],
        ["far", "U7.4"],
      ]),
    });
    expect(found?.nodes).toEqual(["r", "mid", "far"]);
    expect(found?.sections).toEqual([
      { section: "L1", near: "a" },
      { section: "L2", near: "b" },
    ]);
    expect(found?.row.nodes).toEqual(["U1.1", "", "U7.4"]);
  });

  it("does not lead through a rail, and is null where nothing leads", () => {
    expect(rowFromNetwork(network, "drv", "vtt")).toBeNull();
    expect(rowFromNetwork(network, "drv", "nowhere")).toBeNull();
  });
});
