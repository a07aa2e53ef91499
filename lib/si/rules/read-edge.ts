/** What the rules read off a rising wave; one object is filled again and again. Times from the wave's first sample. */
export interface EdgeReading {
  max: number;
  maxTime: number;
  min: number;
  minTime: number;
  /** first v ≥ near threshold, first v ≥ measuring level [s]; NaN: never */
  nearCrossing: number;
  measCrossing: number;
  /** last time outside ± band of `high` [s]; NaN: still outside at the end */
  settled: number;
  /** lowest v after the first maximum that follows the far threshold's crossing; the last v without a drop; NaN: never across */
  dipLevel: number;
  /** when that is [s] */
  dipTime: number;
}

export interface EdgeLevels {
  low: number;
  high: number;
  near: number;
  meas: number;
  far: number;
}

/** Drops below this share of the swing are noise of the last digit, not ringing. */
const EPSILON = 0.005;
/** Settled means within this share of the swing. */
const SETTLE_BAND = 0.1;

export function newReading(): EdgeReading {
  return {
    max: 0,
    maxTime: 0,
    min: 0,
    minTime: 0,
    nearCrossing: NaN,
    measCrossing: NaN,
    settled: NaN,
    dipLevel: NaN,
    dipTime: NaN,
  };
}

/**
 * One pass over a rising wave for all the rules, since a run reads a hundred thousand of them; the quantities are those
 * of `measureEdge` (settle band 10 %), linear between samples. A falling edge is read on its mirror.
 *
 * @param time   [s], ascending from 0; a repeated time is a jump
 * @param until  end of the window [s]
 */
export function readEdge(
  time: Float64Array,
  voltage: Float64Array,
  until: number,
  levels: EdgeLevels,
  into: EdgeReading,
): void {
  const { high, near, meas, far } = levels;
  const swing = high - levels.low;
  const epsilon = EPSILON * swing;
  const band = SETTLE_BAND * swing;
  let before = voltage[0] ?? 0;
  let beforeTime = 0;
  let max = before;
  let maxTime = 0;
  let min = before;
  let minTime = 0;
  let nearCrossing = before >= near ? 0 : NaN;
  let measCrossing = before >= meas ? 0 : NaN;
  let outside = Math.abs(before - high) > band;
  let settled = 0;
  let across = before >= far;
  let top = before;
  let dropped = false;
  let dip = before;
  let dipTime = 0;
  for (let i = 1; i < time.length; i++) {
    let t = time[i] ?? 0;
    let v = voltage[i] ?? 0;
    const last = t > until;
    if (last) {
      if (beforeTime >= until) break;
      v = before + ((v - before) * (until - beforeTime)) / (t - beforeTime);
      t = until;
    }
    if (v > max) {
      max = v;
      maxTime = t;
    } else if (v < min) {
      min = v;
      minTime = t;
    }
    if (nearCrossing !== nearCrossing && v >= near) nearCrossing = crossing(beforeTime, before, t, v, near);
    if (measCrossing !== measCrossing && v >= meas) measCrossing = crossing(beforeTime, before, t, v, meas);
    const beyond = v - high;
    if (beyond > band || beyond < -band) outside = true;
    else if (outside) {
      outside = false;
      settled = crossing(beforeTime, before, t, v, before > high ? high + band : high - band);
    }
    if (!across) {
      if (v >= far) {
        across = true;
        top = v;
        dip = v;
      }
    } else if (dropped) {
      if (v < dip) {
        dip = v;
        dipTime = t;
      }
    } else if (v > top) top = v;
    else if (v < top - epsilon) {
      dropped = true;
      dip = v;
      dipTime = t;
    }
    before = v;
    beforeTime = t;
    if (last) break;
  }
  into.max = max;
  into.maxTime = maxTime;
  into.min = min;
  into.minTime = minTime;
  into.nearCrossing = nearCrossing;
  into.measCrossing = measCrossing;
  into.settled = outside ? NaN : settled;
  into.dipLevel = !across ? NaN : dropped ? dip : before;
  into.dipTime = dropped ? dipTime : NaN;
}

function crossing(t0: number, v0: number, t1: number, v1: number, level: number): number {
  return v1 === v0 ? t1 : t0 + ((t1 - t0) * (level - v0)) / (v1 - v0);
}
