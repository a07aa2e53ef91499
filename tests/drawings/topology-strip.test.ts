import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { svgString } from "@/lib/drawings/svg-string";
import { textWidth } from "@/lib/drawings/text-width";
import type { StripEdge, Topology } from "@/lib/drawings/topology-graph";
import { LEAST_SECTION, layTopology } from "@/lib/drawings/topology-layout";
import { topologyStrip } from "@/lib/drawings/topology-strip.geometry";
import { textMarks, texts } from "./texts";

const ps = 1e-12;
const line = (
  id: string,
  a: string,
  b: string,
  delay: number | null,
  impedance: number | null = 50,
): StripEdge => ({
  kind: "line",
  id,
  a,
  b,
  impedance,
  delay: delay === null ? null : delay * ps,
});
const tee: Topology = {
  driver: "U1.1",
  edges: [
    line("s1", "n0", "n1", 100),
    { kind: "part", id: "R1", a: "n1", b: "n2", part: "R", value: 33, reference: "R1" },
    line("s2", "n2", "n3", 300),
    line("s3", "n3", "n4", 200),
    line("stub", "n3", "n5", 50),
  ],
  pins: [
    { pin: "U1.1", node: "n0", role: "driver", detail: "18 Ω" },
    { pin: "U2.7", node: "n4", role: "receiver", verdict: "fail" },
    { pin: "U3.9", node: "n5", role: "receiver", verdict: "pass" },
  ],
  terminations: [
    {
      id: "t",
      node: "n4",
      parts: [
        { part: "R", value: 50, reference: "R2" },
        { part: "C", value: 1e-10, reference: "C2" },
      ],
      rail: "GND",
    },
  ],
};
const forty: Topology = {
  driver: "A",
  edges: Array.from({ length: 40 }, (_, i) => line(`s${i}`, `n${i}`, `n${i + 1}`, 2 + ((i * 37) % 90))),
  pins: [
    { pin: "A", node: "n0", role: "driver" },
    { pin: "Z", node: "n40", role: "receiver", verdict: "near" },
  ],
  terminations: [],
};

/** No two level labels of a drawing share a place. */
function overlaps(topology: Topology, width: number): string[] {
  const boxes = textMarks(topologyStrip(topology, { width })).map((t) => {
    const words = t.spans.map((s) => s.text).join("");
    const w = textWidth(words, t.size) * 0.95;
    const from = t.anchor === "middle" ? t.x - w / 2 : t.anchor === "end" ? t.x - w : t.x;
    return { words, from, to: from + w, top: t.y - 9, bottom: t.y + 2 };
  });
  return boxes.flatMap((a, i) =>
    boxes
      .slice(i + 1)
      .flatMap((b) =>
        a.from < b.to && b.from < a.to && a.top < b.bottom && b.top < a.bottom
          ? [`${a.words} / ${b.words}`]
          : [],
      ),
  );
}

describe("topologyStrip", () => {
  it.each([700, 900, 1400])("draws sections in proportion to their delay at %i px, to 1e-6", (width) => {
    const layout = layTopology(tee, width);
    for (const { edge, x1, x2 } of layout.strands.flatMap((s) => s.edges))
      if (edge.kind === "line" && (edge.delay ?? 0) * layout.scale >= LEAST_SECTION)
        expect((x2 - x1) / ((edge.delay ?? 1) * layout.scale)).toBeCloseTo(1, 6);
    expect(layout.right).toBeLessThanOrEqual(width);
  });

  it("labels every section, part, pin and termination with value and unit", () => {
    const words = texts(topologyStrip(tee, { width: 1000 }));
    expect(words).toEqual(
      expect.arrayContaining([
        "50\u2009\u03a9",
        "300\u2009ps",
        "R1",
        "33\u2009\u03a9",
        "U2.7",
        "fail",
        "U3.9",
        "pass",
        "R2",
        "C2",
        "100\u2009pF",
        "GND",
      ]),
    );
  });

  it("tells the path in order, then its branches", () => {
    const { description } = topologyStrip(tee, { width: 900 });
    expect(description).toMatch(
      /^From driver U1\.1 \(18 Ω\): section 50.*, then resistor R1 33.*, then receiver U2\.7, fail\./,
    );
    expect(description).toContain("At n3: section 50\u2009\u03a9, 50\u2009ps, then receiver U3.9, pass.");
  });

  it.each([
    ["a tee", tee, 900],
    ["forty sections", forty, 900],
    ["forty sections on a narrow sheet", forty, 480],
  ])("keeps labels apart: %s", (_, topology, width) => {
    expect(overlaps(topology, width)).toEqual([]);
  });

  it("draws forty sections at least as long as can be seen, and says which are not to scale", () => {
    const { layout, description } = topologyStrip(forty, { width: 900 });
    const edges = layout?.strands.flatMap((s) => s.edges) ?? [];
    expect(edges).toHaveLength(40);
    expect(edges.every((e) => e.x2 - e.x1 >= LEAST_SECTION)).toBe(true);
    expect(description).toContain("receiver Z, near");
  });

  it("marks what closes a loop, and counts what the driver does not reach", () => {
    const loop: Topology = {
      ...tee,
      edges: [...tee.edges, line("loop", "n5", "n2", 80), line("far", "x", "y", 10)],
    };
    const words = texts(topologyStrip(loop, { width: 900 })).join(" ");
    expect(words).toMatch(/joins n\d/);
    expect(words).toContain("not reached from the driver");
  });

  it("draws a section without data dashed, at a length of its own, and says no data", () => {
    const open: Topology = { ...tee, edges: [line("s1", "n0", "n4", null, null)] };
    const drawing = topologyStrip(open, { width: 600 });
    expect(texts(drawing)).toEqual(expect.arrayContaining(["no data", "no delay"]));
    expect(svgString(drawing)).not.toMatch(/NaN|Infinity/);
  });

  it("says that a path without sections has none", () => {
    expect(topologyStrip({ driver: "", edges: [], pins: [], terminations: [] }, { width: 600 }).empty).toBe(
      "This path has no sections yet.",
    );
  });

  it("draws any graph: every edge once, no number that is none (property)", () => {
    const graph = fc.array(
      fc.record({
        a: fc.nat(12),
        b: fc.nat(12),
        delay: fc.option(fc.double({ min: 0.1, max: 900, noNaN: true })),
      }),
      { minLength: 1, maxLength: 30 },
    );
    fc.assert(
      fc.property(graph, (links) => {
        const edges = links.map((l, i) => line(`e${i}`, `n${l.a}`, `n${l.b}`, l.delay));
        const topology: Topology = {
          driver: "D",
          edges,
          pins: [{ pin: "D", node: `n${links[0]?.a}`, role: "driver" }],
          terminations: [],
        };
        const { layout } = topologyStrip(topology, { width: 800 });
        const drawn = layout?.strands.flatMap((s) => s.edges.map((e) => e.edge.id)) ?? [];
        expect(new Set(drawn).size).toBe(drawn.length);
        expect(drawn.length + (layout?.apart ?? 0)).toBe(edges.length);
        expect(svgString(topologyStrip(topology, { width: 800 }))).not.toMatch(/NaN|Infinity/);
      }),
      { numRuns: 60 },
    );
  });
});
