import type { SwitchWeights } from "./switch-weights";

/**
 * Leaves out times at which both weights lie within `tolerance` of the straight line through the ones kept, so that a
 * simulation need not step through points that say nothing. First and last stay. Iterative, never deep.
 * @see D. H. Douglas, T. K. Peucker, "Algorithms for the reduction of the number of points required to represent a
 *   digitized line", Cartographica 10, 1973, p. 112 (with distance taken upward)
 */
export function thinWeights({ time, up, down }: SwitchWeights, tolerance: number): SwitchWeights {
  const last = time.length - 1;
  if (last < 2) return { time, up, down };
  const kept = new Uint8Array(time.length);
  kept[0] = kept[last] = 1;
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
    kept[at] = 1;
    spans.push([from, at], [at, to]);
  }
  const keep = (values: number[]) => values.filter((_, i) => kept[i] === 1);
  return { time: keep(time), up: keep(up), down: keep(down) };
}
