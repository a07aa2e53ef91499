/** Gauss–Legendre rules with what the panels of the field solver derive from them, on t ∈ (−1, 1). */
export interface Rule {
  n: number;
  /** abscissae, ascending, and weights (their sum is 2) */
  t: Float64Array;
  w: Float64Array;
  /** ends of the n cells, one around each abscissa, as wide as its weight; n + 1 values from −1 to 1 */
  ends: Float64Array;
  /** [j·n + m] = (2m + 1)/2 · P_m(t_j): Legendre coefficients of the density that carries unit charge at node j */
  legendre: Float64Array;
  /** [i·n + j] = share of node j's charge that lies in cell i */
  cellShare: Float64Array;
}

const LARGEST = 8;
const rules: Rule[] = [];

/** The rule with n abscissae, 1 ≤ n ≤ 8. */
export function gaussRule(n: number): Rule {
  const rule = rules[n];
  if (!rule) throw new RangeError(`There is no Gauss rule with ${n} points here.`);
  return rule;
}

/** P_0 … P_m(t) into `out`. */
function legendreValues(t: number, m: number, out: Float64Array): void {
  out[0] = 1;
  if (m > 0) out[1] = t;
  for (let k = 1; k < m; k++) out[k + 1] = ((2 * k + 1) * t * out[k]! - k * out[k - 1]!) / (k + 1);
}

function makeRule(n: number): Rule {
  const t = new Float64Array(n);
  const w = new Float64Array(n);
  const p = new Float64Array(n + 2);
  for (let j = 0; j < n; j++) {
    let x = -Math.cos((Math.PI * (j + 0.75)) / (n + 0.5));
    let slope = 1;
    for (let pass = 0; pass < 20; pass++) {
      legendreValues(x, n, p);
      slope = (n * (x * p[n]! - p[n - 1]!)) / (x * x - 1);
      x -= p[n]! / slope;
    }
    t[j] = x;
    w[j] = 2 / ((1 - x * x) * slope * slope);
  }
  const ends = new Float64Array(n + 1);
  ends[0] = -1;
  for (let j = 0; j < n; j++) ends[j + 1] = ends[j]! + w[j]!;
  ends[n] = 1;
  const legendre = new Float64Array(n * n);
  for (let j = 0; j < n; j++) {
    legendreValues(t[j]!, n, p);
    for (let m = 0; m < n; m++) legendre[j * n + m] = ((2 * m + 1) / 2) * p[m]!;
  }
  const cellShare = new Float64Array(n * n);
  const low = new Float64Array(n + 2);
  for (let i = 0; i < n; i++) {
    legendreValues(ends[i]!, n, low);
    legendreValues(ends[i + 1]!, n, p);
    for (let j = 0; j < n; j++) {
      let share = legendre[j * n]! * (ends[i + 1]! - ends[i]!);
      for (let m = 1; m < n; m++) {
        const integral = (p[m + 1]! - p[m - 1]! - low[m + 1]! + low[m - 1]!) / (2 * m + 1);
        share += legendre[j * n + m]! * integral;
      }
      cellShare[i * n + j] = share;
    }
  }
  return { n, t, w, ends, legendre, cellShare };
}

for (let n = 1; n <= LARGEST; n++) rules[n] = makeRule(n);
