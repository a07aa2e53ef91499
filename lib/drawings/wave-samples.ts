/** Samples of a waveform: times never decrease; a repeated time is a jump (before, after). */
export interface Samples {
  /** [s] */
  time: ArrayLike<number>;
  /** [V] */
  volts: ArrayLike<number>;
}

/** Index of the last sample at or before a time; -1 before the first. */
export function indexAt(time: ArrayLike<number>, at: number): number {
  let low = 0;
  let high = time.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if ((time[middle] ?? Infinity) <= at) low = middle + 1;
    else high = middle;
  }
  return low - 1;
}

/** Voltage at a time on the straight lines between samples; the ends extend level; after a jump, its later value. */
export function voltsAt({ time, volts }: Samples, at: number): number | null {
  const n = Math.min(time.length, volts.length);
  if (n === 0 || !Number.isFinite(at)) return null;
  const i = indexAt(time, at);
  if (i < 0) return finite(volts[0]);
  if (i >= n - 1) return finite(volts[n - 1]);
  const [t0, t1, v0, v1] = [time[i] ?? 0, time[i + 1] ?? 0, volts[i] ?? 0, volts[i + 1] ?? 0];
  return finite(t1 > t0 ? v0 + ((v1 - v0) * (at - t0)) / (t1 - t0) : v1);
}

function finite(v: number | undefined): number | null {
  return v !== undefined && Number.isFinite(v) ? v : null;
}

/** Lowest and highest voltage of a waveform; null when it has no finite sample. */
export function extent(waves: readonly Samples[]): { low: number; high: number } | null {
  let [low, high] = [Infinity, -Infinity];
  for (const { volts } of waves)
    for (let i = 0; i < volts.length; i++) {
      const v = volts[i] ?? NaN;
      if (v < low) low = v;
      if (v > high) high = v;
    }
  return low <= high && Number.isFinite(low) && Number.isFinite(high) ? { low, high } : null;
}

/**
 * The samples of a span, thinned to what a plot of so many columns can show: first, lowest, highest and last of
 * each column, so that no peak is lost.
 */
export function thinned(
  wave: Samples,
  from: number,
  to: number,
  columns: number,
): [time: number, volts: number][] {
  const { time, volts } = wave;
  const n = Math.min(time.length, volts.length);
  const start = Math.max(indexAt(time, from), 0);
  const out: [number, number][] = [];
  const keep = (i: number): void => {
    const v = volts[i];
    if (v !== undefined && Number.isFinite(v)) out.push([time[i] ?? 0, v]);
  };
  const last = Math.min(indexAt(time, to) + 1, n - 1);
  if (last - start <= columns * 4) {
    for (let i = start; i <= last; i++) keep(i);
    return out;
  }
  const span = (to - from) / columns;
  for (let i = start; i <= last;) {
    const column = Math.floor(((time[i] ?? 0) - from) / span);
    let [low, high, end] = [i, i, i];
    while (end + 1 <= last && Math.floor(((time[end + 1] ?? 0) - from) / span) === column) {
      end++;
      if ((volts[end] ?? 0) < (volts[low] ?? 0)) low = end;
      if ((volts[end] ?? 0) > (volts[high] ?? 0)) high = end;
    }
    for (const k of [...new Set([i, Math.min(low, high), Math.max(low, high), end])].sort((a, b) => a - b))
      keep(k);
    i = end + 1;
  }
  return out;
}

/** A span in which a waveform is beyond a limit. */
export interface Excess {
  from: number;
  to: number;
  /** the outline between curve and limit, time and volts */
  outline: [time: number, volts: number][];
  /** where it is furthest beyond */
  worst: { time: number; volts: number; past: number };
}

/**
 * Spans where a waveform passes a limit, with the crossing points found on the straight lines between samples.
 *
 * @param wave  the samples
 * @param limit volts
 * @param side  "max": above is beyond; "min": below is beyond
 * @param from  start of the time in which the limit holds [s]
 * @param to    end of it [s]
 */
export function excesses(
  wave: Samples,
  limit: number,
  side: "max" | "min",
  from: number,
  to: number,
): Excess[] {
  const beyond = (v: number): number => (side === "max" ? v - limit : limit - v);
  const points: [number, number][] = [];
  const push = (t: number): void => {
    const v = voltsAt(wave, t);
    if (v !== null) points.push([t, v]);
  };
  const n = Math.min(wave.time.length, wave.volts.length);
  if (n === 0 || !(to > from)) return [];
  push(Math.max(from, wave.time[0] ?? from));
  for (let i = Math.max(indexAt(wave.time, from), 0); i < n; i++) {
    const t = wave.time[i] ?? 0;
    if (t > to) break;
    if (t > from) points.push([t, wave.volts[i] ?? 0]);
  }
  push(Math.min(to, wave.time[n - 1] ?? to));

  const found: Excess[] = [];
  let open: [number, number][] = [];
  const close = (): void => {
    const start = open[0];
    const end = open.at(-1);
    if (start && end && end[0] > start[0]) {
      let worst = start;
      for (const p of open) if (beyond(p[1]) > beyond(worst[1])) worst = p;
      if (beyond(worst[1]) > 0)
        found.push({
          from: start[0],
          to: end[0],
          outline: [[start[0], limit], ...open, [end[0], limit]],
          worst: { time: worst[0], volts: worst[1], past: beyond(worst[1]) },
        });
    }
    open = [];
  };
  for (let i = 0; i < points.length; i++) {
    const p = points[i] as [number, number];
    const before = points[i - 1];
    const [now, then] = [beyond(p[1]), before ? beyond(before[1]) : 0];
    if (before && now > 0 !== then > 0) {
      const share = then / (then - now);
      const crossing: [number, number] = [before[0] + share * (p[0] - before[0]), limit];
      if (now > 0) open = [crossing];
      else open.push(crossing);
    }
    if (now > 0) open.push(p);
    else close();
  }
  close();
  return found;
}
