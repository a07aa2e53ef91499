import { describe, expect, it } from "vitest";
import { buildRoute } from "@/lib/formats/route-graph";
import { missingKind } from "@/lib/resolve/missing-kind";

/** The sentences of a route's gaps, as they reach the run. */
function causeOf(...edges: [string, string][]): string {
  return buildRoute(edges.map(([from, to]) => ({ from, to, layer: "TOP" })))
    .gaps.map(({ text }) => text)
    .join(" ");
}

describe("the kind of a missing input", () => {
  it("tells islands, loops, lone pins and what was not routed apart", () => {
    const of = (cause: string) => missingKind("route of NET", cause);
    expect(of(causeOf(["U1.1", "a"], ["U2.1", "b"]))).toBe("Route in islands");
    expect(of(causeOf(["U1.1", "a"], ["a", "b"], ["b", "U2.1"], ["b", "c"], ["c", "a"]))).toBe(
      "Route with a loop",
    );
    expect(of(causeOf(["U1.1", "a"]))).toBe("Route with one pin");
    expect(of(causeOf(["a", "b"]))).toBe("Route without pins");
    expect(of(causeOf())).toBe("Route not given");
    expect(of("something else")).toBe("Route not complete");
  });

  it("is the thing apart from whose it is for all else", () => {
    expect(missingKind("driver model of U1.4 of NET", null)).toBe("Driver model");
    expect(missingKind("neighbour list", null)).toBe("Neighbour list");
    expect(missingKind("simulation of coupled pairs", null)).toBe("Simulation of coupled pairs");
  });
});
