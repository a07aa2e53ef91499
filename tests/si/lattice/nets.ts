import type { Network, Pwl } from "@/lib/si";

export interface PointToPoint {
  volts?: number;
  resistance: number;
  impedance?: number;
  /** null: open */
  load: number | null;
  delay: number;
  /** 0: a jump at t = 0 */
  ramp?: number;
}

/** Driver at "a", one line, load at "b". */
export function pointToPoint({
  volts = 1,
  resistance,
  impedance = 50,
  load,
  delay,
  ramp = 0,
}: PointToPoint): Network {
  return {
    rails: [],
    drivers: [{ name: "U1", kind: "thevenin", node: "a", resistance, wave: edge(volts, ramp) }],
    sections: [{ name: "T1", kind: "line", a: "a", b: "b", impedance, delay }],
    parts: load === null ? [] : [{ name: "RL", kind: "R", a: "b", b: "0", value: load }],
    probes: [
      { name: "source", node: "a" },
      { name: "load", node: "b" },
    ],
  };
}

export function edge(volts: number, ramp: number, start = 0): Pwl {
  return { kind: "pwl", time: [start, start + ramp], value: [0, volts] };
}

/** Straight-line reading; at a jump, the value after. */
export function readAt(time: Float64Array, value: Float64Array, t: number): number {
  let i = 0;
  while (i + 1 < time.length && time[i + 1]! <= t) i++;
  if (i + 1 === time.length) return value[i]!;
  return value[i]! + ((value[i + 1]! - value[i]!) * (t - time[i]!)) / (time[i + 1]! - time[i]!);
}
