import { describe, expect, it } from "vitest";
import type { CrossSection } from "@/lib/si/cross-section";
import { solveCrossSection } from "@/lib/si/field";
import { dispersionNote, kirschningJansenDispersion } from "@/lib/si/frequency";

const MM = 1e-3;

function surface(scale: number, traces = 1): CrossSection {
  const width = 0.38 * MM * scale;
  const trace = { y: 0.2 * MM * scale, thickness: 1e-6 * scale, widthBottom: width, widthTop: width };
  return {
    layers: [{ thickness: 0.2 * MM * scale, er: 3.66 }],
    upperPlane: false,
    traces: traces === 1 ? [{ ...trace, x: 0 }] : [-0.3, 0.3].map((x) => ({ ...trace, x: x * MM * scale })),
  };
}
const note = (section: CrossSection, f: number) => dispersionNote(section, solveCrossSection(section), f);

describe("dispersion note", () => {
  it("on a thin strip is Kirschning–Jansen 1982: 1 % of delay where the formula has it, within 5 % in frequency", () => {
    const { onset, words, method } = note(surface(1), 1e9);
    expect(method).toBe("Kirschning–Jansen 1982");
    const at = (f: number) => kirschningJansenDispersion(0.38 * MM, 0.2 * MM, 3.66, f);
    const rest = at(0);
    const there = at(onset ?? 0);
    const off = Math.max(
      Math.sqrt(there.effectivePermittivity / rest.effectivePermittivity) - 1,
      Math.abs(there.impedance / rest.impedance - 1),
    );
    expect(off).toBeGreaterThan(0.0095);
    expect(off).toBeLessThan(0.0105);
    expect(words).toMatch(/^Quasi-static values hold within 1 % up to \d/);
  });

  it("scales: a section twice as large disperses at half the frequency", () => {
    expect(note(surface(2), 1e9).onset! / note(surface(1), 1e9).onset!).toBeCloseTo(0.5, 2);
  });

  it("beyond its onset says by how much, and warns of the next mode", () => {
    const far = note(surface(4), 60e9);
    expect(far.delay).toBeGreaterThan(0.01);
    expect(far.words).toMatch(/At 60 GHz the delay is \+\d+\.\d % and the impedance [+−]\d+\.\d % off\./);
    expect(far.words).toContain("a second mode can travel");
  });

  it("of a pair is Kirschning–Jansen 1984 and comes at a frequency of the same order", () => {
    const pair = note(surface(1, 2), 1e9);
    expect(pair.method).toBe("Kirschning–Jansen 1984");
    expect(pair.onset! / note(surface(1), 1e9).onset!).toBeGreaterThan(0.2);
    expect(pair.onset! / note(surface(1), 1e9).onset!).toBeLessThan(3);
  });

  it("between planes there is none in one dielectric, and late in two", () => {
    const between = (upper: number): CrossSection => ({
      layers: [
        { thickness: 0.2 * MM, er: 4.2 },
        { thickness: 0.2 * MM, er: upper },
      ],
      upperPlane: true,
      traces: [{ x: 0, y: 0.2 * MM, thickness: 18e-6, widthBottom: 0.15 * MM, widthTop: 0.15 * MM }],
    });
    expect(note(between(4.2), 1e10)).toMatchObject({ onset: null, delay: 0, impedance: 0 });
    expect(note(between(3.6), 1e10).onset ?? Infinity).toBeGreaterThan(20e9);
    expect(() => note(between(4), -1)).toThrow(expect.objectContaining({ field: "frequency" }));
  });
});
