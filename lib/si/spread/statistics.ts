/** What is said of one impedance's spread. */
export interface SpreadStatistics {
  /** [Ω] */
  nominal: number;
  mean: number;
  sigma: number;
  /** [Ω], interpolated between samples */
  percentiles: { p01: number; p05: number; p10: number; p50: number; p90: number; p95: number; p99: number };
  /** bins of equal width from the least to the largest sample; `edges` has one more than `counts` */
  histogram: { edges: Float64Array; counts: Int32Array };
  /** every sample, ascending [Ω] */
  values: Float64Array;
  /** share of samples [1] within ± fraction of the nominal impedance */
  yieldWithin: (fraction: number) => number;
  /** share of samples [1] within ± fraction of a target [Ω] */
  predictedYield: (target: number, fraction: number) => number;
}

const LARGEST_BINS = 60;

export function spreadStatistics(samples: Float64Array, nominal: number): SpreadStatistics {
  const values = samples.slice().sort();
  const n = values.length;
  const mean = values.reduce((sum, value) => sum + value, 0) / n;
  const variance = values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / Math.max(1, n - 1);
  const at = (p: number) => percentile(values, p);
  return {
    nominal,
    mean,
    sigma: Math.sqrt(variance),
    percentiles: {
      p01: at(0.01),
      p05: at(0.05),
      p10: at(0.1),
      p50: at(0.5),
      p90: at(0.9),
      p95: at(0.95),
      p99: at(0.99),
    },
    histogram: histogramOf(values),
    values,
    yieldWithin: (fraction) => predictedYield(values, nominal, fraction),
    predictedYield: (target, fraction) => predictedYield(values, target, fraction),
  };
}

/**
 * Share of impedances within ± fraction of a target, both ends in.
 * @param values  ascending [Ω]     @param target  [Ω], > 0     @param fraction  [1], ≥ 0
 */
export function predictedYield(values: ArrayLike<number>, target: number, fraction: number): number {
  // a hair of slack: a bound met in decimals must not be lost in doubles
  const slack = 1e-12 * target;
  const low = firstAbove(values, target * (1 - fraction) - slack);
  const high = firstAbove(values, target * (1 + fraction) + slack);
  return values.length === 0 ? 0 : (high - low) / values.length;
}

/** First index whose value exceeds the bound. */
function firstAbove(values: ArrayLike<number>, bound: number): number {
  let [low, high] = [0, values.length];
  while (low < high) {
    const middle = (low + high) >> 1;
    if (values[middle]! > bound) high = middle;
    else low = middle + 1;
  }
  return low;
}

function percentile(values: Float64Array, p: number): number {
  const position = p * (values.length - 1);
  const below = Math.floor(position);
  const above = Math.min(below + 1, values.length - 1);
  return values[below]! + (position - below) * (values[above]! - values[below]!);
}

/** Bin width by Freedman and Diaconis, 2 IQR n^−⅓ (Z. Wahrscheinlichkeitstheorie 57, 1981, p. 453). */
function histogramOf(values: Float64Array): { edges: Float64Array; counts: Int32Array } {
  const n = values.length;
  const [low, high] = [values[0]!, values[n - 1]!];
  const range = high - low;
  if (!(range > 1e-12 * Math.abs(high))) {
    return { edges: Float64Array.of(low, high), counts: Int32Array.of(n) };
  }
  const width = (2 * (percentile(values, 0.75) - percentile(values, 0.25))) / Math.cbrt(n);
  const bins = Math.max(5, Math.min(LARGEST_BINS, width > 0 ? Math.ceil(range / width) : 5));
  const edges = Float64Array.from({ length: bins + 1 }, (_, i) => low + (range * i) / bins);
  const counts = new Int32Array(bins);
  for (const value of values) counts[Math.min(bins - 1, Math.floor(((value - low) / range) * bins))]!++;
  return { edges, counts };
}
