import { describe, expect, it } from "vitest";
import { solveCrossSection } from "@/lib/si/field";
import { COPPER_CONDUCTIVITY, dispersionNote, lineLoss, surfaceResistance } from "@/lib/si/frequency";
import fem from "../../reference/impedance/fem.json";
import { referenceSection, type ReferenceSectionCase } from "../../support/reference-cross-section";

const FREQUENCIES = Float64Array.of(1e6, 1e8, 1e10, 1e11);

/** The first case of each structure: every kind of section the solver knows. */
const firsts = new Map<string, ReferenceSectionCase>();
for (const entry of fem.cases as unknown as ReferenceSectionCase[]) {
  if (!firsts.has(entry.structure)) firsts.set(entry.structure, entry);
}

describe("loss of every structure in tests/reference/impedance/fem.json (laws, no reference values)", () => {
  for (const [structure, entry] of firsts) {
    const bare = referenceSection(entry);
    if (!bare) continue;
    const section = {
      ...bare,
      layers: bare.layers.map((layer) => ({ ...layer, tanD: 0.02 })),
      ...(bare.mask && { mask: { ...bare.mask, tanD: 0.03 } }),
    };
    it(`${structure}: R rises, L falls, fillings sum to at most 1, R at 10 GHz within 3 % of Rs kR`, () => {
      const params = solveCrossSection(section);
      const loss = lineLoss(section, params, { conductivity: COPPER_CONDUCTIVITY }, FREQUENCIES);
      expect(loss.modes).toHaveLength(section.traces.length);
      for (const mode of loss.modes) {
        for (let k = 1; k < FREQUENCIES.length; k++) {
          expect(mode.resistance[k]!).toBeGreaterThan(mode.resistance[k - 1]!);
          expect(mode.inductance[k]!).toBeLessThan(mode.inductance[k - 1]!);
          expect(mode.total[k]!).toBeGreaterThan(mode.total[k - 1]!);
        }
        const filled = mode.filling.reduce((sum, { factor }) => sum + factor, 0);
        expect(filled).toBeGreaterThan(0.3);
        expect(filled).toBeLessThan(section.upperPlane ? 1.002 : 1);
        if (section.upperPlane) expect(filled).toBeGreaterThan(0.998);
        const rule = surfaceResistance(COPPER_CONDUCTIVITY, 1e10) * mode.resistanceFactor;
        expect(Math.abs(mode.resistance[2]! / rule - 1)).toBeLessThan(0.03);
      }
      const note = dispersionNote(section, params, 1e10);
      expect(Number.isFinite(note.delay) && Number.isFinite(note.impedance)).toBe(true);
      expect(note.onset ?? Infinity).toBeGreaterThan(1e9);
    });
  }
});
