import { describe, expect, it } from "vitest";
import { lineConflicts } from "@/lib/resolve/line-conflicts";
import { q } from "../support/revision-inputs";

type Line = Parameters<typeof lineConflicts>[0][number];
const L1 = "0190a000-0000-7000-8000-000000000001";
const L3 = "0190a000-0000-7000-8000-000000000003";
const layers = [
  { lineageId: L1, name: "L1 Top" },
  { lineageId: L3, name: "L3" },
];

function line(name: string, width: string, asked: string, over: { layer?: string; gap?: string } = {}): Line {
  const [ohms = "", tolerancePercent = ""] = asked.split(" ");
  return {
    name,
    kind: over.gap ? "differential" : "single",
    targetImpedance: { value: ohms, unit: "Ω" },
    tolerancePercent,
    layers: [
      { layerLineageId: over.layer ?? L1, width: q(width), gap: over.gap === undefined ? null : q(over.gap) },
    ],
  };
}

describe("lineConflicts", () => {
  it("names two lines of one layer and width with different tolerances", () => {
    expect(lineConflicts([line("Main", "0.18 mm", "50 10"), line("Fast", "180 µm", "50 1")], layers)).toEqual(
      ["0.18 mm on L1 Top is to be 50 Ω ±1 % for Fast and 50 Ω ±10 % for Main"],
    );
  });

  it("names two pairs alike in width and gap with different targets", () => {
    const pairs = [
      line("USB", "0.12 mm", "90 10", { gap: "0.15 mm" }),
      line("LVDS", "0.12 mm", "100 10", { gap: "0.15 mm" }),
    ];
    expect(lineConflicts(pairs, layers)).toHaveLength(1);
  });

  it.each([
    ["the same target and tolerance", line("Fast", "0.18 mm", "50 10")],
    ["a width 2.5 µm away", line("Fast", "0.1825 mm", "50 1")],
    ["another layer", line("Fast", "0.18 mm", "50 1", { layer: L3 })],
    ["a pair beside a single line", line("Fast", "0.18 mm", "90 10", { gap: "0.2 mm" })],
  ])("has nothing against %s", (_, other) => {
    expect(lineConflicts([line("Main", "0.18 mm", "50 10"), other], layers)).toEqual([]);
  });

  it("takes widths less than 2.5 µm apart for one", () => {
    const close = [line("Main", "0.18 mm", "50 10"), line("Fast", "0.182 mm", "60 10")];
    expect(lineConflicts(close, layers)).toHaveLength(1);
  });
});
