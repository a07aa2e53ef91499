import { DomainError } from "../errors";
import { areaAbove, cutWindow, firstAtOrAbove, lastBelow, meet } from "./crossings";
import { ringFrequency } from "./ring-frequency";

export interface EdgeWindow {
  edge: "rise" | "fall";
  /** source edge start and window end [s]; every time in the result is relative to `from` */
  from: number;
  to: number;
  /** DC levels of this probe, whichever edge, low < high [V] */
  low: number;
  high: number;
  vil: number;
  vih: number;
  /** where given, ringback is looked at from the first crossing of this threshold (rise, fall) */
  vihAc?: number;
  vilAc?: number;
  vmeas: number;
  /** share of the swing, default 0.05 */
  settleBand?: number;
}

/** Voltages in V, times in s from the window's start, slews in V/s; null where it does not exist. */
export interface EdgeMeasures {
  /** beyond the new level */
  overshoot: number;
  /** beyond the new level [V·s] */
  overshootArea: number;
  peakTime: number | null;
  /** dip back below the new level after reaching it */
  undershoot: number;
  firstCrossing: number | null;
  lastCrossing: number | null;
  vilCrossing: number | null;
  vihCrossing: number | null;
  farThresholdLast: number | null;
  slew2080: number | null;
  slewThresholds: number | null;
  /** last time outside the settle band; 0: never; null: outside at the window's end */
  settling: number | null;
  ringback: { present: boolean; level: number | null; margin: number | null };
  /** greatest fall back between the thresholds */
  nonMonotonic: number;
  monotonic: boolean;
  /** [Hz] */
  ringFrequency: number | null;
}

/** Below this share of the swing nothing is counted. */
const NOTHING = 0.005;

/**
 * Measures one edge of a waveform joined by straight lines. A falling edge is measured on −v with the levels mirrored,
 * so "overshoot" is always beyond the new level. The window starts with the value after a jump there and ends with the
 * value before one.
 *
 * @throws DomainError where the swing or the window is nothing, or the record is empty
 */
export function measureEdge(time: Float64Array, voltage: Float64Array, window: EdgeWindow): EdgeMeasures {
  const { from, to, low, high, settleBand = 0.05 } = window;
  if (time.length === 0 || time.length !== voltage.length)
    throw new DomainError("A waveform needs as many voltages as times, at least one.", "voltage");
  if (!(high > low))
    throw new DomainError("The edge has no swing: its high level must be above its low level.", "high");
  if (!(to > from)) throw new DomainError("The window must end after it starts.", "to");
  const swing = high - low;
  const eps = NOTHING * swing;
  const isRise = window.edge === "rise";
  const { t, v } = cutWindow(time, voltage, from, to);
  if (!isRise) for (let i = 0; i < v.length; i++) v[i] = -v[i]!;
  const post = isRise ? high : -low;
  const pre = post - swing;
  const near = isRise ? window.vil : -window.vih;
  const far = isRise ? window.vih : -window.vil;
  const farAc = isRise ? (window.vihAc ?? far) : window.vilAc === undefined ? far : -window.vilAc;
  const vmeas = isRise ? window.vmeas : -window.vmeas;

  const peak = highest(v);
  const overshoot = Math.max(0, v[peak]! - post);
  const reached = firstAtOrAbove(t, v, post - eps);
  const nearFirst = firstAtOrAbove(t, v, near);
  const farFirst = firstAtOrAbove(t, v, far);
  const nonMonotonic = fallBack(v, near, far);
  return {
    overshoot,
    overshootArea: overshoot > 0 ? areaAbove(t, v, post) : 0,
    peakTime: overshoot > eps ? t[peak]! : null,
    undershoot: reached === null ? 0 : over(post - lowestAfter(t, v, reached), eps),
    firstCrossing: firstAtOrAbove(t, v, vmeas),
    lastCrossing: lastBelow(t, v, vmeas),
    vilCrossing: isRise ? nearFirst : farFirst,
    vihCrossing: isRise ? farFirst : nearFirst,
    farThresholdLast: lastBelow(t, v, far),
    slew2080: slew(
      0.6 * swing,
      firstAtOrAbove(t, v, pre + 0.2 * swing),
      firstAtOrAbove(t, v, pre + 0.8 * swing),
    ),
    slewThresholds: slew(far - near, nearFirst, farFirst),
    settling: settling(t, v, post, settleBand * swing),
    ringback: ringback(v, farAc, far, eps, isRise),
    nonMonotonic,
    monotonic: nonMonotonic <= eps,
    ringFrequency: reached === null ? null : ringFrequency(t, v, reached, post, 0.01 * swing),
  };
}

function over(value: number, least: number): number {
  return value > least ? value : 0;
}

function highest(v: Float64Array): number {
  let at = 0;
  for (let i = 1; i < v.length; i++) if (v[i]! > v[at]!) at = i;
  return at;
}

/** Lowest value at or after a time at which the waveform passes upward (or starts). */
function lowestAfter(t: Float64Array, v: Float64Array, since: number): number {
  let lowest = Infinity;
  for (let i = v.length - 1; i >= 0 && t[i]! >= since; i--)
    if (v[i]! < lowest && (t[i]! > since || i === 0 || v[i]! >= v[i - 1]!)) lowest = v[i]!;
  return lowest;
}

function slew(rise: number, from: number | null, to: number | null): number | null {
  return from === null || to === null || to <= from ? null : rise / (to - from);
}

function settling(t: Float64Array, v: Float64Array, post: number, band: number): number | null {
  const end = v.length - 1;
  if (Math.abs(v[end]! - post) > band) return null;
  for (let i = end - 1; i >= 0; i--) {
    const off = v[i]! - post;
    if (Math.abs(off) > band) return meet(t, v, i, off > 0 ? post + band : post - band);
  }
  return 0;
}

/** Greatest drop of clip(v, near, far) from its running maximum. */
function fallBack(v: Float64Array, near: number, far: number): number {
  let top = -Infinity;
  let worst = 0;
  for (const value of v) {
    const clipped = Math.min(far, Math.max(near, value));
    if (clipped > top) top = clipped;
    else if (top - clipped > worst) worst = top - clipped;
  }
  return worst;
}

/** From the first crossing of the far threshold: the lowest value after the running maximum first drops by more than eps. */
function ringback(
  v: Float64Array,
  start: number,
  far: number,
  eps: number,
  isRise: boolean,
): EdgeMeasures["ringback"] {
  let i = 0;
  while (i < v.length && v[i]! < start) i++;
  if (i === v.length) return { present: false, level: null, margin: null };
  let top = -Infinity;
  let present = false;
  let lowest = Infinity;
  for (; i < v.length; i++) {
    const value = v[i]!;
    if (!present && value > top) top = value;
    if (!present && top - value > eps) present = true;
    if (present && value < lowest) lowest = value;
  }
  const level = present ? lowest : v[v.length - 1]!;
  return { present, level: isRise ? level : -level, margin: level - far };
}
