import { DomainError } from "../errors";
import type { SectionWaves } from "./simulate";

/** The two waves at a place on a lossless section [V]; their sum is the voltage there. */
export interface WavesAt {
  /** travelling from a to b */
  forward: number;
  /** travelling from b to a */
  backward: number;
}

/**
 * The waves at a place and time: what left an end, as long ago as it took to come here,
 * v(x, t) = a.outgoing(t − x·delay) + b.outgoing(t − (1 − x)·delay). Before the record the section was at rest.
 *
 * @param time      the record's times [s]
 * @param position  0 at end a … 1 at end b
 * @param t         [s]; at a jump, the value after
 * @throws DomainError where the place is not on the section
 */
export function wavesAlong(
  { a, b, delay }: SectionWaves,
  time: Float64Array,
  position: number,
  t: number,
): WavesAt {
  if (!(position >= 0 && position <= 1))
    throw new DomainError("A place on a section is between 0 and 1.", "position");
  return {
    forward: valueAt(time, a.outgoing, t - position * delay),
    backward: valueAt(time, b.outgoing, t - (1 - position) * delay),
  };
}

function valueAt(time: Float64Array, value: Float64Array, t: number): number {
  if (t < 0) return value[0]!;
  let low = 0;
  let high = time.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (time[middle]! > t) high = middle;
    else low = middle + 1;
  }
  const i = low - 1;
  if (i >= time.length - 1) return value[time.length - 1]!;
  return value[i]! + ((value[i + 1]! - value[i]!) * (t - time[i]!)) / (time[i + 1]! - time[i]!);
}
