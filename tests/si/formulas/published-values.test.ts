import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { DomainError } from "@/lib/si/errors";
import * as f from "@/lib/si/formulas";
import { ETA0, LIGHT_SPEED } from "@/lib/si/physical-constants";
import { fromSi } from "@/lib/si/units";

describe("centred strip without thickness (Cohn 1954, exact)", () => {
  it.each([
    [0.1, 194.226],
    [0.2, 153.029],
    [0.35, 120.435],
    [0.5, 100.432],
    [0.75, 79.108],
    [1, 65.354],
    [1.5, 48.516],
    [2, 38.579],
  ])("w/b %s gives Z0·√εr %s, to the printed digits", (ratio, value) => {
    expect(f.centredStripImpedance(ratio, 1, 1)).toBeCloseTo(value, 3);
    expect(f.centredStripImpedance(ratio, 1, 4.2) * Math.sqrt(4.2)).toBeCloseTo(value, 3);
  });

  it("stays finite to the end of its range and refuses beyond", () => {
    expect(f.centredStripImpedance(400, 1, 1)).toBeGreaterThan(0);
    expect(f.centredStripImpedance(1e-9, 1, 1)).toBeLessThan(2000);
    expect(() => f.centredStripImpedance(401, 1, 1)).toThrow(DomainError);
    for (const bad of [0, -1, Number.NaN, Infinity])
      expect(() => f.centredStripImpedance(bad, 1, 4)).toThrow(DomainError);
    expect(() => f.centredStripImpedance(1, 1, 0.5)).toThrow(DomainError);
  });
});

describe("edge-coupled strips without thickness (Cohn 1955, exact)", () => {
  it.each([
    [0.35, 0.1, 152.957, 79.757],
    [0.5, 0.2, 117.087, 80.103],
    [0.5, 0.5, 107.154, 93.217],
    [1, 0.1, 74.352, 50.688],
  ])("w/b %s, s/b %s: Ze·√εr %s, Zo·√εr %s, to the printed digits", (width, gap, even, odd) => {
    const pair = f.coupledStripImpedances(width, gap, 1, 1);
    expect(pair.even).toBeCloseTo(even, 3);
    expect(pair.odd).toBeCloseTo(odd, 3);
  });

  it("falls back to two lone strips when far apart, to 1e-9", () => {
    const lone = f.centredStripImpedance(0.5, 1, 4);
    const pair = f.coupledStripImpedances(0.5, 150, 1, 4);
    expect(Math.abs(pair.even / lone - 1)).toBeLessThan(1e-9);
    expect(Math.abs(pair.odd / lone - 1)).toBeLessThan(1e-9);
  });
});

describe("thick strip (Wheeler 1978; source of the values: design/check-values, computed)", () => {
  it.each([
    [5, 14, 0.7, 4.2, 51.65, 50.75],
    [4, 11, 0.6, 3.9, 52.72, 51.79],
    [5.5, 16, 0.7, 4.0, 54.49, 53.56],
  ])("w %s, b %s, t %s, εr %s gives %s Ω, the trade's logarithm %s Ω", (w, b, t, er, wheeler, trade) => {
    expect(f.wheeler1978(w, b, t, er).impedance).toBeCloseTo(wheeler, 2);
    expect(f.tradeStripline(w, b, t, er).impedance).toBeCloseTo(trade, 2);
  });
});

describe("microstrip without thickness (Hammerstad, Jensen 1980)", () => {
  it.each([
    [2.2, 0.5, 126.73, 1.73],
    [2.2, 1, 94.96, 1.772],
    [2.2, 2, 65.73, 1.835],
    [2.2, 3, 50.92, 1.878],
    [4.2, 0.5, 97.38, 2.93],
    [4.2, 1, 72.49, 3.041],
    [4.2, 2, 49.71, 3.207],
    [4.2, 3, 38.28, 3.324],
    [9.8, 0.5, 66.54, 6.277],
    [9.8, 1, 49.29, 6.579],
    [9.8, 2, 33.57, 7.034],
    [9.8, 3, 25.73, 7.355],
  ])("εr %s, w/h %s gives %s Ω and εeff %s, to the printed digits", (er, u, impedance, permittivity) => {
    const line = f.hammerstadJensenZeroThickness(u, 1, er);
    expect(line.impedance).toBeCloseTo(impedance, 2);
    expect(line.effectivePermittivity).toBeCloseTo(permittivity, 3);
  });

  it("thickness going to nothing leaves the thin strip, to 1e-6", () => {
    const thin = f.hammerstadJensenZeroThickness(1.5, 1, 4.2);
    const nearly = f.hammerstadJensenThickness(1.5, 1, 1e-9, 4.2);
    expect(Math.abs(nearly.impedance / thin.impedance - 1)).toBeLessThan(1e-6);
    expect(f.hammerstadJensenThickness(1.5, 1, 0, 4.2).impedance).toBe(thin.impedance);
  });

  it("the two forms of Wheeler 1965 meet within 3 % at a width of two heights", () => {
    const narrow = f.wheeler1965(2, 1, 4.2).impedance;
    const wide = f.wheeler1965(2 + 1e-9, 1, 4.2).impedance;
    expect(Math.abs(wide / narrow - 1)).toBeLessThan(0.03);
  });
});

it("light takes 84.725 ps an inch in vacuum (computed)", () => {
  expect(Number(fromSi(1 / LIGHT_SPEED, "ps/in").value)).toBeCloseTo(84.725, 3);
  expect(ETA0).toBeCloseTo(376.7303136668535, 9);
});

describe("complete elliptic integral by the arithmetic-geometric mean", () => {
  it("K(0) = π/2, K(1/√2) = 1.8540746773013719 (Abramowitz, Stegun 17.3)", () => {
    expect(f.completeEllipticIntegral(1)).toBe(Math.PI / 2);
    expect(f.completeEllipticIntegral(Math.SQRT1_2)).toBeCloseTo(1.8540746773013719, 14);
  });

  it("K(k)/K(k′) is 1 at k = k′ and inverts when they swap, to 1e-14", () => {
    expect(f.ellipticRatio(Math.SQRT1_2, Math.SQRT1_2)).toBe(1);
    fc.assert(
      fc.property(fc.double({ min: 1e-6, max: 1 - 1e-9, noNaN: true }), (k) => {
        const c = Math.sqrt((1 - k) * (1 + k));
        expect(Math.abs(f.ellipticRatio(k, c) * f.ellipticRatio(c, k) - 1)).toBeLessThan(1e-14);
      }),
    );
  });
});

const ratio = (min: number, max: number) =>
  fc.double({ min: Math.log(min), max: Math.log(max), noNaN: true }).map(Math.exp);

describe("laws that hold for each formula within its range", () => {
  it("outer: falls with width, rises with height, falls with Dk and with copper thickness", () => {
    fc.assert(
      fc.property(
        ratio(0.05, 20),
        ratio(0.01, 0.4),
        fc.double({ min: 1, max: 12, noNaN: true }),
        (u, t, er) => {
          const z = (w: number, h: number, thickness: number, e: number) =>
            f.hammerstadJensenThickness(w, h, thickness, e).impedance;
          const thickness = t * Math.min(u, 1);
          expect(z(u * 1.01, 1, thickness, er)).toBeLessThan(z(u, 1, thickness, er));
          expect(z(u, 1.01, thickness, er)).toBeGreaterThan(z(u, 1, thickness, er));
          expect(z(u, 1, thickness, er + 0.1)).toBeLessThan(z(u, 1, thickness, er));
          expect(z(u, 1, thickness * 1.1, er)).toBeLessThan(z(u, 1, thickness, er));
        },
      ),
    );
  });

  it("inner: falls with width, rises with plane distance, scales as 1/√εr to 1e-12", () => {
    fc.assert(
      fc.property(ratio(0.05, 8), ratio(0.005, 0.25), ratio(1, 12), (w, t, er) => {
        const z = (width: number, b: number) => f.wheeler1978(width, b, t, er).impedance;
        expect(z(w * 1.01, 1)).toBeLessThan(z(w, 1));
        expect(z(w, 1.01)).toBeGreaterThan(z(w, 1));
        expect(Math.abs((z(w, 1) * Math.sqrt(er)) / f.wheeler1978(w, 1, t, 1).impedance - 1)).toBeLessThan(
          1e-12,
        );
      }),
    );
  });

  it("pairs: odd below even; the odd mode rises and the even mode falls as the gap opens (thin strips, exact)", () => {
    fc.assert(
      fc.property(ratio(0.05, 4), ratio(0.01, 5), (w, s) => {
        const near = f.coupledStripImpedances(w, s, 1, 4);
        const far = f.coupledStripImpedances(w, s * 1.05, 1, 4);
        expect(near.odd).toBeLessThan(near.even);
        expect(far.odd).toBeGreaterThan(near.odd);
        expect(far.even).toBeLessThanOrEqual(near.even);
      }),
    );
  });

  it("scales: every length doubled leaves the impedance, to 1e-12", () => {
    fc.assert(
      fc.property(ratio(0.1, 5), ratio(0.1, 5), ratio(0.01, 0.1), ratio(1, 10), (w, s, t, er) => {
        const same = (a: number, b: number) => expect(Math.abs(a / b - 1)).toBeLessThan(1e-12);
        same(f.wheeler1977(2 * w, 2, 2 * t, er).impedance, f.wheeler1977(w, 1, t, er).impedance);
        same(f.kirschningJansen(2 * w, 2 * s, 2, er).odd, f.kirschningJansen(w, s, 1, er).odd);
        same(f.coplanarWithPlane(2 * w, 2 * s, 2, er).impedance, f.coplanarWithPlane(w, s, 1, er).impedance);
        same(
          f.parallelWheeler(2 * w, 2, 4, 2 * t, er).impedance,
          f.parallelWheeler(w, 1, 2, t, er).impedance,
        );
      }),
    );
  });

  it("never gives NaN: a number or a typed error, for any input", () => {
    const any = fc.double();
    fc.assert(
      fc.property(any, any, any, any, any, (a, b, c, d, e) => {
        for (const run of [
          () => f.hammerstadJensenThickness(a, b, c, e).impedance,
          () => f.wheeler1977(a, b, c, e).impedance,
          () => f.wheeler1978(a, b, c, e).impedance,
          () => f.centredStripImpedance(a, b, e),
          () => f.cohnCoupled(a, b, c, d, e).odd,
          () => f.kirschningJansenThickness(a, b, c, d, e).odd,
          () => f.coplanarWithPlane(a, b, c, e).impedance,
          () => f.tradeMicrostrip(a, b, c, e).impedance,
        ]) {
          const outcome = attempt(run);
          if (outcome instanceof Error) expect(outcome).toBeInstanceOf(DomainError);
          else expect(outcome).not.toBeNaN();
        }
      }),
      { numRuns: 500 },
    );
  });
});

function attempt(run: () => number): number | Error {
  try {
    return run();
  } catch (error) {
    return error instanceof Error ? error : new Error(String(error));
  }
}
