import { describe, expect, it } from "vitest";
import { type TrialChange, trialSides, trialStackup } from "@/lib/resolve/trial-stackup";
import { DomainError } from "@/lib/si/errors";
import { buildCrossSection, isSignal, stackupFromTyped, stackupTemplates } from "@/lib/si/stackup";

const NOTHING: TrialChange = { below: null, above: null, dkBelow: null, dkAbove: null, mask: null };
const shape = { width: 0.12e-3 };

/** Every signal layer of every template. */
const places = stackupTemplates.flatMap(({ copperLayers, layers }) => {
  const stackup = stackupFromTyped(layers);
  return stackup.layers.flatMap((layer, index) =>
    isSignal(layer) ? [{ name: `${copperLayers} layers, ${layer.name}`, stackup, index }] : [],
  );
});

function heights({ stackup, index }: (typeof places)[number]) {
  const { section } = buildCrossSection(stackup, index, shape);
  const trace = section.traces[0];
  if (!trace) throw new Error("A section without a trace.");
  const top = section.layers.reduce((sum, layer) => sum + layer.thickness, 0);
  return { below: trace.y, above: section.upperPlane ? top - trace.y - trace.thickness : null, section };
}

describe("a stackup on trial", () => {
  it("tells the heights that the cross-section has, to 1 pm, on every signal layer of every template", () => {
    for (const place of places) {
      const { below, above } = heights(place);
      const sides = trialSides(place.stackup, place.index);
      expect(sides.below?.height, place.name).toBeCloseTo(below, 12);
      if (above === null) expect(sides.above, place.name).toBeNull();
      else expect(sides.above?.height, place.name).toBeCloseTo(above, 12);
    }
  });

  it("moves one height and leaves the other, width and copper, to 1 pm", () => {
    for (const place of places) {
      const before = heights(place);
      const below = before.below * 1.3;
      const after = heights({
        ...place,
        stackup: trialStackup(place.stackup, place.index, { ...NOTHING, below }),
      });
      expect(after.below, place.name).toBeCloseTo(below, 12);
      if (before.above !== null) expect(after.above, place.name).toBeCloseTo(before.above, 12);
      expect(after.section.traces[0]?.thickness).toBe(before.section.traces[0]?.thickness);
    }
  });

  it("puts the Dk that is tried in place of the one there, the series of a side to 1e-12", () => {
    for (const { stackup, index, name } of places) {
      const tried = trialStackup(stackup, index, { ...NOTHING, dkBelow: 3.1 });
      expect(trialSides(tried, index).below?.dk, name).toBeCloseTo(3.1, 12);
    }
  });

  it("changes the mask over the trace, and beside it in proportion", () => {
    const outer = places.find(({ stackup, index }) => trialSides(stackup, index).mask !== null);
    if (!outer) throw new Error("No template has a mask.");
    const before = heights(outer).section.mask;
    const tried = trialStackup(outer.stackup, outer.index, { ...NOTHING, mask: 18e-6 });
    const after = heights({ ...outer, stackup: tried }).section.mask;
    expect(after?.overTrace).toBeCloseTo(18e-6, 12);
    expect((after?.overLaminate ?? 0) / (before?.overLaminate ?? 1)).toBeCloseTo(
      18e-6 / (before?.overTrace ?? 1),
      9,
    );
  });

  it("is the stackup itself where nothing is tried, and refuses a height that its copper does not fit", () => {
    const place = places.find(({ stackup, index }) => (trialSides(stackup, index).below?.fixed ?? 0) > 0);
    const [any] = places;
    if (!any) throw new Error("No template.");
    expect(trialStackup(any.stackup, any.index, NOTHING)).toBe(any.stackup);
    if (place)
      expect(() => trialStackup(place.stackup, place.index, { ...NOTHING, below: 1e-6 })).toThrow(
        DomainError,
      );
  });
});
