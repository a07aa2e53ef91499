import type { CrossSection } from "../cross-section";
import { conductorModel, halved, type MetalOptions, type Pattern } from "./conductor-model";
import { monotoneCubic } from "./monotone-cubic";
import { seriesImpedance, type SeriesImpedance } from "./series-impedance";
import { skinDepth, surfaceResistance } from "./skin-effect";
import { quadratic } from "./wall-recession";

/** R [Ω/m] and L [H/m] of one current pattern at a frequency [Hz]. */
export interface SeriesAt {
  resistance: number;
  inductance: number;
}

export interface PatternInput {
  conductivity: number;
  /** the pattern's metal as filaments */
  filaments: Filaments;
  /** the pattern's currents over the traces, square sum 1 */
  currents: readonly number[];
  /** kR [1/m] and external inductance [H/m] of the pattern */
  factor: number;
  external: number;
}

/** Series impedance over a section's traces by filaments, up to `limit` Hz. */
export interface Filaments {
  limit: number;
  at: (frequency: number) => SeriesImpedance;
  /** what a pattern's currents are in the model */
  currents: (currents: readonly number[]) => readonly number[];
}

/** Filaments serve up to the frequency where the copper is this many skin depths thick. */
const THICK = 16;
/** Nodes of the interpolation lie at most this ratio apart in frequency. */
const RATIO = 3;
/** Stands for zero frequency: every conductor then carries uniform current. */
const DIRECT_CURRENT_HZ = 1e-3;

/**
 * R and L of a smooth line from direct current up.
 *
 * Below f1, where δ is a sixteenth of the copper: filaments, interpolated between nodes in ln f. Above, as they go on:
 *
 *     R = Rs kR ρ(x),   ρ = 1 − a x^⅓ + b x,  x = δ/δ1,   L = L∞ + R/ω
 *
 * a: sharp corners carry less than the rule of receding walls says; b: opposite and adjoining faces share the depth.
 * Both come from the filaments at f1 and f1/4. Etched corners are not razor-sharp, so of a shortfall ρ < 1 in the skin
 * regime (fully from t/δ = 8 on) its square root is kept: half-way between sharp corners and the rule.
 *
 * @returns a function of frequency [Hz], ≥ 0; for rectangles R within 1 % and L within 0.3 % of finite elements with
 *   sharp corners (tests/reference/impedance/rl.json); for trapezoids R within 2 % of Rs kR in the skin regime, no finer
 *   reference at hand
 */
export function lineImpedance(
  input: PatternInput,
  frequencies: Float64Array,
): (frequency: number) => SeriesAt {
  const { conductivity, filaments: model, factor, external } = input;
  const { limit } = model;
  const wanted = [...new Set([...frequencies].filter((f) => f < limit))].sort((a, b) => a - b);
  const currents = model.currents(input.currents);
  const filaments = (frequency: number): SeriesAt => {
    const { resistance, inductance } = model.at(frequency);
    return { resistance: quadratic(resistance, currents), inductance: quadratic(inductance, currents) };
  };
  const join = filaments(limit);
  const rule = (frequency: number) => surfaceResistance(conductivity, frequency) * factor;
  const here = join.resistance / rule(limit) - 1;
  const before = filaments(limit / 4).resistance / rule(limit / 4) - 1;
  // −a + b = here, −2^⅓ a + 2 b = before
  const corners = (before - 2 * here) / (2 - Math.cbrt(2));
  const sharing = here + corners;
  const depthThere = skinDepth(conductivity, limit);
  const offset = external + join.resistance / (2 * Math.PI * limit) - join.inductance;
  const low = lowRange(filaments, wanted, limit, join);
  return (frequency) => {
    if (frequency < limit) {
      const { resistance, inductance } = low(frequency);
      return {
        resistance: resistance * rounded(frequency, limit, resistance, rule),
        inductance: inductance + offset,
      };
    }
    const x = skinDepth(conductivity, frequency) / depthThere;
    const ratio = 1 - corners * Math.cbrt(x) + sharing * x;
    const sharp = rule(frequency) * ratio;
    const resistance = sharp * rounded(frequency, limit, sharp, rule);
    return { resistance, inductance: external + sharp / (2 * Math.PI * frequency) };
  };
}

/** What rounded corners add to the resistance of sharp ones, as a factor. */
function rounded(
  frequency: number,
  limit: number,
  sharp: number,
  rule: (frequency: number) => number,
): number {
  if (frequency <= limit / 16) return 1;
  const ratio = sharp / rule(frequency);
  const share = Math.min(1, Math.log((16 * frequency) / limit) / Math.log(4));
  return ratio < 1 ? Math.pow(ratio, (-share * share * (3 - 2 * share)) / 2) : 1;
}

/**
 * Two models: few filaments where the skin is thick, many up to the limit. What was solved once is kept, for modes that
 * share a model.
 */
export function filamentsOf(section: CrossSection, metal: MetalOptions, pattern: Pattern): Filaments {
  const thinnest = Math.min(...section.traces.map((trace) => trace.thickness));
  const limit = (THICK / thinnest) ** 2 * skinDepth(metal.conductivity, 1) ** 2;
  const share = halved(section, pattern) ? 0.5 : 1;
  const model = (highest: number) => seriesImpedance(conductorModel(section, metal, pattern, highest));
  let coarse: ((frequency: number) => SeriesImpedance) | undefined;
  let fine: ((frequency: number) => SeriesImpedance) | undefined;
  const known = new Map<number, SeriesImpedance>();
  const at = (frequency: number): SeriesImpedance => {
    const found = known.get(frequency);
    if (found) return found;
    const solved =
      frequency > limit / 16
        ? (fine ??= model(limit))(frequency)
        : (coarse ??= model(limit / 6))(Math.max(frequency, DIRECT_CURRENT_HZ));
    const scaled = (matrix: number[][]) => matrix.map((row) => row.map((value) => share * value));
    const result = { resistance: scaled(solved.resistance), inductance: scaled(solved.inductance) };
    known.set(frequency, result);
    return result;
  };
  return { limit, at, currents: (currents) => (pattern === "both" ? currents : [1]) };
}

function lowRange(
  filaments: (frequency: number) => SeriesAt,
  wanted: number[],
  limit: number,
  join: SeriesAt,
): (frequency: number) => SeriesAt {
  const positive = wanted.filter((f) => f > 0);
  const lowest = positive[0] ?? limit;
  const count = Math.ceil(Math.log(limit / lowest) / Math.log(RATIO));
  const exact = new Map<number, SeriesAt>();
  if (wanted[0] === 0) exact.set(0, filaments(0));
  if (positive.length <= count + 1) {
    for (const f of positive) exact.set(f, filaments(f));
    return (f) => exact.get(f) ?? filaments(f);
  }
  const x = Float64Array.from(
    { length: count + 1 },
    (_, i) => Math.log(lowest) + (i / count) * Math.log(limit / lowest),
  );
  const nodes = [...x].map((value, i) => (i === count ? join : filaments(Math.exp(value))));
  const resistance = monotoneCubic(
    x,
    Float64Array.from(nodes, (node) => Math.log(node.resistance)),
  );
  const inductance = monotoneCubic(
    x,
    Float64Array.from(nodes, (node) => node.inductance),
  );
  return (f) =>
    exact.get(f) ?? { resistance: Math.exp(resistance(Math.log(f))), inductance: inductance(Math.log(f)) };
}
