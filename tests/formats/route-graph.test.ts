import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { buildRoute, readPinName } from "@/lib/formats/route-graph";

const route = (...edges: [string, string, string?][]) =>
  buildRoute(edges.map(([from, to, layer = "TOP"]) => ({ from, to, layer })));

describe("readPinName", () => {
  it.each([
    ["U1.E10", { reference: "U1", pin: "E10" }],
    ["J1.A-1", { reference: "J1", pin: "A-1" }],
    ["CH1.U3.4", { reference: "CH1.U3", pin: "4" }],
    ["via3", null],
    ["via3.2", null],
    ["12.5", null],
    ["node.1", null],
    ["U1.", null],
    [".5", null],
  ])("reads %j as %j", (node, expected) => {
    expect(readPinName(node)).toEqual(expected);
  });

  it("knows a reference without digits from the parts list", () => {
    expect(readPinName("CPU.A1", new Set(["CPU"]))).toEqual({ reference: "CPU", pin: "A1" });
  });
});

describe("buildRoute", () => {
  it("is complete with two pins, one piece and no loop; vias are counted", () => {
    const found = route(["U1.1", "via1"], ["via1", "x", "IN1"], ["x", "U2.1", "TOP"]);
    expect(found).toMatchObject({ complete: true, gaps: [], viaCount: 2 });
    expect(found.pins.map(({ node }) => node)).toEqual(["U1.1", "U2.1"]);
  });

  it("names islands, loops, lone pins and what has none", () => {
    expect(route(["U1.E10", "via1"], ["C10.1", "via2"]).gaps).toEqual([
      { kind: "islands", text: "U1.E10 and C10.1 are not joined: islands {U1.E10, via1} and {C10.1, via2}" },
    ]);
    expect(route(["U1.1", "a"], ["a", "b"], ["b", "U2.1"], ["b", "c"], ["c", "a"]).gaps).toEqual([
      { kind: "loop", text: "A loop: c – a – b – c" },
    ]);
    expect(route(["U1.1", "U2.1"], ["U1.1", "U2.1", "IN1"]).gaps[0]?.text).toContain(
      "side by side between U1.1 and U2.1",
    );
    expect(route(["U1.1", "via1"]).gaps).toEqual([
      { kind: "one pin", text: "U1.1 is the only pin; the route leads no further than via1." },
    ]);
    expect(route(["a", "b"]).gaps.map(({ kind }) => kind)).toEqual(["no pins"]);
    expect(route().gaps.map(({ kind }) => kind)).toEqual(["no sections"]);
  });

  it("keeps its words short for a plane-like net of thousands of sections", () => {
    const found = route(
      ...Array.from({ length: 6000 }, (_, i): [string, string] => [`C${i}.1`, `via${i % 97}`]),
    );
    expect(found.gaps.every(({ text }) => text.length <= 400)).toBe(true);
    expect(found.pins).toHaveLength(6000);
  });

  it("has as many loops as sections − nodes + islands, and every node in one island", () => {
    const node = fc.integer({ min: 0, max: 8 }).map((n) => (n < 4 ? `U${n}.1` : `n${n}`));
    fc.assert(
      fc.property(
        fc.array(
          fc.tuple(node, node).filter(([a, b]) => a !== b),
          { minLength: 1, maxLength: 7 },
        ),
        (edges) => {
          const found = route(...edges.map(([a, b]): [string, string] => [a, b]));
          const nodes = new Set(edges.flat());
          expect(found.islands.flat().sort()).toEqual([...nodes].sort());
          const loops = edges.length - nodes.size + found.islands.length;
          expect(found.gaps.filter(({ kind }) => kind === "loop")).toHaveLength(loops);
          expect(found.complete).toBe(loops === 0 && found.islands.length === 1 && found.pins.length >= 2);
        },
      ),
    );
  });
});
