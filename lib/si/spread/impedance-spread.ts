import { validateCrossSection, type CrossSection, type LineParameters } from "../cross-section";
import { DomainError } from "../errors";
import { solveCrossSection } from "../field";
import { sectionMover } from "./perturb";
import { impedancesOf, type Impedances, type SpreadQuantity } from "./quantities";
import { drawSamples, relativeSigma } from "./samples";
import { spreadStatistics, type SpreadStatistics } from "./statistics";
import { fitSurrogate, type Surrogate } from "./surrogate";
import { factorsOf, type Factor, type SectionTolerances } from "./tolerances";

export interface SpreadOptions {
  /** 1 to 1,000,000 */
  samples: number;
  seed: number;
  /**
   * "direct": a field solve a sample; "surrogate": a surface through some twenty solves; "auto" (the default): the
   * surrogate where its check holds 0.2 %, else direct
   */
  method?: "direct" | "surrogate" | "auto";
  accuracy?: "live" | "standard" | "reference";
  sampling?: "latin" | "random";
  /** in place of the field solver */
  solve?: (section: CrossSection) => LineParameters;
}

/** How one tolerance moves an impedance. */
export interface Sensitivity {
  /** "width", "height of layer 1", "Dk of the mask" … */
  name: string;
  target: Factor["target"];
  /** half the difference between both ends of the tolerance [Ω]; negative where more of it lowers the impedance */
  ohms: number;
  /** share of the variance [1], first order; all shares sum to 1 */
  share: number;
}

export interface QuantitySpread extends SpreadStatistics {
  /** every tolerance at the end that lowers, and that raises, the impedance [Ω] */
  corners: { low: number; nominal: number; high: number };
  /** the weightiest first */
  sensitivities: Sensitivity[];
}

/** The spread of the single or differential impedance, and of every quantity by itself. */
export interface ImpedanceSpread extends QuantitySpread {
  quantity: SpreadQuantity;
  quantities: Partial<Record<SpreadQuantity, QuantitySpread>>;
  method: "direct" | "surrogate";
  solves: number;
  samples: number;
  seed: number;
  /** largest relative difference of the surrogate from field solves at points it has not seen; null: direct */
  surrogateError: number | null;
}

const LARGEST_SAMPLES = 1e6;
/** What the surrogate may be off, relative. */
const SURROGATE_LIMIT = 2e-3;
/** Samples at which it is held against a solve: those farthest out, and a few at hand. */
const CHECKED = 3;

/**
 * How fabrication tolerances spread a line's impedance: worst corners and a Monte Carlo estimate.
 *
 * Independent factors: etch width, side slope, copper thickness, pitch, each layer's height, each material's Dk, mask
 * thickness and Dk. All traces etch and plate alike; layers of one material share its Dk; a pair keeps its pitch while
 * it etches. Normal factors are cut off at the tolerance (3 σ unless said otherwise).
 *
 * @returns the same for the same seed on every machine; the surrogate within 0.2 % of direct
 * @throws DomainError for a bad section, tolerance or option, and where a tolerance makes the section impossible
 */
export function impedanceSpread(
  section: CrossSection,
  tolerances: SectionTolerances,
  options: SpreadOptions,
): ImpedanceSpread {
  validateCrossSection(section);
  const { samples: count, seed, method = "auto", sampling = "latin" } = options;
  if (!(Number.isInteger(count) && count >= 1 && count <= LARGEST_SAMPLES)) {
    throw new DomainError("The number of samples must be whole, from 1 to 1,000,000.", "samples");
  }
  if (!Number.isFinite(seed)) throw new DomainError("The seed must be a number.", "seed");
  const accuracy = options.accuracy ?? "standard";
  const field = options.solve ?? ((moved: CrossSection) => solveCrossSection(moved, { accuracy }));
  const factors = factorsOf(section, tolerances);
  const move = sectionMover(section, factors);
  let solves = 0;
  const deviations = new Float64Array(factors.length);
  const solve = (shares: Float64Array, offset = 0): Impedances => {
    factors.forEach((factor, f) => (deviations[f] = shares[offset + f]! * factor.range));
    solves++;
    return impedancesOf(field(move(deviations)));
  };
  const nominal = solve(new Float64Array(factors.length));
  const names = Object.keys(nominal) as SpreadQuantity[];
  const shares = drawSamples(factors, count, seed, sampling);
  const surface = fitSurrogate(factors, nominal, solve);
  const checked = method === "direct" ? null : checkSurrogate(surface, names, shares, factors.length, solve);
  const direct = method === "direct" || (method === "auto" && checked !== null && checked > SURROGATE_LIMIT);
  const values = samplesOf(names, count, (i) => {
    const offset = i * factors.length;
    if (direct) return solve(shares, offset);
    return Object.fromEntries(names.map((name) => [name, surface.at(name, shares, offset)]));
  });
  const quantities: Partial<Record<SpreadQuantity, QuantitySpread>> = {};
  const cornerSolves = cornerSolver(solve);
  for (const name of names) {
    quantities[name] = {
      ...spreadStatistics(values.get(name)!, nominal[name]!),
      corners: cornersOf(name, factors, surface, nominal, cornerSolves),
      sensitivities: sensitivitiesOf(name, factors, surface),
    };
  }
  const quantity: SpreadQuantity = "single" in nominal ? "single" : "differential";
  return {
    ...quantities[quantity]!,
    quantity,
    quantities,
    method: direct ? "direct" : "surrogate",
    solves,
    samples: count,
    seed,
    surrogateError: direct ? null : checked,
  };
}

function samplesOf(
  names: SpreadQuantity[],
  count: number,
  at: (i: number) => Impedances,
): Map<SpreadQuantity, Float64Array> {
  const values = new Map(names.map((name) => [name, new Float64Array(count)]));
  for (let i = 0; i < count; i++) {
    const impedances = at(i);
    for (const name of names) values.get(name)![i] = impedances[name]!;
  }
  return values;
}

/** Largest relative difference between surface and solve over the sample farthest out and a few others. */
function checkSurrogate(
  surface: Surrogate,
  names: SpreadQuantity[],
  shares: Float64Array,
  n: number,
  solve: (shares: Float64Array, offset: number) => Impedances,
): number {
  if (n === 0) return 0;
  const count = shares.length / n;
  let farthest = 0;
  let reach = 0;
  for (let i = 0; i < count; i++) {
    let square = 0;
    for (let f = 0; f < n; f++) square += shares[i * n + f]! ** 2;
    if (square > reach) [farthest, reach] = [i, square];
  }
  const points = new Set([farthest]);
  for (let k = 1; k < CHECKED && k < count; k++) points.add(Math.floor((k * count) / CHECKED));
  let worst = 0;
  for (const i of points) {
    const there = solve(shares, i * n);
    for (const name of names) {
      worst = Math.max(worst, Math.abs(surface.at(name, shares, i * n) / there[name]! - 1));
    }
  }
  return worst;
}

/** Solves a corner once, however many quantities share it. */
function cornerSolver(solve: (shares: Float64Array) => Impedances): (signs: number[]) => Impedances {
  const known = new Map<string, Impedances>();
  return (signs) => {
    const key = signs.join();
    const found = known.get(key) ?? solve(Float64Array.from(signs));
    known.set(key, found);
    return found;
  };
}

function cornersOf(
  name: SpreadQuantity,
  factors: Factor[],
  surface: Surrogate,
  nominal: Impedances,
  solve: (signs: number[]) => Impedances,
): { low: number; nominal: number; high: number } {
  const high = factors.map((_, f) => (surface.halfEffect(name, f) < 0 ? -1 : 1));
  return {
    low: solve(high.map((sign) => -sign))[name]!,
    nominal: nominal[name]!,
    high: solve(high)[name]!,
  };
}

function sensitivitiesOf(name: SpreadQuantity, factors: Factor[], surface: Surrogate): Sensitivity[] {
  const all = factors.map((factor, f) => {
    const ohms = surface.halfEffect(name, f);
    return { name: factor.name, target: factor.target, ohms, variance: (ohms * relativeSigma(factor)) ** 2 };
  });
  const total = all.reduce((sum, { variance }) => sum + variance, 0);
  return all
    .map(({ variance, ...rest }) => ({ ...rest, share: total > 0 ? variance / total : 0 }))
    .sort((a, b) => b.share - a.share);
}
