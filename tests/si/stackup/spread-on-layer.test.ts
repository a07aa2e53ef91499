import { describe, expect, it } from "vitest";
import {
  buildCrossSection,
  DomainError,
  solveCrossSection,
  spreadOnLayer,
  yieldOf,
  type Process,
} from "@/lib/si";
import { sectionTolerances } from "@/lib/si/stackup/spread-on-layer";
import { sixLayers } from "../../support/stackups";

const process: Process = {
  width: 0.1,
  copper: 0.1,
  dielectric: 0.1,
  dk: 0.05,
  mask: 0.3,
  distribution: "normal",
  minWidth: null,
  minGap: null,
};
const outer = 1;

describe("the spread of a line on a layer", () => {
  const spread = spreadOnLayer(sixLayers(), outer, { width: 0.2e-3 }, process);

  it("has the field solution as its nominal value, to 1e-12", () => {
    const { section } = buildCrossSection(sixLayers(), outer, { width: 0.2e-3 });
    const { single } = solveCrossSection(section);
    expect(spread.nominal / (single?.impedance ?? 0)).toBeCloseTo(1, 12);
  });

  it("holds 99 % between low and high, and everything between its corners", () => {
    const within = spread.values.filter((value) => value >= spread.low && value <= spread.high).length;
    expect(within / spread.values.length).toBeCloseTo(0.99, 2);
    expect(spread.corners.low).toBeLessThan(spread.low);
    expect(spread.corners.high).toBeGreaterThan(spread.high);
  });

  it("names its causes as the board names its layers, the weightiest first, shares summing to 1", () => {
    const names = spread.sensitivities.map(({ name }) => name);
    expect(names).toContain("width");
    expect(names.some((name) => name.startsWith("thickness of "))).toBe(true);
    const shares = spread.sensitivities.map(({ share }) => share);
    expect(shares.reduce((sum, share) => sum + share, 0)).toBeCloseTo(1, 9);
    expect(shares).toEqual(shares.toSorted((a, b) => b - a));
  });

  it("yields more within a wider tolerance, and nothing about a target far away", () => {
    const { nominal } = spread;
    const yields = [0.01, 0.03, 0.05, 0.1, 0.3].map((share) => yieldOf(spread, nominal, share));
    expect(yields).toEqual(yields.toSorted((a, b) => a - b));
    expect(yields.at(-1)).toBe(1);
    expect(yieldOf(spread, 2 * nominal, 0.1)).toBe(0);
  });

  it("is repeated to the last digit, and narrower for a tighter process", () => {
    expect(spreadOnLayer(sixLayers(), outer, { width: 0.2e-3 }, process).values).toEqual(spread.values);
    const tight = spreadOnLayer(
      sixLayers(),
      outer,
      { width: 0.2e-3 },
      { ...process, width: 0.02, dielectric: 0.03 },
    );
    expect(tight.sigma).toBeLessThan(0.6 * spread.sigma);
  });

  it("takes a layer's own tolerance before the process's", () => {
    const stackup = sixLayers();
    const built = buildCrossSection(stackup, outer, { width: 0.2e-3 });
    const source = built.sources[0] ?? -1;
    stackup.layers[source]!.tolerance = 0.2;
    const { layers } = sectionTolerances(stackup, outer, built, process);
    expect(layers?.[0]?.thickness).toEqual({
      absolute: 0.2 * (stackup.layers[source]!.thickness ?? 0),
      distribution: "normal",
    });
  });

  it("refuses a process that cannot be, by its field's name", () => {
    const run = () => spreadOnLayer(sixLayers(), outer, { width: 0.2e-3 }, { ...process, dk: -0.1 });
    expect(run).toThrow(DomainError);
    expect(run).toThrow("dk");
  });
});
