import { DomainError } from "../errors";
import { meet } from "./crossings";
import { ascendingReader, checkWaveform, type Waveform } from "./waveform";

export interface PatternEye {
  /** between the lowest "one" and the highest "zero" at the best instant [V]; negative: closed */
  height: number;
  /** longest part of the unit interval without a crossing of the threshold [s] */
  width: number;
  /** of the crossings: from first to last of the cluster, and their standard deviation [s] */
  jitter: { peakToPeak: number; rms: number };
  /** [V] */
  threshold: number;
  /** middle of the crossings within the unit interval that starts at `from` [s] */
  crossing: number;
  /** best instant, from the crossing on [s] */
  at: number;
  lowestOne: number;
  highestZero: number;
  /** the intervals laid over one another, from crossing to crossing, `samples` + 1 values each [V] */
  traces: Float64Array[];
  /** of each: is it a one? */
  ones: boolean[];
}

export interface PatternEyeOptions {
  /** where the first interval starts: after what is not yet steady [s]; default the record's start */
  from?: number;
  /** [V]; default the middle between highest and lowest */
  threshold?: number;
  /** what was sent from `from` on, repeating: tells ones from zeros where the eye is closed; default by the threshold */
  bits?: ArrayLike<number>;
  /** a unit interval, default 64 */
  samples?: number;
}

/**
 * Folds a waveform on the unit interval and reads the eye: intervals run from the middle of the threshold crossings to
 * the next; ones and zeros are told apart by the bits sent, shifted by whole bits to where they fit best, or by the
 * threshold in the interval's middle.
 *
 * @param bitTime  the unit interval [s], > 0
 * @throws DomainError where fewer than two intervals fit or nothing crosses the threshold
 */
export function patternEye(waveform: Waveform, bitTime: number, options: PatternEyeOptions = {}): PatternEye {
  checkWaveform(waveform, "waveform");
  const { time, voltage } = waveform;
  const { from = time[0]!, bits, samples = 64 } = options;
  if (!(bitTime > 0)) throw new DomainError("An eye needs a bit time above zero.", "bitTime");
  const first = time.findIndex((t) => t >= from);
  const end = time[time.length - 1]!;
  if (first < 0 || !(end - from >= 2 * bitTime))
    throw new DomainError("An eye needs at least two bits of waveform.", "from");
  let low = Infinity;
  let high = -Infinity;
  for (let i = first; i < voltage.length; i++) {
    low = Math.min(low, voltage[i]!);
    high = Math.max(high, voltage[i]!);
  }
  const { threshold = (low + high) / 2 } = options;
  const phases = crossingPhases(waveform, first, from, bitTime, threshold);
  if (phases.length === 0)
    throw new DomainError("The waveform never crosses the threshold, so there is no eye.", "threshold");
  const { gap, middle, rms } = cluster(phases, bitTime);
  const { traces, indices } = fold(waveform, from + middle, bitTime, samples);
  const ones = bits
    ? byBits(traces, indices, bits, samples)
    : traces.map((trace) => trace[samples >> 1]! > threshold);
  if (!ones.includes(true) || !ones.includes(false))
    throw new DomainError("An eye needs both ones and zeros.", bits ? "bits" : "threshold");
  let at = 0;
  let best = { height: -Infinity, lowestOne: NaN, highestZero: NaN };
  for (let n = 0; n <= samples; n++) {
    let lowestOne = Infinity;
    let highestZero = -Infinity;
    traces.forEach((trace, k) => {
      if (ones[k]) lowestOne = Math.min(lowestOne, trace[n]!);
      else highestZero = Math.max(highestZero, trace[n]!);
    });
    if (lowestOne - highestZero <= best.height) continue;
    best = { height: lowestOne - highestZero, lowestOne, highestZero };
    at = (n * bitTime) / samples;
  }
  return {
    ...best,
    width: gap,
    jitter: { peakToPeak: bitTime - gap, rms },
    threshold,
    crossing: middle,
    at,
    traces,
    ones,
  };
}

/** Every crossing's place in the unit interval, ascending [s]. */
function crossingPhases(
  { time, voltage }: Waveform,
  first: number,
  from: number,
  bitTime: number,
  threshold: number,
): number[] {
  const phases: number[] = [];
  for (let i = first; i + 1 < time.length; i++) {
    const above = voltage[i]! > threshold;
    if (above === voltage[i + 1]! > threshold) continue;
    const since = (meet(time, voltage, i, threshold) - from) / bitTime;
    phases.push((since - Math.floor(since)) * bitTime);
  }
  return phases.sort((a, b) => a - b);
}

/** The widest gap between crossings around the interval; the rest is one cluster, whose middle and spread are read. */
function cluster(phases: readonly number[], bitTime: number): { gap: number; middle: number; rms: number } {
  let gap = phases[0]! + bitTime - phases[phases.length - 1]!;
  let start = 0;
  for (let i = 1; i < phases.length; i++)
    if (phases[i]! - phases[i - 1]! > gap) {
      gap = phases[i]! - phases[i - 1]!;
      start = i;
    }
  const origin = phases[start]!;
  const offsets = phases.map((phase) => (phase >= origin ? phase - origin : phase - origin + bitTime));
  const mean = offsets.reduce((sum, one) => sum + one, 0) / offsets.length;
  const rms = Math.sqrt(offsets.reduce((sum, one) => sum + (one - mean) ** 2, 0) / offsets.length);
  return { gap, middle: (origin + (bitTime - gap) / 2) % bitTime, rms };
}

function fold(
  waveform: Waveform,
  start: number,
  bitTime: number,
  samples: number,
): { traces: Float64Array[]; indices: number[] } {
  const read = ascendingReader(waveform, "after");
  const end = waveform.time[waveform.time.length - 1]!;
  const traces: Float64Array[] = [];
  const indices: number[] = [];
  let last = NaN;
  for (let k = 0; start + (k + 1) * bitTime <= end * (1 + 1e-12); k++) {
    const trace = new Float64Array(samples + 1);
    // The end of one interval is the start of the next.
    trace[0] = k === 0 ? read(start) : last;
    for (let n = 1; n <= samples; n++) trace[n] = read(start + (k + n / samples) * bitTime);
    last = trace[samples]!;
    traces.push(trace);
    indices.push(k);
  }
  return { traces, indices };
}

/** Ones by the bits sent, at the whole-bit shift where bits and middles agree best. */
function byBits(
  traces: readonly Float64Array[],
  indices: readonly number[],
  bits: ArrayLike<number>,
  samples: number,
): boolean[] {
  const count = bits.length;
  const middles = traces.map((trace) => trace[samples >> 1]!);
  const mean = middles.reduce((sum, v) => sum + v, 0) / middles.length;
  let best = 0;
  let bestFit = -Infinity;
  for (let shift = 0; shift < count; shift++) {
    let fit = 0;
    middles.forEach((v, i) => {
      fit += (v - mean) * (bits[(indices[i]! + count - shift) % count]! ? 1 : -1);
    });
    if (fit <= bestFit) continue;
    bestFit = fit;
    best = shift;
  }
  return indices.map((k) => Boolean(bits[(k + count - best) % count]));
}
