import { DomainError } from "../errors";

/** Samples joined by straight lines; a repeated time is a jump (before, after). */
export interface Waveform {
  /** [s], never decreasing */
  time: Float64Array;
  /** [V] */
  voltage: Float64Array;
}

export function checkWaveform({ time, voltage }: Waveform, field: string): void {
  if (time.length === 0 || time.length !== voltage.length)
    throw new DomainError("A waveform needs as many voltages as times, at least one.", field);
}

/** Reads a waveform at times that ascend from call to call, after a jump or before it; held beyond either end. */
export function ascendingReader(
  { time, voltage }: Waveform,
  side: "before" | "after",
): (t: number) => number {
  const last = time.length - 1;
  let i = -1;
  return (t) => {
    while (i < last && (side === "after" ? time[i + 1]! <= t : time[i + 1]! < t)) i++;
    if (i < 0) return voltage[0]!;
    if (i === last) return voltage[last]!;
    const span = time[i + 1]! - time[i]!;
    return voltage[i]! + ((voltage[i + 1]! - voltage[i]!) * (t - time[i]!)) / span;
  };
}

/** Values at start, start + step, … as far as the waveform goes. */
export function sampled(waveform: Waveform, start: number, step: number): Float64Array {
  const end = waveform.time[waveform.time.length - 1]!;
  const read = ascendingReader(waveform, "after");
  const count = Math.max(1, Math.floor((end - start) / step + 1e-9) + 1);
  const values = new Float64Array(count);
  for (let n = 0; n < count; n++) values[n] = read(start + n * step);
  return values;
}
