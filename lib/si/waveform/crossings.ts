/** Readings of a waveform joined by straight lines; a repeated time is a jump (before, after). */

/** Times and values inside a window: from the value after a jump at its start to the value before one at its end. */
export function cutWindow(
  time: ArrayLike<number>,
  value: ArrayLike<number>,
  from: number,
  to: number,
): { t: Float64Array; v: Float64Array } {
  const count = time.length;
  // First sample later than `from`, first at or later than `to`: the ends are read between samples.
  const first = firstWhere(count, (i) => time[i]! > from);
  const last = firstWhere(count, (i) => time[i]! >= to);
  const inner = Math.max(0, last - first);
  const t = new Float64Array(inner + 2);
  const v = new Float64Array(inner + 2);
  t[0] = 0;
  v[0] = between(time, value, first - 1, from);
  for (let i = 0; i < inner; i++) {
    t[i + 1] = time[first + i]! - from;
    v[i + 1] = value[first + i]!;
  }
  t[inner + 1] = to - from;
  v[inner + 1] = last < count && time[last] === to ? value[last]! : between(time, value, last - 1, to);
  return { t, v };
}

/** Straight between sample i and the next; held beyond either end. */
function between(time: ArrayLike<number>, value: ArrayLike<number>, i: number, at: number): number {
  if (i < 0) return value[0]!;
  if (i >= time.length - 1) return value[time.length - 1]!;
  const span = time[i + 1]! - time[i]!;
  return span > 0 ? value[i]! + ((value[i + 1]! - value[i]!) * (at - time[i]!)) / span : value[i + 1]!;
}

function firstWhere(count: number, test: (i: number) => boolean): number {
  let low = 0;
  let high = count;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (test(middle)) high = middle;
    else low = middle + 1;
  }
  return low;
}

/** First time v ≥ level from sample `start` on; 0 at a start already there; null where it never is. */
export function firstAtOrAbove(t: Float64Array, v: Float64Array, level: number): number | null {
  for (let i = 0; i < v.length; i++) if (v[i]! >= level) return i === 0 ? t[0]! : meet(t, v, i - 1, level);
  return null;
}

/** sup { t: v < level }; null where v never was below, or still is at the end. */
export function lastBelow(t: Float64Array, v: Float64Array, level: number): number | null {
  const end = v.length - 1;
  if (v[end]! < level) return null;
  for (let i = end - 1; i >= 0; i--) if (v[i]! < level) return meet(t, v, i, level);
  return null;
}

/** Where the line from sample i to the next meets the level. */
export function meet(t: Float64Array, v: Float64Array, i: number, level: number): number {
  const rise = v[i + 1]! - v[i]!;
  return rise === 0 ? t[i + 1]! : t[i]! + ((t[i + 1]! - t[i]!) * (level - v[i]!)) / rise;
}

/** ∫ max(0, v − level) dt. */
export function areaAbove(t: Float64Array, v: Float64Array, level: number): number {
  let area = 0;
  for (let i = 1; i < t.length; i++) {
    const dt = t[i]! - t[i - 1]!;
    if (dt === 0) continue;
    const a = v[i - 1]! - level;
    const b = v[i]! - level;
    if (a >= 0 && b >= 0) area += ((a + b) / 2) * dt;
    else if (a > 0) area += ((a * a) / (a - b) / 2) * dt;
    else if (b > 0) area += ((b * b) / (b - a) / 2) * dt;
  }
  return area;
}

/** Longest contiguous time with v > level. */
export function longestAbove(t: Float64Array, v: Float64Array, level: number): number {
  let longest = 0;
  let since: number | null = v[0]! > level ? t[0]! : null;
  for (let i = 1; i < t.length; i++) {
    const above = v[i]! > level;
    if (above && since === null) since = meet(t, v, i - 1, level);
    if (!above && since !== null) {
      longest = Math.max(longest, meet(t, v, i - 1, level) - since);
      since = null;
    }
  }
  return since === null ? longest : Math.max(longest, t[t.length - 1]! - since);
}
