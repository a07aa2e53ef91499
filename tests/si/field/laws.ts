import fc from "fast-check";
import { expect } from "vitest";
import type { CrossSection, LineParameters } from "@/lib/si/cross-section";
import { solveCrossSection } from "@/lib/si/field";
import { randomSection, type Kind, type RandomSection } from "./random-sections";

/** Laws that hold for every cross-section in range; `runs` of them a law, from a fixed seed. */
export interface Law {
  name: string;
  check: (runs: number) => void;
}

const seed = 20261;
const edgePairs: Kind[] = ["stripline pair"];
const singles: Kind[] = [
  "microstrip",
  "masked",
  "embedded",
  "stripline",
  "two-dielectric stripline",
  "three-dielectric stripline",
  "coplanar",
  "masked coplanar",
  "strip without thickness",
];

function forAll(runs: number, kinds: Kind[] | undefined, law: (item: RandomSection) => void): void {
  fc.assert(fc.property(randomSection(kinds), law), { seed, numRuns: runs });
}

const largestPermittivity = ({ layers, mask }: CrossSection) =>
  Math.max(...layers.map((l) => l.er), mask?.er ?? 1);

function impedances(line: LineParameters): number[] {
  return line.single ? [line.single.impedance] : [line.pair!.differential, line.pair!.common];
}

function widened(section: CrossSection, factor: number): CrossSection {
  return {
    ...section,
    traces: section.traces.map((t) => ({
      ...t,
      widthBottom: t.widthBottom * factor,
      widthTop: t.widthTop + t.widthBottom * (factor - 1),
    })),
  };
}

/** The dielectric next to the lower plane grows by so much, everything above moves up. */
function raised(section: CrossSection, by: number): CrossSection {
  return {
    ...section,
    layers: section.layers.map((l, i) => (i === 0 ? { ...l, thickness: l.thickness + by } : l)),
    traces: section.traces.map((t) => ({ ...t, y: t.y + by })),
  };
}

export const laws: Law[] = [
  {
    name: "C and C0 are symmetric positive definite, off-diagonals not above zero",
    check: (runs) =>
      forAll(runs, undefined, ({ section }) => {
        const line = solveCrossSection(section);
        for (const c of [line.capacitance, line.airCapacitance]) {
          expect(c[0]![0]).toBeGreaterThan(0);
          if (c.length < 2) continue;
          expect(c[0]![1]).toBe(c[1]![0]);
          expect(c[0]![1]).toBeLessThanOrEqual(line.errorEstimate * Math.sqrt(c[0]![0]! * c[1]![1]!));
          expect(c[0]![0]! * c[1]![1]! - c[0]![1]! ** 2).toBeGreaterThan(0);
        }
      }),
  },
  {
    name: "|C12 − C21| ≤ errorEstimate·C11 before both become their mean",
    check: (runs) =>
      forAll(
        runs,
        ["unequal pair", "unequal masked pair", "broadside pair", "offset broadside pair"],
        ({ section }) => {
          const line = solveCrossSection(section);
          expect(line.reciprocityGap).toBeLessThanOrEqual(line.errorEstimate);
          expect(line.reciprocityGap).toBeLessThan(3e-3);
        },
      ),
  },
  {
    name: "effective permittivities lie between 1 and the largest Dk, to the error estimate",
    check: (runs) =>
      forAll(runs, undefined, ({ section }) => {
        const line = solveCrossSection(section);
        const most = largestPermittivity(section);
        for (const mode of line.single ? [line.single] : line.pair!.modes) {
          expect(mode.effectivePermittivity).toBeGreaterThanOrEqual(1 - line.errorEstimate);
          expect(mode.effectivePermittivity).toBeLessThanOrEqual(most * (1 + line.errorEstimate));
        }
      }),
  },
  {
    name: "impedance falls when the width grows by 2 %",
    check: (runs) =>
      forAll(runs, singles, ({ section }) => {
        const [before] = impedances(solveCrossSection(section));
        const [after] = impedances(solveCrossSection(widened(section, 1.02)));
        expect(after).toBeLessThan(before!);
      }),
  },
  {
    name: "impedance rises when the trace rises over an outer layer's plane by 2 %",
    check: (runs) =>
      forAll(runs, ["microstrip", "masked"], ({ section }) => {
        // one dielectric: a second one that thickens elsewhere may lower it
        const plain = {
          ...section,
          layers: section.layers.map((l) => ({ ...l, er: section.layers[0]!.er })),
        };
        const height = plain.layers.reduce((sum, l) => sum + l.thickness, 0);
        const [before] = impedances(solveCrossSection(plain));
        const [after] = impedances(solveCrossSection(raised(plain, 0.02 * height)));
        expect(after).toBeGreaterThan(before!);
      }),
  },
  {
    name: "odd-mode impedance lies below even-mode for edge pairs in one dielectric",
    check: (runs) =>
      forAll(runs, edgePairs, ({ section }) => {
        const { pair } = solveCrossSection(section);
        const slack = 1e-6 * pair!.even!.impedance;
        expect(pair!.odd!.impedance).toBeLessThan(pair!.even!.impedance + slack);
      }),
  },
  {
    name: "a pair far apart is two single traces, to 0.2 %",
    check: (runs) =>
      forAll(runs, ["stripline pair", "three-dielectric stripline pair"], ({ section }) => {
        const [left] = section.traces;
        const height = section.layers.reduce((sum, l) => sum + l.thickness, 0);
        const x = (left!.widthBottom + left!.widthTop) / 2 + 10 * height; // slow where a high Dk lies between low ones
        const apart = {
          ...section,
          traces: [
            { ...left!, x: -x / 2 },
            { ...left!, x: x / 2 },
          ],
        };
        const alone = solveCrossSection({ ...section, traces: [left!] }).single!.impedance;
        const { pair } = solveCrossSection(apart);
        expect(Math.abs(pair!.differential / (2 * alone) - 1)).toBeLessThan(2e-3);
        expect(Math.abs((2 * pair!.common) / alone - 1)).toBeLessThan(2e-3);
      }),
  },
];

/** Share of random sections whose error, against the reference accuracy, lies below the estimate. */
export function shareWithinEstimate(
  runs: number,
  accuracy: "live" | "standard",
): { within: number; worst: number } {
  let within = 0;
  let worst = 0;
  forAll(runs, undefined, ({ section }) => {
    const line = solveCrossSection(section, { accuracy });
    const better = solveCrossSection(section, { accuracy: "reference" });
    const pairs = valuesOf(line).map((value, i) => Math.abs(value / valuesOf(better)[i]! - 1));
    const error = Math.max(...pairs);
    worst = Math.max(worst, error);
    if (error <= line.errorEstimate) within += 1;
  });
  return { within: within / runs, worst };
}

function valuesOf(line: LineParameters): number[] {
  const modes = line.single ? [line.single] : line.pair!.modes;
  return [
    line.capacitance[0]![0]!,
    line.airCapacitance[0]![0]!,
    ...impedances(line),
    ...modes.flatMap((mode) => [mode.impedance, mode.effectivePermittivity]),
  ];
}
