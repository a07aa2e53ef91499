import type { SwitchWeights } from "./switch-weights";

/** Of their whole way: what lies below is no part of the switching itself. */
const STILL = 0.02;
/** No straight piece is shorter than the switching divided by this; the first of them that is near enough. */
const PIECES = [50, 100, 200, 400, 800, 1600];

/**
 * Draws weights with as few straight pieces as they need, and none much shorter than the switching itself, for a
 * simulation steps in shares of the shortest piece. Times are chosen where the weights bend; the values there are those
 * whose straight lines come nearest to the weights in least squares, so that what falls between two times keeps its
 * area.
 *
 * @param tolerance  by how much a weight may be missed [1], as the die sees it: through a low-pass of `settling`
 * @param settling   time constant of the die's capacitance [s], ≥ 0
 */
export function thinWeights(weights: SwitchWeights, tolerance: number, settling: number): SwitchWeights {
  if (weights.time.length < 3) return weights;
  const bends = bendsOf(weights, tolerance / 2).map((i) => weights.time[i]!);
  const whole = switchingTime(weights);
  let drawn = weights;
  for (const pieces of PIECES) {
    const knots = apart(bends, whole / pieces);
    drawn = {
      time: knots,
      up: projected(weights.time, weights.up, knots),
      down: projected(weights.time, weights.down, knots),
    };
    const miss = Math.max(
      seenMiss(weights.time, weights.up, knots, drawn.up, settling),
      seenMiss(weights.time, weights.down, knots, drawn.down, settling),
    );
    if (miss <= tolerance) break;
  }
  return drawn;
}

/** Largest difference of the two lines after a low-pass of time constant `settling`, y′ = (difference − y)/settling. */
function seenMiss(
  time: readonly number[],
  value: readonly number[],
  knots: readonly number[],
  drawn: readonly number[],
  settling: number,
): number {
  let k = 0;
  let seen = 0;
  let before = 0;
  let worst = 0;
  time.forEach((t, i) => {
    while (k + 2 < knots.length && knots[k + 1]! < t) k++;
    const share = (t - knots[k]!) / (knots[k + 1]! - knots[k]!);
    const miss = value[i]! - (drawn[k]! + (drawn[k + 1]! - drawn[k]!) * share);
    const passed = settling > 0 ? Math.exp(-(t - (time[i - 1] ?? t)) / settling) : 0;
    seen = seen * passed + (1 - passed) * (settling > 0 ? (miss + before) / 2 : miss);
    before = miss;
    worst = Math.max(worst, Math.abs(seen));
  });
  return worst;
}

/**
 * Indices at which the straight lines between them miss neither weight by more than `tolerance`. Iterative, never deep.
 * @see D. H. Douglas, T. K. Peucker, "Algorithms for the reduction of the number of points required to represent a
 *   digitized line", Cartographica 10, 1973, p. 112 (with distance taken upward)
 */
function bendsOf({ time, up, down }: SwitchWeights, tolerance: number): number[] {
  const last = time.length - 1;
  const kept = new Set([0, last]);
  const spans: [from: number, to: number][] = [[0, last]];
  for (let span = spans.pop(); span; span = spans.pop()) {
    const [from, to] = span;
    let worst = tolerance;
    let at = -1;
    for (let i = from + 1; i < to; i++) {
      const share = (time[i]! - time[from]!) / (time[to]! - time[from]!);
      const miss = Math.max(
        Math.abs(up[from]! + (up[to]! - up[from]!) * share - up[i]!),
        Math.abs(down[from]! + (down[to]! - down[from]!) * share - down[i]!),
      );
      if (miss > worst) [worst, at] = [miss, i];
    }
    if (at < 0) continue;
    kept.add(at);
    spans.push([from, at], [at, to]);
  }
  return [...kept].sort((a, b) => a - b);
}

/** Times of which no two are nearer than `least`; the first and the last stay. */
function apart(times: readonly number[], least: number): number[] {
  const kept: number[] = [];
  const last = times.at(-1)!;
  for (const time of times)
    if (kept.length === 0 || (time - kept.at(-1)! >= least && last - time >= least)) kept.push(time);
  return [...kept, last];
}

/** From where the first weight leaves its rest to where the last one comes to it [s]. */
function switchingTime({ time, up, down }: SwitchWeights): number {
  let [from, to] = [time.length - 1, 0];
  for (const values of [up, down]) {
    const first = values[0]!;
    const final = values.at(-1)!;
    const enough = STILL * Math.max(...values.map((value) => Math.abs(value - first)), 1e-6);
    const leaves = values.findIndex((value) => Math.abs(value - first) > enough);
    const rests = values.findLastIndex((value) => Math.abs(value - final) > enough);
    if (leaves >= 0) from = Math.min(from, leaves);
    if (rests >= 0) to = Math.max(to, rests);
  }
  return Math.max(0, (time[to] ?? 0) - (time[from] ?? 0));
}

/**
 * Values at `knots` whose straight lines are nearest to the straight lines through (time, value), in the integral of
 * squares: M x = b with the mass matrix of the hat functions, tridiagonal. First and last value are kept.
 */
function projected(time: readonly number[], value: readonly number[], knots: readonly number[]): number[] {
  const n = knots.length;
  const diagonal = new Float64Array(n);
  const beside = new Float64Array(n);
  const right = new Float64Array(n);
  let at = 0;
  for (let k = 0; k + 1 < n; k++) {
    const from = knots[k]!;
    const h = knots[k + 1]! - from;
    diagonal[k]! += h / 3;
    diagonal[k + 1]! += h / 3;
    beside[k] = h / 6;
    // Every knot is one of the times, so that a piece of the finer line lies within one span.
    for (; time[at + 1]! <= knots[k + 1]!; at++) {
      const [t0, t1] = [time[at]!, time[at + 1]!];
      const [u0, u1] = [(t0 - from) / h, (t1 - from) / h];
      const [v0, v1] = [value[at]!, value[at + 1]!];
      const sixth = (t1 - t0) / 6;
      // ∫ v·u and ∫ v over the piece, both exact for straight v and u
      const moment = sixth * (v0 * (2 * u0 + u1) + v1 * (u0 + 2 * u1));
      const area = 3 * sixth * (v0 + v1);
      right[k]! += area - moment;
      right[k + 1]! += moment;
      if (at + 2 >= time.length) break;
    }
  }
  return solved(diagonal, beside, right, value[0]!, value.at(-1)!);
}

/** Symmetric tridiagonal system with both end values given, by elimination. */
function solved(
  diagonal: Float64Array,
  beside: Float64Array,
  right: Float64Array,
  first: number,
  last: number,
): number[] {
  const n = diagonal.length;
  const x = new Float64Array(n);
  [x[0], x[n - 1]] = [first, last];
  if (n > 2) {
    right[1]! -= beside[0]! * first;
    right[n - 2]! -= beside[n - 2]! * last;
    for (let i = 2; i < n - 1; i++) {
      const factor = beside[i - 1]! / diagonal[i - 1]!;
      diagonal[i]! -= factor * beside[i - 1]!;
      right[i]! -= factor * right[i - 1]!;
    }
    for (let i = n - 2; i > 0; i--)
      x[i] = (right[i]! - (i < n - 2 ? beside[i]! * x[i + 1]! : 0)) / diagonal[i]!;
  }
  return [...x];
}
