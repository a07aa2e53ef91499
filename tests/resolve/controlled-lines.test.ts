import { describe, expect, it } from "vitest";
import { controlledLines } from "@/lib/resolve/controlled-lines";
import { netClass, q, revisionInputs } from "../support/revision-inputs";

describe("the lines that classes control", () => {
  it("are one for each class with a target and each of its layers with a width", () => {
    const layers = [
      { layerLineageId: "layer-Top", width: q("0.28 mm"), gap: null },
      { layerLineageId: "layer-Bottom", width: null, gap: null },
    ];
    const lines = [
      ...controlledLines(
        revisionInputs([], {
          classes: [netClass("Data", { layers }), netClass("Slow", { layers, targetImpedance: null })],
        }),
      ),
    ];
    expect(lines.map((line) => line.id)).toEqual(["line class-Data layer-Top"]);
    expect(lines[0]).toMatchObject({ layer: "Top", target: 50, width: 0.28e-3, missing: null });
    expect(lines[0]?.nominal).toBeGreaterThan(40);
    expect(lines[0]?.nominal).toBeLessThan(60);
    expect(lines[0]?.closedForm?.ohms).toBeGreaterThan(40);
    const spread = lines[0]?.spread;
    expect(spread?.low).toBeLessThan(lines[0]?.nominal ?? 0);
    expect(spread?.high).toBeGreaterThan(lines[0]?.nominal ?? 0);
    expect(spread?.yield).toBeGreaterThan(0);
    expect(spread?.yield).toBeLessThanOrEqual(1);
  });
  it("of a pair have their differential impedance, and ask for the gap", () => {
    const pair = (gap: string | null) =>
      netClass("Pair", {
        kind: "differential",
        targetImpedance: q("100 Ω"),
        layers: [{ layerLineageId: "layer-Top", width: q("0.2 mm"), gap: gap === null ? null : q(gap) }],
      });
    const [told] = controlledLines(revisionInputs([], { classes: [pair("0.2 mm")] }));
    expect(told?.nominal).toBeGreaterThan(80);
    const [untold] = controlledLines(revisionInputs([], { classes: [pair(null)] }));
    expect(untold).toMatchObject({ nominal: null, missing: { input: "gap of Pair on Top" } });
  });
});
