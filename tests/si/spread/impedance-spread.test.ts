import { describe, expect, it } from "vitest";
import { closedForms, type CrossSection, type LineParameters } from "@/lib/si/cross-section";
import { solveCrossSection } from "@/lib/si/field";
import { impedanceSpread, predictedYield, type SectionTolerances } from "@/lib/si/spread";
import { sectionMover } from "@/lib/si/spread/perturb";
import { impedancesOf } from "@/lib/si/spread/quantities";
import { drawSamples } from "@/lib/si/spread/samples";
import { fitSurrogate } from "@/lib/si/spread/surrogate";
import { factorsOf } from "@/lib/si/spread/tolerances";

const MM = 1e-3;
const UM = 1e-6;

const masked: CrossSection = {
  layers: [{ thickness: 0.1 * MM, er: 4.3 }],
  upperPlane: false,
  traces: [{ x: 0, y: 0.1 * MM, thickness: 35 * UM, widthBottom: 180 * UM, widthTop: 162.5 * UM }],
  mask: { overLaminate: 20 * UM, overTrace: 20 * UM, side: 20 * UM, er: 3.5 },
};
const pair: CrossSection = {
  layers: [
    { thickness: 0.1 * MM, er: 4.4 },
    { thickness: 0.14 * MM, er: 3.7 },
  ],
  upperPlane: true,
  traces: [-110, 110].map((x) => ({
    x: x * UM,
    y: 0.1 * MM,
    thickness: 17.5 * UM,
    widthBottom: 100 * UM,
    widthTop: 91 * UM,
  })),
};
const everything = (section: CrossSection): SectionTolerances => ({
  width: { absolute: 15 * UM },
  slope: { absolute: 4 * UM },
  copper: { relative: 0.15 },
  gap: { absolute: 5 * UM },
  layers: section.layers.map(() => ({ thickness: { relative: 0.1 }, er: { relative: 0.05 } })),
  mask: { thickness: { relative: 0.3 }, er: { relative: 0.1 } },
});

/** A power law for a solver: what spread and sensitivities must then be is known by hand. */
function powerLaw(section: CrossSection): LineParameters {
  const [layer] = section.layers;
  const [trace] = section.traces;
  const impedance =
    50 * Math.pow(layer!.thickness / (0.1 * MM), 0.5) * Math.pow(trace!.widthBottom / (180 * UM), -0.4);
  return {
    capacitance: [[1e-10]],
    airCapacitance: [[3e-11]],
    inductance: [[3e-7]],
    single: { impedance, effectivePermittivity: 3, delay: 6e-9 },
    unknowns: 0,
    errorEstimate: 0,
  };
}

describe("spread of a power law (computed by hand)", () => {
  const tolerances: SectionTolerances = {
    width: { relative: 0.1, distribution: "uniform" },
    layers: [{ thickness: { relative: 0.1, distribution: "uniform" } }],
  };
  const spread = impedanceSpread(masked, tolerances, { samples: 4000, seed: 7, solve: powerLaw });

  it("mean, sigma and shares agree with the exact integrals to 1 %", () => {
    // E[p^a] over a uniform ±10 %: (1.1^(a+1) − 0.9^(a+1))/(0.2 (a + 1))
    const moment = (a: number) => (1.1 ** (a + 1) - 0.9 ** (a + 1)) / (0.2 * (a + 1));
    const mean = 50 * moment(0.5) * moment(-0.4);
    const square = 2500 * moment(1) * moment(-0.8);
    expect(Math.abs(spread.mean / mean - 1)).toBeLessThan(1e-4);
    expect(Math.abs(spread.sigma / Math.sqrt(square - mean * mean) - 1)).toBeLessThan(0.01);
    expect(spread.sensitivities.map(({ name }) => name)).toEqual(["height of layer 1", "width"]);
    expect(spread.sensitivities[0]!.share).toBeCloseTo(25 / 41, 2);
    expect(spread.sensitivities[0]!.ohms).toBeCloseTo(25 * (Math.sqrt(1.1) - Math.sqrt(0.9)), 3);
    expect(spread.sensitivities[1]!.ohms).toBeLessThan(0);
  });

  it("corners take every tolerance to its bad end", () => {
    expect(spread.corners.low).toBeCloseTo(50 * 0.9 ** 0.5 * 1.1 ** -0.4, 9);
    expect(spread.corners.nominal).toBe(50);
    expect(spread.corners.high).toBeCloseTo(50 * 1.1 ** 0.5 * 0.9 ** -0.4, 9);
  });

  it("a surface of second order in logarithms is exact for it, to 1e-9", () => {
    expect(spread.surrogateError).toBeLessThan(1e-9);
    const direct = impedanceSpread(masked, tolerances, {
      samples: 4000,
      seed: 7,
      method: "direct",
      solve: powerLaw,
    });
    expect(direct.mean).toBeCloseTo(spread.mean, 8);
    expect(direct.surrogateError).toBeNull();
    expect(direct.solves).toBeGreaterThan(4000);
  });
});

describe("yield, percentiles, histogram", () => {
  const spread = impedanceSpread(masked, everything(masked), { samples: 2000, seed: 3 });

  it("yield grows from 0 to 1 with the tolerance and is the share of samples inside", () => {
    expect(spread.yieldWithin(0)).toBeLessThan(0.01);
    expect(spread.yieldWithin(0.5)).toBe(1);
    const inside = spread.values.filter((z) => Math.abs(z - 48) <= 0.05 * 48).length / 2000;
    expect(spread.predictedYield(48, 0.05)).toBe(inside);
    expect(predictedYield(spread.values, 48, 0.05)).toBe(inside);
    expect(spread.yieldWithin(0.05)).toBeGreaterThan(spread.yieldWithin(0.02));
    expect(predictedYield([45, 50, 55], 50, 0.1)).toBe(1);
  });

  it("percentiles ascend about the median, and every sample lies in the histogram and between the corners", () => {
    const { p01, p05, p10, p50, p90, p95, p99 } = spread.percentiles;
    const ascending = [spread.corners.low, p01, p05, p10, p50, p90, p95, p99, spread.corners.high];
    expect([...ascending].sort((a, b) => a - b)).toEqual(ascending);
    expect(spread.histogram.counts.reduce((a, b) => a + b, 0)).toBe(2000);
    expect(spread.histogram.edges).toHaveLength(spread.histogram.counts.length + 1);
  });

  it("one sample, and no tolerance at all, are legal", () => {
    const still = impedanceSpread(masked, {}, { samples: 5, seed: 1 });
    expect(still.sigma).toBe(0);
    expect(still.yieldWithin(0.001)).toBe(1);
    expect(still.sensitivities).toEqual([]);
    expect(still.corners.low).toBe(still.corners.high);
    const one = impedanceSpread(masked, everything(masked), { samples: 1, seed: 1 });
    expect(one.histogram.counts).toHaveLength(1);
  });
});

describe("spread by the field solver", () => {
  for (const [name, section] of [
    ["masked microstrip", masked],
    ["stripline pair", pair],
  ] as const) {
    it(`${name}: the surrogate is within 0.2 % of a field solve at each of 60 samples, ± full tolerances`, () => {
      const factors = factorsOf(section, everything(section));
      const move = sectionMover(section, factors);
      const solve = (shares: ArrayLike<number>) =>
        impedancesOf(solveCrossSection(move(factors.map((factor, f) => shares[f]! * factor.range))));
      const surface = fitSurrogate(factors, solve(new Float64Array(factors.length)), solve);
      const uniform = factors.map((factor) => ({ ...factor, distribution: "uniform" as const }));
      const shares = drawSamples(uniform, 60, 11, "random");
      for (let i = 0; i < 60; i++) {
        const offset = i * factors.length;
        const there = solve(shares.subarray(offset, offset + factors.length));
        const scale = Math.hypot(...shares.subarray(offset, offset + factors.length));
        for (const [quantity, value] of Object.entries(there)) {
          const off = Math.abs(surface.at(quantity as keyof typeof there, shares, offset) / value - 1);
          // uniform points lie farther out than any normal sample; they may be off more by the cube of the distance
          expect(off, `${quantity}`).toBeLessThan(2e-3 * Math.max(1, scale ** 3));
        }
      }
    });

    it(`${name}: mean and percentiles of surrogate and direct within 0.1 %, sigma within 2 %`, () => {
      const options = { samples: 300, seed: 5 };
      const direct = impedanceSpread(section, everything(section), { ...options, method: "direct" });
      const quick = impedanceSpread(section, everything(section), options);
      expect(quick.method).toBe("surrogate");
      expect(quick.solves).toBeLessThan(45);
      expect(Object.keys(quick.quantities)).toEqual(
        section === pair ? ["differential", "common", "odd", "even"] : ["single"],
      );
      for (const quantity of Object.keys(direct.quantities) as (keyof typeof direct.quantities)[]) {
        const [a, b] = [direct.quantities[quantity]!, quick.quantities[quantity]!];
        expect(Math.abs(b.mean / a.mean - 1)).toBeLessThan(1e-3);
        expect(Math.abs(b.sigma / a.sigma - 1)).toBeLessThan(0.02);
        expect(Math.abs(b.percentiles.p05 / a.percentiles.p05 - 1)).toBeLessThan(1e-3);
        expect(Math.abs(b.percentiles.p95 / a.percentiles.p95 - 1)).toBeLessThan(1e-3);
      }
    });
  }

  it("wider etch, thicker copper, higher Dk and thicker mask lower the impedance, more height raises it (physics)", () => {
    const { sensitivities } = impedanceSpread(masked, everything(masked), { samples: 10, seed: 1 });
    const ohms = Object.fromEntries(sensitivities.map((s) => [s.name, s.ohms]));
    for (const name of ["width", "copper thickness", "Dk of layer 1", "mask thickness", "Dk of the mask"]) {
      expect(ohms[name], name).toBeLessThan(0);
    }
    expect(ohms["height of layer 1"]).toBeGreaterThan(0);
    expect(ohms["side slope"]).toBeGreaterThan(0);
    expect(sensitivities.reduce((sum, s) => sum + s.share, 0)).toBeCloseTo(1, 12);
  });

  it("answers as Hammerstad–Jensen does when its field solver is replaced by that formula", () => {
    const solve = (section: CrossSection): LineParameters => ({
      ...powerLaw(section),
      single: {
        impedance: closedForms(section).find(({ id }) => id.includes("jensen-1980-thickness"))!.impedance
          .single!,
        effectivePermittivity: 3,
        delay: 1,
      },
    });
    const { mask: _, ...bare } = masked;
    const by = impedanceSpread(bare, everything(bare), { samples: 500, seed: 2, solve });
    const field = impedanceSpread(bare, everything(bare), { samples: 500, seed: 2 });
    expect(Math.abs(by.sigma / by.mean / (field.sigma / field.mean) - 1)).toBeLessThan(0.1);
  });

  it("the same seed gives the same samples, another seed others, with close statistics", () => {
    const run = (seed: number) => impedanceSpread(masked, everything(masked), { samples: 500, seed });
    expect(run(1).values).toEqual(run(1).values);
    expect(run(1).values).not.toEqual(run(2).values);
    expect(Math.abs(run(1).sigma / run(2).sigma - 1)).toBeLessThan(0.1);
  });

  it("falls back to direct where the surface does not hold (a solver with a kink)", () => {
    const kinked = (section: CrossSection): LineParameters => {
      const line = powerLaw(section);
      const high = section.layers[0]!.thickness > 0.105 * MM;
      return { ...line, single: { ...line.single!, impedance: line.single!.impedance * (high ? 1.2 : 1) } };
    };
    const tolerances: SectionTolerances = {
      layers: [{ thickness: { relative: 0.1, distribution: "uniform" } }],
    };
    expect(impedanceSpread(masked, tolerances, { samples: 50, seed: 1, solve: kinked }).method).toBe(
      "direct",
    );
  });
});

describe("how tolerances move a section", () => {
  const moved = (section: CrossSection, tolerances: SectionTolerances, share = 1) => {
    const factors = factorsOf(section, tolerances);
    return sectionMover(section, factors)(factors.map((factor) => share * factor.range));
  };

  it("etch moves both edges: the pitch of a pair stays, the slot to coplanar copper shrinks by the same", () => {
    const wide = moved(pair, { width: { absolute: 10 * UM } });
    expect(wide.traces.map((trace) => trace.x)).toEqual(pair.traces.map((trace) => trace.x));
    expect(wide.traces[1]!.widthBottom).toBeCloseTo(110 * UM, 12);
    expect(wide.traces[0]!.widthTop).toBeCloseTo(101 * UM, 12);
    const coplanar = moved({ ...masked, coplanar: { gap: 150 * UM } }, { width: { absolute: 10 * UM } });
    expect(coplanar.coplanar?.gap).toBeCloseTo(140 * UM, 12);
  });

  it("a trace keeps its seat: on the core it rises with it, under the core it hangs from it", () => {
    const thick = moved(pair, { layers: [{ thickness: { absolute: 10 * UM } }] });
    expect(thick.traces[0]!.y).toBeCloseTo(0.11 * MM, 12);
    const hanging: CrossSection = {
      ...pair,
      layers: [
        { thickness: 0.1175 * MM, er: 3.7 },
        { thickness: 0.1 * MM, er: 4.4 },
      ],
    };
    const heavy = moved(hanging, { copper: { absolute: 5 * UM } });
    expect(heavy.traces[0]!.y + heavy.traces[0]!.thickness).toBeCloseTo(0.1175 * MM, 12);
  });

  it("resin as thick as the copper beside it follows the copper; the gap to the plane stays", () => {
    const resin: CrossSection = {
      ...pair,
      layers: [
        { thickness: 0.1 * MM, er: 4.4 },
        { thickness: 17.5 * UM, er: 3.2 },
        { thickness: 0.12 * MM, er: 3.7 },
      ],
    };
    const heavy = moved(resin, { copper: { absolute: 5 * UM } });
    expect(heavy.layers[1]!.thickness).toBeCloseTo(22.5 * UM, 12);
    expect(heavy.layers[2]!.thickness).toBe(0.12 * MM);
  });

  it("layers of one material share their Dk; named materials part them", () => {
    const same: CrossSection = { ...pair, layers: pair.layers.map((layer) => ({ ...layer, er: 4 })) };
    const er = { relative: 0.05 };
    expect(factorsOf(same, { layers: [{ er }, { er }] })).toHaveLength(1);
    expect(moved(same, { layers: [{ er }, { er }] }).layers.map((layer) => layer.er)).toEqual([4.2, 4.2]);
    expect(
      factorsOf(same, {
        layers: [
          { er, material: "core" },
          { er, material: "prepreg" },
        ],
      }),
    ).toHaveLength(2);
  });

  it("refuses impossible tolerances, naming them", () => {
    const of =
      (tolerances: SectionTolerances, options = {}) =>
      () =>
        impedanceSpread(masked, tolerances, { samples: 10, seed: 1, ...options });
    expect(of({ width: { relative: 1 } })).toThrow(expect.objectContaining({ field: "tolerances.width" }));
    expect(of({ copper: { absolute: -1 } })).toThrow(expect.objectContaining({ field: "tolerances.copper" }));
    expect(of({ width: { relative: 0.1, sigmas: 0 } })).toThrow(
      expect.objectContaining({ field: "tolerances.width.sigmas" }),
    );
    expect(of({}, { samples: 0 })).toThrow(expect.objectContaining({ field: "samples" }));
    expect(of({}, { seed: Number.NaN })).toThrow(expect.objectContaining({ field: "seed" }));
    expect(of({ layers: [{ er: { relative: 0.9 } }] })).toThrow(
      expect.objectContaining({ field: "layers[0].er" }),
    );
  });
});
