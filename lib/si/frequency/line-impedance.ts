import type { CrossSection } from "../cross-section";
import { conductorModel, halved, type MetalOptions, type Pattern } from "./conductor-model";
import { monotoneCubic } from "./monotone-cubic";
import { seriesImpedance } from "./series-impedance";
import { skinDepth, surfaceResistance } from "./skin-effect";
import { quadratic } from "./wall-recession";

/** R [Ω/m] and L [H/m] of one current pattern at a frequency [Hz]. */
export interface SeriesAt {
  resistance: number;
  inductance: number;
}

export interface PatternInput {
  section: CrossSection;
  metal: MetalOptions;
  pattern: Pattern;
  /** the pattern's currents over the traces, square sum 1 */
  currents: readonly number[];
  /** kR [1/m] and external inductance [H/m] of the pattern */
  factor: number;
  external: number;
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
 * @returns a function of frequency [Hz], ≥ 0; R within 2 % of finite elements with sharp corners and, in the skin
 *   regime, of Rs kR; L within 0.3 %
 */
export function lineImpedance(
  input: PatternInput,
  frequencies: Float64Array,
): (frequency: number) => SeriesAt {
  const { metal, section, factor, external } = input;
  const thinnest = Math.min(...section.traces.map((trace) => trace.thickness));
  const limit = (THICK / thinnest) ** 2 * skinDepth(metal.conductivity, 1) ** 2;
  const wanted = [...new Set([...frequencies].filter((f) => f < limit))].sort((a, b) => a - b);
  const filaments = filamentSolver(input, limit);
  const join = filaments(limit);
  const rule = (frequency: number) => surfaceResistance(metal.conductivity, frequency) * factor;
  const here = join.resistance / rule(limit) - 1;
  const before = filaments(limit / 4).resistance / rule(limit / 4) - 1;
  // −a + b = here, −2^⅓ a + 2 b = before
  const corners = (before - 2 * here) / (2 - Math.cbrt(2));
  const sharing = here + corners;
  const depthThere = skinDepth(metal.conductivity, limit);
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
    const x = skinDepth(metal.conductivity, frequency) / depthThere;
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

/** Two models: few filaments where the skin is thick, many up to the limit. */
function filamentSolver(input: PatternInput, limit: number): (frequency: number) => SeriesAt {
  let coarse: ((frequency: number) => SeriesAt) | undefined;
  let fine: ((frequency: number) => SeriesAt) | undefined;
  return (frequency) => {
    if (frequency > limit / 16) return (fine ??= filamentModel(input, limit))(frequency);
    return (coarse ??= filamentModel(input, limit / 6))(Math.max(frequency, DIRECT_CURRENT_HZ));
  };
}

function filamentModel({ section, metal, pattern, currents }: PatternInput, highest: number) {
  const solve = seriesImpedance(conductorModel(section, metal, pattern, highest));
  const share = halved(section, pattern) ? 0.5 : 1;
  const vector = pattern === "both" ? currents : [1];
  return (frequency: number): SeriesAt => {
    const { resistance, inductance } = solve(frequency);
    return {
      resistance: share * quadratic(resistance, vector),
      inductance: share * quadratic(inductance, vector),
    };
  };
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
