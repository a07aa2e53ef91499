import type { Impedances, SpreadQuantity } from "./quantities";
import type { Factor } from "./tolerances";

/** Shares of half their range at which the factors are tried, ±. */
const REACH = 0.8;
/** Mixed second derivatives are found for this many pairs of the strongest factors. */
const MIXED = 8;

/**
 * Second-order surface through a central design: ln Z over x = ln(p/p₀) of each factor (a plain share for slopes).
 *
 *     ln Z = b₀ + Σ bᵢ xᵢ + Σ bᵢᵢ xᵢ² + Σ bᵢⱼ xᵢ xⱼ
 *
 * Impedances go nearly as powers of lengths and permittivities, so little is left for higher orders.
 */
export interface Surrogate {
  /** [Ω]; shares of half the ranges, one a factor, starting at `offset` */
  at: (quantity: SpreadQuantity, shares: Float64Array, offset: number) => number;
  /** (Z(+1) − Z(−1))/2 over a factor's whole tolerance [Ω] */
  halfEffect: (quantity: SpreadQuantity, factor: number) => number;
}

/**
 * @param solve    impedances at shares of half the ranges
 * @param nominal  impedances with every factor at 0
 */
export function fitSurrogate(
  factors: readonly Factor[],
  nominal: Impedances,
  solve: (shares: Float64Array) => Impedances,
): Surrogate {
  const n = factors.length;
  const names = Object.keys(nominal) as SpreadQuantity[];
  const single = (f: number, share: number) => {
    const shares = new Float64Array(n);
    shares[f] = share;
    return solve(shares);
  };
  const up = factors.map((_, f) => single(f, REACH));
  const down = factors.map((_, f) => single(f, -REACH));
  const surfaces = new Map<SpreadQuantity, Surface>();
  for (const name of names) {
    const constant = Math.log(nominal[name]!);
    const linear = new Float64Array(n);
    const square = new Float64Array(n);
    factors.forEach((factor, f) => {
      const [a, b] = [coordinate(factor, REACH), coordinate(factor, -REACH)];
      const ya = Math.log(up[f]![name]!) - constant;
      const yb = Math.log(down[f]![name]!) - constant;
      // y = l x + q x² through both points
      square[f] = (ya / a - yb / b) / (a - b);
      linear[f] = ya / a - square[f] * a;
    });
    surfaces.set(name, { constant, linear, square, mixed: [] });
  }
  const primary = surfaces.get(names[0]!);
  if (primary) {
    for (const [i, j] of strongestPairs(factors, primary)) {
      const shares = new Float64Array(n);
      shares[i] = REACH;
      shares[j] = REACH;
      const there = solve(shares);
      const [x, y] = [coordinate(factors[i]!, REACH), coordinate(factors[j]!, REACH)];
      for (const name of names) {
        const surface = surfaces.get(name)!;
        const additive = Math.log(up[i]![name]!) + Math.log(up[j]![name]!) - surface.constant;
        surface.mixed.push({ i, j, value: (Math.log(there[name]!) - additive) / (x * y) });
      }
    }
  }
  const x = new Float64Array(n);
  const at = (name: SpreadQuantity, shares: Float64Array, offset: number) => {
    for (let f = 0; f < n; f++) x[f] = coordinate(factors[f]!, shares[offset + f]!);
    return valueOf(surfaces.get(name)!, x);
  };
  return {
    at,
    halfEffect: (name, factor) => {
      const shares = new Float64Array(n);
      shares[factor] = 1;
      const high = at(name, shares, 0);
      shares[factor] = -1;
      return (high - at(name, shares, 0)) / 2;
    },
  };
}

interface Surface {
  constant: number;
  linear: Float64Array;
  square: Float64Array;
  mixed: { i: number; j: number; value: number }[];
}

function valueOf({ constant, linear, square, mixed }: Surface, x: Float64Array): number {
  let sum = constant;
  for (let f = 0; f < x.length; f++) sum += x[f]! * (linear[f]! + square[f]! * x[f]!);
  for (const { i, j, value } of mixed) sum += value * x[i]! * x[j]!;
  return Math.exp(sum);
}

function coordinate({ target, nominal, range }: Factor, share: number): number {
  return target.kind === "slope" ? share : Math.log1p((share * range) / nominal);
}

function strongestPairs(factors: readonly Factor[], { linear }: Surface): [number, number][] {
  const effect = factors.map((factor, f) => Math.abs(linear[f]! * coordinate(factor, 1)));
  const pairs: [number, number][] = [];
  for (let i = 0; i < factors.length; i++) for (let j = 0; j < i; j++) pairs.push([i, j]);
  return pairs.sort((a, b) => effect[b[0]]! * effect[b[1]]! - effect[a[0]]! * effect[a[1]]!).slice(0, MIXED);
}
